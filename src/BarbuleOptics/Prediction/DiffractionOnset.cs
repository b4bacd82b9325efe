using BarbuleOptics.Layering;

namespace BarbuleOptics.Prediction;

/// <summary>The longest wavelength at which a periodic section sends light into an order besides the specular one.</summary>
/// <remarks>With P the period, a the incidence, b the angle of the rods' axis (0 across the plane of incidence, 90 degrees along it), n_s and n
/// the indices of the surround and of the medium of the order, grating equation: P (n_s sin a cos b + sqrt(n^2 - (n_s sin a sin b)^2)).</remarks>
internal static class DiffractionOnset
{
    /// <summary>Longest wavelength in nm with an order that propagates in the matrix.</summary>
    public static double InMatrixNm(Section section, double periodNm, double sine, double surroundIndex, double matrixIndex)
    {
        (double along, double across) = Parts(section, surroundIndex * sine);
        return periodNm * (across + Math.Sqrt(Math.Max(0, matrixIndex * matrixIndex - along * along)));
    }

    /// <summary>Longest wavelength in nm with an order that leaves into the surround.</summary>
    public static double InSurroundNm(Section section, double periodNm, double sine, double surroundIndex)
    {
        (double along, double across) = Parts(section, sine);
        return periodNm * surroundIndex * (across + Math.Sqrt((1 - along) * (1 + along)));
    }

    /// <summary>The longest wavelength of the grid, in nm, that does not exceed its own onset; null when none does.</summary>
    public static double? LongestWithin(ReadOnlySpan<double> wavelengthsNm, Func<double, double> onsetNm)
    {
        for (int i = wavelengthsNm.Length - 1; i >= 0; i--)
        {
            if (wavelengthsNm[i] <= onsetNm(wavelengthsNm[i]))
                return wavelengthsNm[i];
        }
        return null;
    }

    // Along the rods and across them; exact where the axis is, for a cosine of 90 degrees is not.
    private static (double Along, double Across) Parts(Section section, double sine)
        => section.IsAcross ? (0, sine) : section.IsAlong ? (sine, 0) : (sine * Math.Sin(section.Axis.Radians), sine * Math.Cos(section.Axis.Radians));
}

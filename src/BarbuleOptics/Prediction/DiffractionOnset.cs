using BarbuleOptics.Layering;

namespace BarbuleOptics.Prediction;

/// <summary>The longest wavelength at which a periodic section sends light into an order besides the specular one.</summary>
/// <remarks>With P the period, a the incidence, n_s and n_m the indices of surround and matrix, grating equation:
/// rods across the plane of incidence, P (n_m + n_s sin a) in the matrix and P n_s (1 + sin a) in the surround;
/// along it, P sqrt(n_m^2 - n_s^2 sin^2 a) and P n_s cos a.</remarks>
internal static class DiffractionOnset
{
    /// <summary>Longest wavelength in nm with an order that propagates in the matrix.</summary>
    public static double InMatrixNm(Section section, double periodNm, double sine, double surroundIndex, double matrixIndex)
        => section.IsAcross
            ? periodNm * (matrixIndex + surroundIndex * sine)
            : periodNm * Math.Sqrt(Math.Max(0, matrixIndex * matrixIndex - surroundIndex * surroundIndex * sine * sine));

    /// <summary>Longest wavelength in nm with an order that leaves into the surround.</summary>
    public static double InSurroundNm(Section section, double periodNm, double sine, double surroundIndex)
        => section.IsAcross ? periodNm * surroundIndex * (1 + sine) : periodNm * surroundIndex * Math.Sqrt((1 - sine) * (1 + sine));

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
}

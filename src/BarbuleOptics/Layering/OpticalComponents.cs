using BarbuleOptics.Quantities;

namespace BarbuleOptics.Layering;

/// <summary>Principal permittivities (ex, ey, ez) of the media of a stack against wavelength, as structure of arrays.</summary>
/// <remarks>Six arrays of media x wavelengths, one medium after another: element m * WavelengthCount + w.
/// Imaginary parts are 0 or above (time factor exp(-i omega t)).</remarks>
public sealed class OpticalComponents
{
    /// <summary>Room for <paramref name="mediumCount"/> media at <paramref name="wavelengthCount"/> wavelengths, all zero.</summary>
    public OpticalComponents(int mediumCount, int wavelengthCount)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(mediumCount);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(wavelengthCount);
        MediumCount = mediumCount;
        WavelengthCount = wavelengthCount;
        int size = checked(mediumCount * wavelengthCount);
        XReal = new double[size];
        XImaginary = new double[size];
        YReal = new double[size];
        YImaginary = new double[size];
        ZReal = new double[size];
        ZImaginary = new double[size];
    }

    /// <summary>Number of media.</summary>
    public int MediumCount { get; }

    /// <summary>Number of wavelengths.</summary>
    public int WavelengthCount { get; }

    /// <summary>Changes whenever a value is set, so that what was computed from these constants can be told from what was not.</summary>
    internal int Version { get; private set; }

    internal double[] XReal { get; }

    internal double[] XImaginary { get; }

    internal double[] YReal { get; }

    internal double[] YImaginary { get; }

    internal double[] ZReal { get; }

    internal double[] ZImaginary { get; }

    /// <summary>Sets the three components of one medium at one wavelength.</summary>
    /// <exception cref="ArgumentOutOfRangeException">A part is not finite, or an imaginary part is below zero.</exception>
    public void Set(int medium, int wavelength, DiagonalPermittivity value)
    {
        Version++;
        int at = medium * WavelengthCount + wavelength;
        (XReal[at], XImaginary[at]) = (Guard.Finite(value.X.Real), Guard.NotNegative(value.X.Imaginary));
        (YReal[at], YImaginary[at]) = (Guard.Finite(value.Y.Real), Guard.NotNegative(value.Y.Imaginary));
        (ZReal[at], ZImaginary[at]) = (Guard.Finite(value.Z.Real), Guard.NotNegative(value.Z.Imaginary));
    }

    /// <summary>The three components of one medium at one wavelength.</summary>
    public DiagonalPermittivity Get(int medium, int wavelength)
    {
        int at = medium * WavelengthCount + wavelength;
        return new(new(XReal[at], XImaginary[at]), new(YReal[at], YImaginary[at]), new(ZReal[at], ZImaginary[at]));
    }
}

using BarbuleOptics.Color;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>An eye that looks at spectra on one grid, under one light, adapted to one background.</summary>
/// <remarks>Made once; for many spectra call <see cref="Matrix"/> and <see cref="Noise"/>, which allocate nothing. Immutable and safe to share between threads.</remarks>
public sealed class BirdEye
{
    /// <summary>Prepares it.</summary>
    /// <param name="grid">Wavelengths of the spectra; see <see cref="CatchMatrix.CanCatch"/>.</param>
    /// <param name="system">The eye.</param>
    /// <param name="light">The light.</param>
    /// <param name="background">Reflectance of what it is adapted to; a perfect mirror where null.</param>
    /// <exception cref="ArgumentException">A grid does not cover 300 to 700 nm, or the background is black to a cone.</exception>
    public BirdEye(WavelengthGrid grid, VisualSystem system, Illuminant light, Spectrum? background = null)
    {
        Matrix = new CatchMatrix(grid, system, light, background);
        Noise = new ReceptorNoise(system);
    }

    /// <summary>The visual system.</summary>
    public VisualSystem System => Matrix.System;

    /// <summary>Turns spectra into catches.</summary>
    public CatchMatrix Matrix { get; }

    /// <summary>Turns catches into contrasts.</summary>
    public ReceptorNoise Noise { get; }

    /// <summary>The color of <paramref name="reflectance"/>.</summary>
    /// <exception cref="ArgumentException"><paramref name="reflectance"/> stands on another grid.</exception>
    public BirdColor Look(Spectrum reflectance)
    {
        ArgumentNullException.ThrowIfNull(reflectance);
        if (!reflectance.Grid.Equals(Matrix.Grid))
            throw new ArgumentException("Must stand on the grid that this eye was made for.", nameof(reflectance));
        Span<double> catches = stackalloc double[CatchMatrix.RowCount];
        Matrix.Multiply(reflectance.Values, catches);
        return new BirdColor(System, catches, Noise);
    }
}

using System.Numerics;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Materials;

/// <summary>Optical constants of one material, n + i k with k &gt;= 0 absorbing (time factor exp(-i omega t)), with their source.</summary>
public sealed class Material
{
    /// <summary>A material by its two dispersions.</summary>
    /// <param name="name">As the catalog lists it.</param>
    /// <param name="n">Refractive index, above zero wherever it is used.</param>
    /// <param name="k">Extinction coefficient, zero or above wherever it is used.</param>
    /// <param name="least">Shortest wavelength for which the constants were published.</param>
    /// <param name="most">Longest such wavelength.</param>
    /// <param name="source">Where the values were published.</param>
    /// <param name="obtained">How the values came into the table.</param>
    /// <param name="note">What a user of the constants should know; null for nothing.</param>
    public Material(string name, IDispersion n, IDispersion k, Length least, Length most, string source, string obtained, string? note = null)
    {
        Name = name;
        N = n;
        K = k;
        LeastNm = Guard.Positive(least.Nanometres, nameof(least));
        MostNm = Guard.Positive(most.Nanometres, nameof(most));
        if (most < least)
            throw new ArgumentOutOfRangeException(nameof(most), most.Nanometres, "Must not be below the range's start.");
        Source = source;
        Obtained = obtained;
        Note = note;
    }

    /// <summary>As the catalog lists it.</summary>
    public string Name { get; }

    /// <summary>Refractive index.</summary>
    public IDispersion N { get; }

    /// <summary>Extinction coefficient.</summary>
    public IDispersion K { get; }

    /// <summary>Start of the published range, in nanometres.</summary>
    public double LeastNm { get; }

    /// <summary>End of the published range, in nanometres.</summary>
    public double MostNm { get; }

    /// <summary>Where the values were published, on one line.</summary>
    public string Source { get; }

    /// <summary>How the values came into the table: published, from memory, fitted.</summary>
    public string Obtained { get; }

    /// <summary>What a user of the constants should know, where their limits lie; null for nothing.</summary>
    public string? Note { get; }

    /// <summary>Whether both constants are formulas, which extend beyond their range.</summary>
    public bool Extrapolates => N.Extrapolates && K.Extrapolates;

    /// <summary>Whether the published range holds every wavelength of <paramref name="grid"/>.</summary>
    public bool Covers(WavelengthGrid grid)
    {
        ArgumentNullException.ThrowIfNull(grid);
        return grid.StartNm >= LeastNm && grid.StopNm <= MostNm;
    }

    /// <summary>n + i k at a vacuum wavelength in nanometres.</summary>
    public Complex IndexAt(double wavelengthNm) => new(N.At(wavelengthNm), K.At(wavelengthNm));

    /// <summary>Permittivity (n + i k)^2 at a vacuum wavelength in nanometres.</summary>
    public Complex PermittivityAt(double wavelengthNm)
    {
        double n = N.At(wavelengthNm), k = K.At(wavelengthNm);
        return new Complex((n - k) * (n + k), 2 * n * k);
    }
}

using System.Numerics;

namespace BarbuleOptics.Grating;

/// <summary>A piece of the section between two planes: a row of rods, a slab with bodies. It holds its own scratch memory and so
/// belongs to one thread; equal rows share one element, and who joins them moves it along x by phases.</summary>
internal interface IGratingElement
{
    /// <summary>Distance between its planes, in nm.</summary>
    double HeightNm { get; }

    /// <summary>Fills <paramref name="block"/>, which has as many channels as <paramref name="waves"/>.</summary>
    /// <returns>False where the equations have no finite solution at this resolution.</returns>
    bool TryScatter(GratingWaves waves, in Resolution resolution, ScatteringBlock block);

    /// <summary>Adds the power lost in each material to <paramref name="byMaterial"/>, in the units of <see cref="GratingWaves"/>
    /// (power through a plane, averaged over x), from the fields that the incoming waves make.
    /// Called right after <see cref="TryScatter"/> with the same waves and resolution, any number of times.</summary>
    /// <param name="waves">The waves.</param>
    /// <param name="resolution">The resolution.</param>
    /// <param name="down">Downward amplitudes at the top plane.</param>
    /// <param name="up">Upward amplitudes at the bottom plane.</param>
    /// <param name="byMaterial">By the number of the material in the section, the matrix included.</param>
    void AddLoss(GratingWaves waves, in Resolution resolution, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up, Span<double> byMaterial);
}

using BarbuleOptics.Grating.Multipoles;

namespace BarbuleOptics.Grating.Joining;

/// <summary>What a row or slab is made of; equal ones share their answers.</summary>
/// <param name="PeriodNm">Its own period, in nm.</param>
/// <param name="HeightNm">Distance between its planes, in nm.</param>
/// <param name="IsCut">Whether its planes cut through bodies, so that fields there have every harmonic.</param>
internal abstract record ElementKind(double PeriodNm, double HeightNm, bool IsCut)
{
    /// <summary>Makes the element that solves it.</summary>
    /// <param name="shared">What elements share.</param>
    /// <param name="sums">Lattice sums, shared by elements of one period that see the same waves.</param>
    public abstract IGratingElement Create(SharedAnswers shared, LatticeSums sums);
}

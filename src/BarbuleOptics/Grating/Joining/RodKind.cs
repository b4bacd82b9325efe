using BarbuleOptics.Grating.Multipoles;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating.Joining;

/// <summary>A row of rods solved by multipoles, one or several side by side in each cell, its planes equally far from the centers.</summary>
/// <param name="PeriodNm">Length of a cell, in nm.</param>
/// <param name="Rods">The rods of one cell, the first at place 0.</param>
/// <param name="Parts">Parts of the period that places are counted in; 1 with one rod.</param>
/// <param name="ReachNm">Distance of each plane from the centers, in nm. A plane may cut the rods: the waves that leave a row hold up to its line
/// of centers.</param>
internal sealed record RodKind(double PeriodNm, ValueList<CellRod> Rods, int Parts, double ReachNm)
    : ElementKind(PeriodNm, 2 * ReachNm, IsCut: false)
{
    /// <summary>Half the height of the tallest rod, in nm.</summary>
    public double RadiusNm { get; } = Rods.Max(rod => rod.Outer.HalfHeightNm);

    /// <inheritdoc/>
    public override IGratingElement Create(SharedAnswers shared, LatticeSums sums)
        => new RodRow([.. Rods.Select(rod => rod.Create(shared))], Parts, 0, ReachNm, ReachNm, sums);
}

using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Modal;
using BarbuleOptics.Grating.Multipoles;
using BarbuleOptics.Layering;
using BarbuleOptics.Tests.Grating.Modal;

namespace BarbuleOptics.Tests.Grating;

/// <summary>A row with several round rods in a cell, in the words of a test; rods lie at multiples of the period divided by
/// <paramref name="Parts"/>, the rest is that of <paramref name="Light"/>.</summary>
internal sealed record TestCell(TestRow Light, int Parts, TestCell.Rod[] Rods)
{
    /// <summary>A rod: material 1 (rod) or 0 (matrix) or 2, the core of material 2 or 1.</summary>
    public sealed record Rod(int Place, double RadiusNm, double CoreRadiusNm = 0, int Material = 1, int CoreMaterial = 2);

    public double PlaceNm(Rod rod) => Light.XNm + rod.Place * Light.PeriodNm / Parts;

    public double TopNm => Light.TopNm ?? Rods.Max(rod => rod.RadiusNm);

    public double BottomNm => Light.BottomNm ?? Rods.Max(rod => rod.RadiusNm);

    public RodRow Element() => new(
        [.. Rods.Select(rod => new RowMember(
            new RodScatterer(rod.RadiusNm, rod.CoreRadiusNm, rod.Material, rod.CoreMaterial), rod.Place, rod.CoreRadiusNm > 0, rod.Material, rod.CoreMaterial))],
        Parts, Light.XNm, TopNm, BottomNm, new LatticeSums());

    public ScatteringBlock Scatter()
    {
        GratingWaves waves = Light.Waves();
        var block = new ScatteringBlock(waves.ChannelCount);
        if (!Element().TryScatter(waves, Light.Resolution, block))
            throw new InvalidOperationException("No finite solution.");
        return block;
    }

    /// <summary>The same between the same planes by the Fourier modal method.</summary>
    public ScatteringBlock ScatterModal(int harmonics, int depth)
    {
        PlacedOutline[] bodies = [.. Rods.Select(rod => new PlacedOutline(
            new CellBody(
                new Outline(OutlineShape.Ellipse, rod.RadiusNm, rod.RadiusNm),
                rod.CoreRadiusNm > 0 ? new Outline(OutlineShape.Ellipse, rod.CoreRadiusNm, rod.CoreRadiusNm) : null,
                rod.Material, rod.CoreRadiusNm > 0 ? rod.CoreMaterial : rod.Material, 0, 0),
            PlaceNm(rod), TopNm))];
        return ModalCase.Solve(new ModalSlab(bodies, TopNm + BottomNm, Light.PeriodNm), Light.Waves(), harmonics, depth);
    }
}

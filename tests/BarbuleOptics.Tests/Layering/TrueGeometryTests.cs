using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Layering;

/// <summary>Lengths measured in a slanted, dried or fossil section become those of the living barbule.</summary>
public sealed class TrueGeometryTests
{
    // Oblique section inflates a thickness by 1/cos: 20 degrees by 6.4 % (computed twice by independent methods; 1/cos 20 degrees = 1.064178 by hand).
    [Fact]
    public void An_oblique_section_is_put_upright()
    {
        Section section = Structures.Section("""
            [cortex]
            thickness = 106.4178
            [[layer]]
            form = "platelet"
            thickness = 63.85067
            width = 150
            spacing = 180
            rows = 2
            pitch = 127.70133
            gap = 21.283555
            [preparation]
            obliquity = 20
            """);
        Assert.Equal(100, section.CortexNm, 1e-4);
        Assert.Equal(60, 2 * section.Runs[0].Cell[0].Outer.HalfHeightNm, 1e-4);
        Assert.Equal(120, section.Runs[0].PitchNm, 1e-4);
        Assert.Equal(100 + 120 + 60 + 20, section.DepthNm, 1e-3);
        // Along the surface nothing changes.
        Assert.Equal((150, 180), (2 * section.Runs[0].Cell[0].Outer.HalfWidthNm, section.Runs[0].SpacingNm));
    }

    // By hand: K = 1.1, M = 1.05. Pitch 150 holds a rod of 120: 30 x 1.1 + 120 x 1.05 = 159; spacing 160: 40 x 1.1 + 126 = 170.
    [Fact]
    public void Keratin_and_melanin_are_scaled_each_by_its_own()
    {
        Section section = Structures.Section("""
            [cortex]
            thickness = 200
            [[layer]]
            form = "rod"
            diameter = 120
            lumen = 60
            spacing = 160
            rows = 3
            pitch = 150
            gap = 10
            [preparation]
            keratin_scale = 1.1
            melanin_scale = 1.05
            """);
        SectionRun run = section.Runs[0];
        Assert.Equal(220, section.CortexNm, 1e-9);
        Assert.Equal((126, 63), (Math.Round(2 * run.Cell[0].Outer.HalfWidthNm, 9), Math.Round(2 * run.Cell[0].Core!.Value.HalfWidthNm, 9)));
        Assert.Equal(159, run.PitchNm, 1e-9);
        Assert.Equal(170, run.SpacingNm, 1e-9);
        Assert.Equal(220 + 2 * 159 + 126 + 11, section.DepthNm, 1e-9);
    }

    // By hand: melanosomes 80/(1 - 0.2) = 100, cortex 90/(1 - 0.1) = 100, separation 9/0.9 = 10; rows 18/0.9 = 20 apart.
    [Fact]
    public void Shrinkage_of_a_fossil_is_undone()
    {
        Section section = Structures.Section("""
            [cortex]
            thickness = 90
            [[layer]]
            form = "rod"
            diameter = 80
            separation = 9
            rows = 2
            row_separation = 18
            [preservation]
            melanosome_shrinkage = { mean = 0.2, sd = 0.05 }
            cortex_shrinkage = { min = 0.05, max = 0.15 }
            """);
        Assert.Equal(100, section.CortexNm, 1e-9);
        Assert.Equal(100, 2 * section.Runs[0].Cell[0].Outer.HalfWidthNm, 1e-9);
        Assert.Equal(110, section.Runs[0].SpacingNm, 1e-9);
        Assert.Equal(120, section.Runs[0].PitchNm, 1e-6);
    }

    // The core of a flattened rod shares its fate, the wall of a platelet is melanin all round.
    [Fact]
    public void Cores_and_walls_are_scaled_with_their_bodies()
    {
        Section section = Structures.Section("""
            [[layer]]
            form = "flattened-rod"
            height = 80
            width = 160
            lumen_height = 40
            lumen_width = 100
            spacing = 200
            gap = 50
            [[layer]]
            form = "platelet"
            thickness = 60
            width = 150
            wall = 10
            spacing = 200
            [preparation]
            melanin_scale = 1.1
            """);
        Assert.Equal((88, 176, 44, 110), (
            Math.Round(2 * section.Runs[0].Cell[0].Outer.HalfHeightNm, 9), Math.Round(2 * section.Runs[0].Cell[0].Outer.HalfWidthNm, 9),
            Math.Round(2 * section.Runs[0].Cell[0].Core!.Value.HalfHeightNm, 9), Math.Round(2 * section.Runs[0].Cell[0].Core!.Value.HalfWidthNm, 9)));
        CellBody platelet = section.Runs[1].Cell[0];
        Assert.Equal(11, platelet.Outer.HalfHeightNm - platelet.Core!.Value.HalfHeightNm, 1e-9);
    }
}

using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>Five staggered rows of hollow platelets, 180 x 60 nm with a wall of 15 nm, spacing 220 nm, pitch 110 nm, below 150 nm of keratin; s and p.</summary>
internal sealed class Platelets()
    : SectionWorkload("section-platelet", Text, Polarizations.Unpolarized, accuracy: 1e-4, finest: 1e-6, isFinestReadable: false)
{
    private const string Text = """
        [cortex]
        thickness = 150
        [[layer]]
        form = "platelet"
        thickness = 60
        width = 180
        wall = 15
        spacing = 220
        rows = 5
        pitch = 110
        stacking = "staggered"
        """;
}

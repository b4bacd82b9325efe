using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>Five staggered rows of flattened hollow rods, 190 x 80 nm with a lumen of 120 x 40 nm, spacing 215 nm, pitch 170 nm, below 100 nm of keratin.</summary>
/// <param name="name">Name in the output.</param>
/// <param name="polarization">s or p.</param>
/// <param name="accuracy">Largest absolute error asked for.</param>
internal sealed class FlattenedHollow(string name, Polarizations polarization, double accuracy)
    : SectionWorkload(name, Text, polarization, accuracy, finest: 1e-6, isFinestReadable: false)
{
    private const string Text = """
        [cortex]
        thickness = 100
        [[layer]]
        form = "flattened-rod"
        height = 80
        width = 190
        lumen_height = 40
        lumen_width = 120
        spacing = 215
        rows = 5
        pitch = 170
        stacking = "staggered"
        """;
}

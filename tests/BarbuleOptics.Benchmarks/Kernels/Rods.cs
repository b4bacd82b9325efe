using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>Five staggered rows of rods, 120 nm, spacing 170 nm, pitch 147.22 nm, below 150 nm of keratin; s and p.</summary>
/// <param name="name">Name in the output.</param>
/// <param name="lumenNm">Diameter of the lumen, in nm; 0 for solid rods.</param>
/// <param name="accuracy">Largest absolute error asked for.</param>
internal sealed class Rods(string name, int lumenNm, double accuracy)
    : SectionWorkload(name, TextOf(lumenNm), Polarizations.Unpolarized, accuracy, finest: 1e-10, isFinestReadable: true)
{
    private static string TextOf(int lumenNm) => FormattableString.Invariant($"""
        [cortex]
        thickness = 150
        [[layer]]
        form = "rod"
        diameter = 120
        lumen = {lumenNm}
        spacing = 170
        rows = 5
        pitch = 147.22
        stacking = "staggered"
        gap = 0
        """);
}

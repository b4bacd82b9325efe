using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>The color of one reflectance spectrum to one eye. Immutable.</summary>
public sealed record BirdColor
{
    /// <summary>Adapted catch of a single cone below which logarithms of catches mean little: a hundredth of the background's, where noise that does not
    /// shrink with the light takes over (common practice, no source).</summary>
    public const double LeastCatch = 0.01;

    internal BirdColor(VisualSystem system, ReadOnlySpan<double> catches, ReceptorNoise noise)
    {
        System = system;
        ReadOnlySpan<double> singles = catches[..VisualSystem.SingleCount];
        Span<double> relative = stackalloc double[VisualSystem.SingleCount], background = stackalloc double[VisualSystem.SingleCount];
        TetrahedralColor.RelativeCatches(singles, relative);
        background.Fill(1);
        Catches = ValueList.Create(singles);
        RelativeCatches = ValueList.Create<double>(relative);
        Place = new TetrahedralColor(singles);
        Hue = BirdHue.Of(relative, system.ConeNames);
        ChromaticContrast = noise.Chromatic(singles, background);
        if (system.DoubleCone is null)
            return;
        DoubleCatch = catches[CatchMatrix.DoubleRow];
        AchromaticContrast = noise.Achromatic(catches[CatchMatrix.DoubleRow], 1);
    }

    /// <summary>The eye.</summary>
    public VisualSystem System { get; }

    /// <summary>Adapted catches of the single cones, from the shortest; the background has 1 in each.</summary>
    public ValueList<double> Catches { get; }

    /// <summary>Adapted catch of the double cones; null where the eye has none.</summary>
    public double? DoubleCatch { get; }

    /// <summary>Catches of the single cones as shares of their sum.</summary>
    public ValueList<double> RelativeCatches { get; }

    /// <summary>The place in the tetrahedral space.</summary>
    public TetrahedralColor Place { get; }

    /// <summary>The hue in a word.</summary>
    public BirdHue Hue { get; }

    /// <summary>Contrast of the color against the background by <see cref="ReceptorNoise"/>; null where a cone catches nothing.</summary>
    public double? ChromaticContrast { get; }

    /// <summary>Contrast of the brightness against the background; null where the double cones are missing or catch nothing.</summary>
    public double? AchromaticContrast { get; }

    /// <summary>Whether some single cone catches so little that contrasts, which rest on logarithms, mean little.</summary>
    public bool IsDark => Catches.Any(value => value < LeastCatch);
}

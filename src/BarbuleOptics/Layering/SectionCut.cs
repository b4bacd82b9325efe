namespace BarbuleOptics.Layering;

/// <summary>The section at one depth, over one period along the surface: what a mixing rule averages.</summary>
public sealed class SectionCut
{
    private readonly Lamella[] _lamellae;
    private readonly CutBody[] _bodies;
    private readonly double[] _fractions;

    /// <summary>A cut through placed bodies.</summary>
    /// <param name="periodNm">Length along the surface after which the cut repeats, in nm.</param>
    /// <param name="background">Number of the material between the bodies.</param>
    /// <param name="materialCount">Number of materials in the section.</param>
    /// <param name="lamellae">The stretches of the period in order; their shares add up to 1.</param>
    /// <param name="bodies">The bodies met.</param>
    internal SectionCut(double periodNm, int background, int materialCount, Lamella[] lamellae, CutBody[] bodies)
    {
        PeriodNm = periodNm;
        Background = background;
        _lamellae = lamellae;
        _bodies = bodies;
        _fractions = new double[materialCount];
        foreach (Lamella lamella in lamellae)
            _fractions[lamella.Material] += lamella.Share;
    }

    /// <summary>Length along the surface after which the cut repeats, in nm.</summary>
    public double PeriodNm { get; }

    /// <summary>Number of the material between the bodies: the matrix, or that of a film.</summary>
    public int Background { get; }

    /// <summary>Share of each material, by its number; they add up to 1.</summary>
    public ReadOnlySpan<double> Fractions => _fractions;

    /// <summary>The stretches in their order along the surface.</summary>
    public ReadOnlySpan<Lamella> Lamellae => _lamellae;

    /// <summary>The bodies met; what is left is background.</summary>
    public ReadOnlySpan<CutBody> Bodies => _bodies;
}

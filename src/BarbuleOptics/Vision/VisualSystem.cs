using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>The eye of a bird: four kinds of single cones for color, the double cones for brightness, what lies before them and how noisy they are.</summary>
public sealed record VisualSystem
{
    /// <summary>Shortest wavelength that is counted, in nm.</summary>
    public const int StartNm = 300;

    /// <summary>Longest wavelength that is counted, in nm.</summary>
    public const int StopNm = 700;

    /// <summary>Number of kinds of single cones.</summary>
    public const int SingleCount = 4;

    /// <summary>Pigments of the shortest cone up to this wavelength, in nm, are called ultraviolet, those above violet: between the two groups
    /// that are known, 355-376 and 402-426 nm.</summary>
    public const double LongestUltravioletNm = 389;

    /// <summary>Names of the single cones in files: by rank, whatever their pigments are.</summary>
    public static ValueList<string> Ranks { get; } = ["shortest", "short", "medium", "long"];

    /// <summary>The name in options and output.</summary>
    public required string Name { get; init; }

    /// <summary>The single cones, four of ascending pigment peak.</summary>
    /// <exception cref="ArgumentException">Not four, or their pigments do not ascend.</exception>
    public required ValueList<Cone> SingleCones
    {
        get;
        init => field = value.Count == SingleCount && value.Zip(value.Skip(1)).All(pair => pair.First.PigmentNm < pair.Second.PigmentNm)
            ? value : throw new ArgumentException("Must be four cones whose pigments ascend.", nameof(value));
    }

    /// <summary>The double cones (their principal member); null where they are left out.</summary>
    public Cone? DoubleCone { get; init; }

    /// <summary>Cornea, lens and vitreous body.</summary>
    public required OcularMedia Media { get; init; }

    /// <summary>Noise of the long cones as a share of their signal, above 0; that of the others follows from their numbers.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not a finite number above 0.</exception>
    public required double WeberFraction { get; init => field = Guard.Positive(value); }

    /// <summary>The same for the double cones, above 0.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not a finite number above 0.</exception>
    public required double DoubleWeberFraction { get; init => field = Guard.Positive(value); }

    /// <summary>Where the numbers were published.</summary>
    public required string Source { get; init; }

    /// <summary>How they were obtained, and which of them from memory.</summary>
    public required string Obtained { get; init; }

    /// <summary>"ultraviolet" or "violet".</summary>
    public string ShortestName => SingleCones[0].PigmentNm <= LongestUltravioletNm ? "ultraviolet" : "violet";

    /// <summary>What the single cones are called in words, from the shortest.</summary>
    public ValueList<string> ConeNames => [ShortestName, Ranks[1], Ranks[2], Ranks[3]];

    /// <summary>Noise of single cone <paramref name="cone"/>: the Weber fraction of the long cones times the root of their number over its own.</summary>
    /// <remarks>Vorobyev and Osorio 1998, Proc. R. Soc. B 265:351, 10.1098/rspb.1998.0302.</remarks>
    public double Noise(int cone) => WeberFraction * Math.Sqrt(SingleCones[^1].Abundance / SingleCones[cone].Abundance);
}

namespace BarbuleOptics.Ensembles;

/// <summary>How many draws are made, from which spread.</summary>
public sealed record DrawOptions
{
    /// <summary>Fewest draws: below, an interval of 95 % means nothing.</summary>
    public const int LeastDraws = 20;

    /// <summary>Most draws.</summary>
    public const int MostDraws = 10_000_000;

    /// <summary>Number of draws, 20 to 10 million; 1,000 unless set.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Outside its range.</exception>
    public int Draws
    {
        get;
        init => field = value is >= LeastDraws and <= MostDraws
            ? value : throw new ArgumentOutOfRangeException(nameof(value), value, FormattableString.Invariant($"Must lie between {LeastDraws} and {MostDraws}."));
    } = 1000;

    /// <summary>Which spread; that of the mean unless set.</summary>
    public Spread Spread { get; init; } = Spread.Mean;

    /// <summary>Names the random scramblings: the same seed gives the same draws; 1 unless set.</summary>
    public long Seed { get; init; } = 1;

    /// <summary>Whether hue terms are counted under every shipped set of melanin constants, too; true unless set.</summary>
    public bool ComparesMelanins { get; init; } = true;
}

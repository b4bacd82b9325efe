namespace BarbuleOptics.Ensembles;

/// <summary>What the spreads are called in options and output.</summary>
public static class SpreadNames
{
    /// <summary>All of them, the default first.</summary>
    public static IReadOnlyList<string> All { get; } = ["mean", "between", "within"];

    /// <summary>The name of a spread.</summary>
    public static string Of(Spread spread) => All[(int)spread];

    /// <summary>The spread of a name, in any case; false when there is none.</summary>
    public static bool TryParse(string? name, out Spread spread)
    {
        int place = All.ToList().FindIndex(known => string.Equals(known, name, StringComparison.OrdinalIgnoreCase));
        spread = (Spread)Math.Max(0, place);
        return place >= 0;
    }
}

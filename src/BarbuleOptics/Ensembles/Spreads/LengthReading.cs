namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>What a measured length says about a spread.</summary>
/// <param name="Law">How it is drawn; null where it is kept.</param>
/// <param name="Refusal">Why it cannot be drawn although it has a spread; null where nothing is wrong.</param>
/// <param name="Note">What a reader of the result should know; null for nothing.</param>
internal sealed record LengthReading(LengthLaw? Law, string? Refusal = null, string? Note = null)
{
    /// <summary>A length that is kept without a word.</summary>
    public static LengthReading Kept { get; } = new((LengthLaw?)null);
}

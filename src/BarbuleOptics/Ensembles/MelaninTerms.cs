using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles;

/// <summary>Hue terms under one set of melanin constants.</summary>
/// <param name="Material">The set.</param>
/// <param name="Draws">Number of draws.</param>
/// <param name="Terms">The terms met, most probable first.</param>
/// <param name="HueDegrees">Median of the CIELAB hue angle, in degrees; null without color.</param>
public sealed record MelaninTerms(string Material, int Draws, ValueList<TermShare> Terms, double? HueDegrees)
{
    /// <summary>How far two sets of shares are apart: half the sum of absolute differences, 0 for equal shares to 1 for no term in common.</summary>
    public static double Disagreement(IReadOnlyList<TermShare> one, IReadOnlyList<TermShare> other)
    {
        ArgumentNullException.ThrowIfNull(one);
        ArgumentNullException.ThrowIfNull(other);
        return one.Select(share => share.Term).Union(other.Select(share => share.Term))
            .Sum(term => Math.Abs(Of(one, term) - Of(other, term))) / 2;

        static double Of(IReadOnlyList<TermShare> shares, string term) => shares.FirstOrDefault(share => share.Term == term)?.Share ?? 0;
    }
}

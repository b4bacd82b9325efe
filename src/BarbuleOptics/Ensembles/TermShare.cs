namespace BarbuleOptics.Ensembles;

/// <summary>How probable a hue term is.</summary>
/// <param name="Term">The word, one of <see cref="Color.HueTerms"/>.</param>
/// <param name="Share">Share of the draws that have it, 0 to 1.</param>
/// <param name="Error">Standard error of the share from too few draws.</param>
public sealed record TermShare(string Term, double Share, double Error);

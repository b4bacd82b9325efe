using BarbuleOptics.Anatomy;

namespace BarbuleOptics.Layering;

/// <summary>A gap too small for what lies above and below it.</summary>
/// <param name="LayerNumber">The layer whose gap it is, counted from 1.</param>
/// <param name="What">What follows from it, in a few words.</param>
/// <param name="MissingNm">How much larger it has to be at the least, in nm.</param>
internal sealed record GapShortage(int LayerNumber, string What, double MissingNm)
{
    /// <summary>The same in the words of a refusal.</summary>
    public AnatomyProblem Problem => new(
        FormattableString.Invariant($"layer{LayerNumber}.gap"),
        FormattableString.Invariant($"found a gap too small, {What}; allowed at least {Math.Ceiling(MissingNm * 1000) / 1000:0.###} nm more"));
}

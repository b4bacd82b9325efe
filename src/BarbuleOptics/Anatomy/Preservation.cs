namespace BarbuleOptics.Anatomy;

/// <summary>What a fossil lost in size: linear shrinkage, true length = measured/(1 - shrinkage); null for nothing.</summary>
/// <param name="MelanosomeShrinkage">Of melanosomes, below 1 (negative where they swelled).</param>
/// <param name="CortexShrinkage">Of the cortex and of all keratin between melanosomes, below 1.</param>
public sealed record Preservation(MeasuredFactor? MelanosomeShrinkage, MeasuredFactor? CortexShrinkage);

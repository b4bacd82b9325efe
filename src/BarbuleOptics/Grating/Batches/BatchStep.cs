namespace BarbuleOptics.Grating.Batches;

/// <summary>One step of a <see cref="BatchPlan"/>, met on the way down.</summary>
/// <param name="Kind">What it is.</param>
/// <param name="Medium">Number of the medium of a layer, or of that above an interface.</param>
/// <param name="Below">Number of the medium below an interface.</param>
/// <param name="Number">Number of the element's kind, or of the layer among the different ones.</param>
internal readonly record struct BatchStep(BatchStepKind Kind, int Medium, int Below, int Number);

namespace BarbuleOptics.Anatomy;

/// <summary>Why a structure cannot exist.</summary>
/// <param name="Key">The measurement at fault, named as on the command line: <c>layer2.spacing</c>, <c>layer1.body3.x</c>, <c>cortex.thickness</c>.</param>
/// <param name="Message">What was found and what is allowed, in one line without the key.</param>
public sealed record AnatomyProblem(string Key, string Message);

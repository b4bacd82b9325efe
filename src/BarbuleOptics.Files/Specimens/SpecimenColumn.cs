namespace BarbuleOptics.Files.Specimens;

/// <summary>One column of a table of specimens.</summary>
/// <param name="Index">Its place, from 0.</param>
/// <param name="Path">Where its value stands in a structure file: <c>cortex.thickness</c>, <c>layer1.diameter</c>.</param>
/// <param name="Part">The part of a length, a key of its table in a structure file: <c>mean</c>, <c>sd</c>, <c>sd_between</c>, <c>n</c>, <c>min</c> or <c>max</c>.</param>
/// <param name="Kind">What its cells hold.</param>
/// <param name="PowerOfTen">Power of ten that brings its numbers to nm: 3 for micrometers.</param>
internal sealed record SpecimenColumn(int Index, string Path, string Part, CellKind Kind, int PowerOfTen);

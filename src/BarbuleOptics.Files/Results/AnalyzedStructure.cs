using BarbuleOptics.Anatomy;
using BarbuleOptics.Ensembles;

namespace BarbuleOptics.Files.Results;

/// <summary>A sensitivity analysis and the file it came from.</summary>
/// <param name="File">The structure file as the user named it.</param>
/// <param name="Sha256">SHA-256 of its bytes, lower-case hexadecimal.</param>
/// <param name="Barbule">The structure.</param>
/// <param name="Result">The analysis.</param>
/// <param name="Changes">The values replaced on the command line, as typed.</param>
public sealed record AnalyzedStructure(string File, string Sha256, Barbule Barbule, SensitivityResult Result, IReadOnlyList<string> Changes);

using BarbuleOptics.Ensembles;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Files.Results;

/// <summary>A prediction and the file it came from.</summary>
/// <param name="File">The structure file as the user named it.</param>
/// <param name="Sha256">SHA-256 of its bytes, lower-case hexadecimal.</param>
/// <param name="Prediction">The prediction.</param>
/// <param name="Changes">The values replaced on the command line, as typed.</param>
public sealed record PredictedStructure(string File, string Sha256, StructurePrediction Prediction, IReadOnlyList<string> Changes)
{
    /// <summary>Draws of the same structure; null where none were asked for.</summary>
    public EnsemblePrediction? Draws { get; init; }

    /// <summary>What it may show over all that is not known; null where everything is.</summary>
    public UnknownReach? Unknowns { get; init; }
}

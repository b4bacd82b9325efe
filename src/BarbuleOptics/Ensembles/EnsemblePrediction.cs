using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles;

/// <summary>What the spread of the measurements does to what is seen.</summary>
public sealed record EnsemblePrediction
{
    /// <summary>What was asked for.</summary>
    public required DrawOptions Options { get; init; }

    /// <summary>Name of the solver, one of <see cref="SolverNames"/>.</summary>
    public required string Solver { get; init; }

    /// <summary>Number of independent scramblings that the errors come from.</summary>
    public required int Replicates { get; init; }

    /// <summary>Degrees of freedom of Student's t that lengths were drawn from; null for normal laws.</summary>
    public required double? EffectiveDegrees { get; init; }

    /// <summary>Draws that could be solved.</summary>
    public required long Solved { get; init; }

    /// <summary>Largest error estimate of the solver among them.</summary>
    public required double ErrorEstimate { get; init; }

    /// <summary>The lengths that were drawn.</summary>
    public required ValueList<DrawnLength> Lengths { get; init; }

    /// <summary>One view an angle.</summary>
    public required ValueList<DrawnView> Views { get; init; }

    /// <summary>What the result leans on.</summary>
    public required ValueList<PredictionWarning> Warnings { get; init; }
}

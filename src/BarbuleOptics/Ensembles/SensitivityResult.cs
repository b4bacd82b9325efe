using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles;

/// <summary>Which measurement decides the color.</summary>
public sealed record SensitivityResult
{
    /// <summary>What was asked for; the number of draws is that of all.</summary>
    public required DrawOptions Options { get; init; }

    /// <summary>Name of the solver, one of <see cref="SolverNames"/>.</summary>
    public required string Solver { get; init; }

    /// <summary>Base points, each with as many draws as there are measurements and two more.</summary>
    public required int Points { get; init; }

    /// <summary>Number of independent scramblings that the errors come from.</summary>
    public required int Replicates { get; init; }

    /// <summary>The lengths that were drawn.</summary>
    public required ValueList<DrawnLength> Lengths { get; init; }

    /// <summary>One view an angle.</summary>
    public required ValueList<SensitivityView> Views { get; init; }

    /// <summary>What the result leans on.</summary>
    public required ValueList<PredictionWarning> Warnings { get; init; }
}

namespace BarbuleOptics.Prediction;

/// <summary>Which solver is asked for.</summary>
public enum SolverChoice
{
    /// <summary>The multilayer solver where it is exact (films, solid platelets that touch side by side) or a mixing rule is named, the
    /// grating solver for everything else.</summary>
    Auto,

    /// <summary>The multilayer solver: rows are averaged into films by the rule named, or by the default one.</summary>
    Multilayer,

    /// <summary>The grating solver, whatever the section is; no rule can be named beside it.</summary>
    Grating,
}

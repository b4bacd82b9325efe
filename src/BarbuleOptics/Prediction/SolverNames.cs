using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>How solvers are written on the command line and in files.</summary>
public static class SolverNames
{
    /// <summary>The solver of films.</summary>
    public const string Multilayer = "multilayer";

    /// <summary>The rigorous solvers of rows.</summary>
    public const string Grating = "grating";

    /// <summary>All names that can be asked for.</summary>
    public static ValueList<string> All { get; } = ["auto", Multilayer, Grating];

    /// <summary>The choice of a name; false when there is none.</summary>
    public static bool TryFind(string? name, out SolverChoice choice)
    {
        (bool found, choice) = name switch
        {
            "auto" => (true, SolverChoice.Auto),
            Multilayer => (true, SolverChoice.Multilayer),
            Grating => (true, SolverChoice.Grating),
            _ => (false, SolverChoice.Auto),
        };
        return found;
    }
}

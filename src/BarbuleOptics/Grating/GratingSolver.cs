using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating;

/// <summary>Solves a section as it is: infinite, flat and perfectly periodic, with every order of diffraction.</summary>
public sealed class GratingSolver : ISpectralSolver<SectionPermittivities, GratingWorkspace>
{
    /// <summary>A solver that refines until its estimate of the largest error of R, T, A and diffracted R is <paramref name="accuracy"/> or less.</summary>
    /// <param name="accuracy">Largest absolute error asked for; above 0.</param>
    public GratingSolver(double accuracy) => Accuracy = Guard.Positive(accuracy);

    /// <summary>Largest absolute error asked for.</summary>
    public double Accuracy { get; }

    /// <inheritdoc/>
    public GratingWorkspace CreateWorkspace(SectionPermittivities structure)
    {
        ArgumentNullException.ThrowIfNull(structure);
        return new GratingWorkspace(structure.Section);
    }

    /// <inheritdoc/>
    public double Solve(SectionPermittivities structure, in SolverRequest request, GratingWorkspace workspace, in SolverResponse response)
    {
        ArgumentNullException.ThrowIfNull(structure);
        ArgumentNullException.ThrowIfNull(workspace);
        throw new NotSupportedException($"No section is solved at {Accuracy} yet.");
    }
}

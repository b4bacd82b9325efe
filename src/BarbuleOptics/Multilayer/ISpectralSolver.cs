namespace BarbuleOptics.Multilayer;

/// <summary>The seam between solvers: every method, readable or fast, film or grating, answers this one call.</summary>
/// <typeparam name="TStructure">What is solved: the films, or the section as it is.</typeparam>
/// <typeparam name="TWorkspace">Scratch memory, made once a thread and reused, so that a call allocates nothing.</typeparam>
public interface ISpectralSolver<TStructure, TWorkspace>
{
    /// <summary>A workspace large enough for <paramref name="structure"/>; not to be shared between threads.</summary>
    TWorkspace CreateWorkspace(TStructure structure);

    /// <summary>Fills the spans of <paramref name="response"/>.</summary>
    /// <returns>An estimate of the largest absolute error in any of the outputs; it counts the solution of the structure as
    /// given, not how well the structure stands for the barbule.</returns>
    double Solve(TStructure structure, in SolverRequest request, TWorkspace workspace, in SolverResponse response);
}

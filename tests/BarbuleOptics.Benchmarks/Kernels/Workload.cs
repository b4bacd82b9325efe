using BarbuleOptics.Lanes;
using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>One thing that is timed as a whole; a class each.</summary>
internal abstract class Workload
{
    /// <summary>All of them, in the order they are printed.</summary>
    public static IReadOnlyList<Workload> All { get; } = 
    [
        new FilmsAngles(), new FilmsEnsemble(), new FilmsGraded(), new Rods("rods-solid", 0, 1e-6), new Rods("rods-hollow", 70, 1e-6), new Rods("rods-1e-4", 70, 1e-4),
        new Platelets(), new FlattenedHollow("section-flattened-hollow", Polarizations.P, 1e-3), new FlattenedHollow("section-flattened-hollow-s", Polarizations.S, 1e-4),
    ];

    /// <summary>Name in the output.</summary>
    public abstract string Name { get; }

    /// <summary>Points or solves that one pass computes.</summary>
    public abstract long CountOfPass { get; }

    /// <summary>Whether points are counted (film x wavelength x angle), or solves (wavelength x polarization).</summary>
    public abstract bool CountsPoints { get; }

    /// <summary>Floating-point operations that a point takes, for the share of the processor's peak; null where they were not counted.</summary>
    public virtual double? OperationsOfPoint => null;

    /// <summary>Whether a vector width can be forced upon it.</summary>
    public virtual bool TakesWidth => true;

    /// <summary>A pass with memory of its own, so that several threads can run one each.</summary>
    /// <param name="width">Vector width, where it takes one.</param>
    public abstract Action CreatePass(LaneWidth width);

    /// <summary>Largest error of its answers, against a slower method that is known to be better.</summary>
    public abstract double LargestError(LaneWidth width);
}

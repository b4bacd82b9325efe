using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Batches;

/// <summary>Makes solvers for blocks of wavelengths.</summary>
internal static class BatchSolvers
{
    /// <summary>A solver, or null where the scalar code has to solve the section.</summary>
    /// <param name="section">The section.</param>
    /// <param name="width">Width of the vectors.</param>
    public static IBatchSolver? TryCreate(Section section, LaneWidth width)
        => PlanOf(section) is BatchPlan plan ? width.Invoke<Maker, IBatchSolver>(new Maker(plan)) : null;

    /// <summary>Whether blocks of the section's wavelengths are solved together, straight across its rods at least.</summary>
    public static bool Covers(Section section) => section.IsAcross && PlanOf(section) is not null;

    // Flattened rods as rows where multipoles are for them.
    private static BatchPlan? PlanOf(Section section)
        => BatchPlan.TryOf(StackPlan.Of(section)) ?? BatchPlan.TryOf(StackPlan.Of(section, RowMethods.AllRods));

    /// <summary>Makes a solver with vectors of one width.</summary>
    private readonly struct Maker(BatchPlan plan) : ILaneAction<IBatchSolver>
    {
        /// <inheritdoc/>
        public IBatchSolver Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
            => new BatchSolver<TLanes>(plan);
    }
}

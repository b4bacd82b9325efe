namespace BarbuleOptics.Grating.Joining;

/// <summary>The resolutions that refinement climbs through, for one plan.</summary>
/// <remarks>
/// Rows of rods: multipoles of degree L pass between rows whose centers lie D apart in depth mainly by orders n near L P/(pi D), where
/// k^(2 L) exp(-k D) with k = 2 pi n/P is largest; orders are kept to a little beyond.
/// Degrees rise by two at least: where rows touch and light falls straight, even and odd ones matter in turn, and a step of one may change nothing.
/// Slabs: what the orders left out would carry, exp(-2 k g) over a gap g and back, stays below what the harmonics leave, about 1/N^2.
/// </remarks>
internal sealed class ResolutionLadder(StackPlan plan)
{
    private static readonly int[] Multipoles = [1, 3, 5, 7, 9, 11, 13, 16, 19, 22, 26, 30];
    private static readonly int[] Harmonics = [1, 2, 3, 5, 7, 10, 14, 20, 28, 40, 56, 80];

    /// <summary>Finest mesh in depth.</summary>
    public const int MostDepth = 4;

    /// <summary>The step whose harmonics are enough to judge the mesh in depth by.</summary>
    public const int DepthStep = 3;

    /// <summary>Number of steps.</summary>
    public int Count { get; } = StepsOf(plan);

    /// <summary>Whether there are slabs, whose errors fall only like a power of the harmonics and which have a mesh in depth.</summary>
    public bool HasSlabs { get; } = plan.Groups.Any(group => group.HasSlabs);

    /// <summary>One step.</summary>
    /// <param name="step">From 0.</param>
    /// <param name="leastOrders">Largest order that travels in any medium, counted by <paramref name="periodNm"/>.</param>
    /// <param name="periodNm">The period of all rows; null when each group keeps its own.</param>
    /// <param name="depth">The mesh in depth.</param>
    public Resolution At(int step, int leastOrders, double? periodNm, int depth = 0)
    {
        int orders = plan.Kinds.Length == 0 ? 0 : Math.Max(1, leastOrders);
        int more = 0;
        foreach (PlanGroup group in plan.Groups)
        {
            if (group.PeriodNm <= 0)
                continue;
            int cells = periodNm is double period ? (int)Math.Round(period / group.PeriodNm) : 1;
            orders = Math.Max(orders, cells * OrdersOf(group, step, Harmonics[step] + leastOrders / cells) + cells / 2);
            // Added, not a floor: steps of equal resolution would agree and be believed.
            more = Math.Max(more, leastOrders / cells);
        }
        return new Resolution(orders, Multipoles[step], Harmonics[step] + more, depth);
    }

    // Rows closer in depth than their radii add up to: plane waves of the multipoles L grow like (sum of radii / distance)^(2 L) before they
    // add up to what is finite, and cost as many digits.
    private static int StepsOf(StackPlan plan)
    {
        const double mostGrowth = 1e6;
        double overlap = plan.Groups.Max(group => group.Overlap);
        int steps = plan.Groups.Any(group => group.HasSlabs) ? 9 : Multipoles.Length;
        while (steps > 4 && 2 * Multipoles[steps - 1] * Math.Log(overlap) > Math.Log(mostGrowth))
            steps--;
        return steps;
    }

    private static int OrdersOf(in PlanGroup group, int step, int harmonics)
    {
        // Steps whose orders stood still would not show what the orders leave out.
        int orders = 1 + (step + 1) / 2;
        if (group.HasRods)
            orders = Math.Max(orders, (int)Math.Ceiling(1.3 * Multipoles[step] * group.PeriodNm / (Math.PI * group.NearestNm)));
        if (group.HasCuts)
            return Math.Max(orders, harmonics);
        if (group.HasSlabs)
        {
            double needed = group.PeriodNm * Math.Log(30.0 * harmonics * harmonics) / (4 * Math.PI * Math.Max(group.ClearNm, 1e-3 * group.PeriodNm));
            orders = Math.Max(orders, (int)Math.Min(harmonics, Math.Ceiling(needed)));
        }
        return orders;
    }
}

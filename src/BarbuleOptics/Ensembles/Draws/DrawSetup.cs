using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Color;
using BarbuleOptics.Ensembles.Spreads;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Ensembles.Draws;

/// <summary>What draws of one structure need before the first: the solver made for its mean geometry, and how peak and color move with each length there.</summary>
internal sealed class DrawSetup
{
    /// <summary>Lengths whose effect is looked at one by one, at most.</summary>
    private const int MostProbed = 400;

    private readonly PredictionConditions _conditions;

    private DrawSetup(DrawPlan plan, DrawSolver solver, OutcomeReader reader, PeakFollower[] followers, PredictionConditions conditions)
        => (Plan, Solver, Reader, Followers, _conditions) = (plan, solver, reader, followers, conditions);

    public DrawPlan Plan { get; private set; }

    public DrawSolver Solver { get; }

    public OutcomeReader Reader { get; }

    public PeakFollower[] Followers { get; private set; }

    /// <summary>Solves the mean geometry and its neighbors; false, with a problem, where the mean geometry has no solution.</summary>
    /// <param name="plan">How draws are made.</param>
    /// <param name="conditions">How the structure is looked at.</param>
    /// <param name="catalog">Where its materials are.</param>
    /// <param name="shares">Whether lengths share the factor of Student's t, see <see cref="DrawPlan.Weighted"/>.</param>
    /// <param name="setup">All that draws need.</param>
    /// <param name="problems">What forbids them.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static bool TryMake(
        DrawPlan plan, PredictionConditions conditions, IMaterialCatalog catalog, bool shares, [NotNullWhen(true)] out DrawSetup? setup, out IReadOnlyList<AnatomyProblem> problems,
        CancellationToken cancellation)
    {
        problems = [];
        setup = null;
        try
        {
            setup = Of(plan, conditions, catalog, shares, cancellation);
        }
        catch (ArithmeticException unsolved)
        {
            problems = [new AnatomyProblem(plan.Slots.Length > 0 ? plan.Slots[0].Key : "barbule.matrix", $"{unsolved.Message.TrimEnd('.')}; ask for the layer model with --solver multilayer")];
        }
        return setup is not null;
    }

    private static DrawSetup Of(DrawPlan plan, PredictionConditions conditions, IMaterialCatalog catalog, bool shares, CancellationToken cancellation)
    {
        DrawSetup setup = Unprobed(plan, conditions, catalog, cancellation);
        double[] lengthsNm = new double[plan.Slots.Length], reflectances = new double[conditions.Incidences.Count * conditions.Wavelengths.Count];
        int[] rows = new int[plan.Barbule.Layers.Count];
        plan.Center(lengthsNm, rows);
        setup.Solver.Solve(new SectionDrawer(plan.Barbule, plan.Slots, plan.SeparateRows).Draw(lengthsNm, rows), reflectances);
        var peaks = new PeakScan(conditions.Wavelengths);
        for (int angle = 0; angle < setup.Followers.Length; angle++)
        {
            peaks.Scan(Part(reflectances, angle, conditions));
            setup.Followers[angle] = PeakFollower.Of(peaks, lengthsNm);
        }
        setup.Probe(lengthsNm, rows, shares, cancellation);
        return setup;
    }

    /// <summary>Without a solution of the mean geometry: the highest peak of each draw is taken.</summary>
    public static DrawSetup Unprobed(DrawPlan plan, PredictionConditions conditions, IMaterialCatalog catalog, CancellationToken cancellation)
    {
        double[] lengthsNm = new double[plan.Slots.Length];
        int[] rows = new int[plan.Barbule.Layers.Count];
        plan.Center(lengthsNm, rows);
        Section mean = new SectionDrawer(plan.Barbule, plan.Slots, plan.SeparateRows).Draw(lengthsNm, rows);
        var solver = new DrawSolver(mean, conditions, catalog, cancellation);
        return new DrawSetup(plan, solver, new OutcomeReader(conditions), [.. Enumerable.Repeat(PeakFollower.Highest, conditions.Incidences.Count)], conditions);
    }

    private static ReadOnlySpan<double> Part(double[] reflectances, int angle, PredictionConditions conditions)
        => reflectances.AsSpan(angle * conditions.Wavelengths.Count, conditions.Wavelengths.Count);

    /// <summary>One standard deviation to each side of every length that is drawn.</summary>
    private void Probe(double[] centersNm, int[] rows, bool shares, CancellationToken cancellation)
    {
        int[] probed = [.. Plan.Drawn.Take(MostProbed)];
        double[][] changes = [.. Plan.Slots.Select(_ => new double[1])], slopes = [.. Followers.Select(_ => new double[Plan.Slots.Length])];
        var options = new ParallelOptions { MaxDegreeOfParallelism = _conditions.Threads, CancellationToken = cancellation };
        Parallel.For(0, probed.Length, options, i => changes[probed[i]] = ProbeOne(probed[i], centersNm, rows, slopes));
        int width = changes.Max(change => change.Length);
        Plan = Plan.Weighted(Array.ConvertAll(changes, change => change.Length == width ? change : new double[width]), shares);
        Followers = [.. Followers.Select((follower, angle) => follower.With(slopes[angle]))];
    }

    // A change of the color, or of the spectrum where there is none, over one standard deviation; slopes of the peaks on the way.
    private double[] ProbeOne(int slot, double[] centersNm, int[] rows, double[][] slopes)
    {
        (double highNm, double[] high) = Solved(slot, centersNm, rows, 1);
        (double lowNm, double[] low) = Solved(slot, centersNm, rows, -1);
        if (!(highNm > lowNm))
            return new double[1];
        double deviations = (highNm - lowNm) / Plan.Slots[slot].Law!.DeviationNm;
        var peaks = new PeakScan(_conditions.Wavelengths);
        for (int angle = 0; angle < Followers.Length; angle++)
        {
            double from = PeakIn(low, angle, peaks), to = PeakIn(high, angle, peaks);
            if (!double.IsNaN(from + to))
                slopes[angle][slot] = (to - from) / (highNm - lowNm);
        }
        ReadOnlySpan<double> first = Part(high, 0, _conditions), second = Part(low, 0, _conditions);
        if (!Reader.HasColor)
            return [.. first.ToArray().Zip(second.ToArray(), (one, other) => (one - other) / deviations)];
        CieLab to1 = Reader.Colorimeter.MeasureLab(first), from1 = Reader.Colorimeter.MeasureLab(second);
        return [(to1.L - from1.L) / deviations, (to1.A - from1.A) / deviations, (to1.B - from1.B) / deviations];
    }

    private (double LengthNm, double[] Reflectances) Solved(int slot, double[] centersNm, int[] rows, int side)
    {
        double[] lengthsNm = [.. centersNm], reflectances = new double[_conditions.Incidences.Count * _conditions.Wavelengths.Count];
        lengthsNm[slot] += side * Plan.Slots[slot].Law!.DeviationNm;
        Section section = new SectionDrawer(Plan.Barbule, Plan.Slots, Plan.SeparateRows).Draw(lengthsNm, rows);
        try
        {
            Solver.Solve(section, reflectances);
        }
        catch (ArithmeticException)
        {
            // A neighbor without a solution tells nothing; the mean geometry has one.
            return (centersNm[slot], reflectances);
        }
        return (lengthsNm[slot], reflectances);
    }

    private double PeakIn(double[] reflectances, int angle, PeakScan peaks)
    {
        peaks.Scan(Part(reflectances, angle, _conditions));
        int found = Followers[angle].HasPeak ? peaks.Nearest(Followers[angle].PeakNm, double.PositiveInfinity) : -1;
        return found < 0 ? double.NaN : peaks.WavelengthNm(found);
    }
}

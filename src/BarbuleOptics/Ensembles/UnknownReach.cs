using BarbuleOptics.Anatomy;
using BarbuleOptics.Ensembles.Draws;
using BarbuleOptics.Ensembles.Sequences;
using BarbuleOptics.Ensembles.Spreads;
using BarbuleOptics.Materials;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles;

/// <summary>What a structure may show whose lengths, factors or - in a fossil - rows are known only between bounds: hue against each, and every hue term within reach.</summary>
/// <param name="Views">One an angle.</param>
/// <param name="Points">Number of combinations tried for the terms within reach.</param>
public sealed record UnknownReach(ValueList<UnknownView> Views, int Points)
{
    /// <summary>Values tried of each thing not known.</summary>
    private const int SweepPoints = 21;

    private const int Combinations = 256;

    /// <summary>Coarsest step, in nm, that spectra are solved at: enough for colors.</summary>
    private const double StepNm = 5;

    private const double Edge = 1e-9;

    /// <summary>Tries them.</summary>
    /// <param name="barbule">The structure, one that <see cref="Predictor"/> takes under the same conditions.</param>
    /// <param name="conditions">How it is looked at; wavelengths are taken in steps of 5 nm where they are finer.</param>
    /// <param name="catalog">Where its materials are.</param>
    /// <param name="cancellation">Ends the work early.</param>
    /// <returns>Null where everything is known.</returns>
    public static UnknownReach? Of(Barbule barbule, PredictionConditions conditions, IMaterialCatalog catalog, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        ArgumentNullException.ThrowIfNull(conditions);
        if (PlanOf(barbule) is not DrawPlan plan)
            return null;
        PredictionConditions coarse = conditions with { Wavelengths = Coarse(conditions.Wavelengths) };
        DrawSetup setup = DrawSetup.Unprobed(plan, coarse, catalog, cancellation);
        double[][] points = [.. SweepCoordinates(plan), .. plan.Dimensions < 2 ? [] : CombinedCoordinates(plan)];
        DrawRound round = Solved(setup, coarse, points, cancellation);
        return new UnknownReach([.. coarse.Incidences.Select((incidence, angle) => ViewOf(incidence, angle, plan, round, points))], plan.Dimensions < 2 ? 0 : Combinations);
    }

    private static DrawPlan? PlanOf(Barbule barbule)
    {
        DrawSlot[] slots = [.. StructureSlots.Of(barbule, separateRows: false).Select(slot => slot with { Law = Unknown(slot) })];
        // In a living barbule a list of counts is what was seen; of a fossil it is what the rock leaves open.
        int[] counted = barbule.Preservation is null ? [] : [.. Enumerable.Range(0, barbule.Layers.Count).Where(layer => barbule.Layers[layer].Rows.Counts.Distinct().Count() > 1)];
        return counted.Length == 0 && slots.All(slot => slot.Law is null) ? null : new DrawPlan(barbule, Spread.Mean, slots, [], counted);
    }

    private static LengthLaw.Uniform? Unknown(DrawSlot slot) => (slot.Length, slot.Factor) switch
    {
        (_, MeasuredFactor.Interval factor) when factor.Most > factor.Least => new LengthLaw.Uniform(factor.Least, factor.Most),
        (MeasuredLength.Interval length, null) when length.MostNm > length.LeastNm => new LengthLaw.Uniform(length.LeastNm, length.MostNm),
        _ => null,
    };

    private static WavelengthGrid Coarse(WavelengthGrid grid) => grid.StepNm >= StepNm || grid.StopNm - grid.StartNm < StepNm ? grid
        : WavelengthGrid.FromRange(Length.FromNanometres(grid.StartNm), Length.FromNanometres(grid.StopNm), Length.FromNanometres(StepNm));

    /// <summary>One dimension after another from end to end, the others at their middle.</summary>
    private static IEnumerable<double[]> SweepCoordinates(DrawPlan plan)
    {
        double[] middle = [.. Enumerable.Range(0, plan.Dimensions).Select(dimension => dimension < plan.Counted.Count ? CentralCount(plan, dimension) : 0.5)];
        for (int dimension = 0; dimension < plan.Dimensions; dimension++)
        {
            int values = ValueCount(plan, dimension);
            for (int value = 0; value < values; value++)
            {
                double[] point = [.. middle];
                point[dimension] = dimension < plan.Counted.Count ? CoordinateOfCount(plan, dimension, value) : Math.Clamp((double)value / (values - 1), Edge, 1 - Edge);
                yield return point;
            }
        }
    }

    private static IEnumerable<double[]> CombinedCoordinates(DrawPlan plan)
    {
        var net = new ScrambledNet(plan.Dimensions, Combinations, 1);
        for (int number = 0; number < Combinations; number++)
        {
            var point = new double[plan.Dimensions];
            net.Point(number, point);
            yield return point;
        }
    }

    private static int[] CountsOf(DrawPlan plan, int dimension) => [.. plan.Barbule.Layers[plan.Counted[dimension]].Rows.Counts.Distinct().Order()];

    private static int ValueCount(DrawPlan plan, int dimension) => dimension < plan.Counted.Count ? CountsOf(plan, dimension).Length : SweepPoints;

    private static double CoordinateOfCount(DrawPlan plan, int dimension, int value)
    {
        ValueList<int> counts = plan.Barbule.Layers[plan.Counted[dimension]].Rows.Counts;
        return (counts.ToList().IndexOf(CountsOf(plan, dimension)[value]) + 0.5) / counts.Count;
    }

    private static double CentralCount(DrawPlan plan, int dimension)
    {
        int central = plan.Barbule.Layers[plan.Counted[dimension]].Rows.Central;
        int[] counts = CountsOf(plan, dimension);
        return CoordinateOfCount(plan, dimension, Array.IndexOf(counts, counts.MinBy(count => Math.Abs(count - central))));
    }

    private static DrawRound Solved(DrawSetup setup, PredictionConditions conditions, double[][] points, CancellationToken cancellation)
    {
        var round = new DrawRound(points.Length, conditions.Incidences.Count, conditions.Wavelengths.Count, setup.Reader.Outcomes.Count, setup.Plan.Slots.Length);
        var options = new ParallelOptions { MaxDegreeOfParallelism = conditions.Threads, CancellationToken = cancellation };
        Parallel.For(0, points.Length, options, () => new DrawWorker(setup.Plan, setup.Solver, setup.Reader, setup.Followers, conditions.Wavelengths), (point, _, worker) =>
        {
            worker.Draw(points[point], round, point);
            return worker;
        }, _ => { });
        return round;
    }

    private static UnknownView ViewOf(Angle incidence, int angle, DrawPlan plan, DrawRound round, double[][] points)
    {
        var sweeps = new List<UnknownSweep>();
        int place = 0;
        for (int dimension = 0; dimension < plan.Dimensions; dimension++)
        {
            int first = place;
            place += ValueCount(plan, dimension);
            sweeps.Add(SweepOf(plan, dimension, Enumerable.Range(first, place - first).Select(point => (points[point][dimension], point)), round, angle));
        }
        int[] all = [.. Enumerable.Range(0, points.Length).Where(point => round.Marks(point, angle).Term >= 0)];
        IEnumerable<TermShare> terms = all.GroupBy(point => round.Marks(point, angle).Term)
            .Select(group => new TermShare(HueTermList.Terms[group.Key], (double)group.Count() / all.Length, 0)).OrderByDescending(term => term.Share);
        return new UnknownView(incidence, [.. sweeps], [.. terms]);
    }

    private static UnknownSweep SweepOf(DrawPlan plan, int dimension, IEnumerable<(double Coordinate, int Place)> points, DrawRound round, int angle)
    {
        if (dimension < plan.Counted.Count)
        {
            int[] counts = CountsOf(plan, dimension);
            return new UnknownSweep(FormattableString.Invariant($"layer{plan.Counted[dimension] + 1}.rows"), "rows", [.. points.Select((point, i) => PointOf(counts[i], point.Place, round, angle))]);
        }
        DrawSlot slot = plan.Slots[plan.Drawn[dimension - plan.Counted.Count]];
        var law = (LengthLaw.Uniform)slot.Law!;
        return new UnknownSweep(slot.Key, slot.Unit, [.. points.Select((point, i) => PointOf(law.LeastNm + (law.MostNm - law.LeastNm) * i / (SweepPoints - 1), point.Place, round, angle))]);
    }

    private static UnknownPoint PointOf(double value, int place, DrawRound round, int angle)
    {
        int term = round.Marks(place, angle).Term;
        return new UnknownPoint(
            value, Known(round.OutcomeAt(place, angle, OutcomeReader.Peak)), Known(round.OutcomeAt(place, angle, OutcomeReader.Hue)), Known(round.OutcomeAt(place, angle, OutcomeReader.Chroma)),
            term < 0 ? null : HueTermList.Terms[term]);
    }

    private static double? Known(double value) => double.IsNaN(value) ? null : value;
}

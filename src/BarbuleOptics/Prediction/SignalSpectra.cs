using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra.Instruments;

namespace BarbuleOptics.Prediction;

/// <summary>Reflectance of a section at the directions that an instrument's signal is made of, each solved once.</summary>
/// <remarks>Where rows are averaged into films, which know only rods across or along, the reflectance at an azimuth b between is
/// cos^2 b times the one plus sin^2 b times the other: right at normal incidence. For light of one polarization the azimuth is left at the
/// structure's own, as if every facet saw the light in the arms' plane.</remarks>
internal sealed class SignalSpectra(
    Section section, SolverPlan plan, PredictionConditions conditions, IMaterialCatalog catalog, CancellationToken cancellation)
{
    private static readonly Dictionary<int, double[]> NoOrders = [];

    private readonly Dictionary<(double Sine, double Across), DirectionSpectra> _known = [];

    /// <summary>The largest error estimate of all that was solved.</summary>
    public double ErrorEstimate { get; private set; }

    /// <summary>Number of directions solved.</summary>
    public int Count => _known.Count;

    /// <summary>Whether the signal is of both polarizations together.</summary>
    public bool IsUnpolarized => conditions.Polarization == Polarizations.Unpolarized;

    /// <summary>Solves what is not known yet.</summary>
    public void Prepare(IEnumerable<GridDirection> directions)
    {
        IEnumerable<IGrouping<double, double>> missing = directions.Select(Key).Where(key => !_known.ContainsKey(key)).Distinct().GroupBy(key => key.Across, key => key.Sine);
        foreach (IGrouping<double, double> azimuth in missing)
        {
            double[] sines = [.. azimuth];
            DirectionSpectra[] spectra = SolveAt(azimuth.Key, [.. sines.Select(AngleOf)]);
            for (int i = 0; i < sines.Length; i++)
                _known.Add((sines[i], azimuth.Key), spectra[i]);
        }
    }

    /// <summary>What was solved at a direction.</summary>
    public DirectionSpectra At(in GridDirection direction) => _known[Key(direction)];

    private (double Sine, double Across) Key(GridDirection direction) => (direction.SineSquared, IsUnpolarized && !section.IsFilms ? direction.AcrossShare : 1);

    // Light along the surface is none: 89.99 degrees stand for it.
    private static Angle AngleOf(double sineSquared) => Angle.FromDegrees(Math.Min(89.99, double.RadiansToDegrees(Math.Asin(Math.Sqrt(sineSquared)))));

    private DirectionSpectra[] SolveAt(double acrossShare, Angle[] angles)
    {
        PredictionConditions at = conditions with { Incidences = [.. angles], AllPolarizations = false, ComparesSolvers = false };
        if (plan.IsRigorous)
        {
            Section turned = IsUnpolarized ? section with { Axis = Azimuth(acrossShare) } : section;
            GratingResponses rigorous = GratingResponses.Solve(turned, at, catalog, progress: null, cancellation);
            ErrorEstimate = Math.Max(ErrorEstimate, rigorous.ErrorEstimate);
            ILookup<Angle, DiffractionOrder> orders = rigorous.Orders.Where(order => order.Side == OrderSide.Reflected && order.Order != 0).ToLookup(order => order.Incidence);
            return [.. rigorous.Powers.Seen.Select(response => new DirectionSpectra(
                response.Reflectance.Values.ToArray(), orders[response.Incidence].ToDictionary(order => order.Order, order => order.Efficiency.Values.ToArray())))];
        }
        if (section.IsFilms || !IsUnpolarized)
            return [.. Films(section, at).Select(values => new DirectionSpectra(values, NoOrders))];
        double[][] across = Films(section with { Axis = Angle.FromDegrees(0) }, at), along = Films(section with { Axis = Angle.FromDegrees(90) }, at);
        return [.. across.Zip(along, (one, other) => new DirectionSpectra(
            [.. one.Zip(other, (a, b) => acrossShare * a + (1 - acrossShare) * b)], NoOrders))];
    }

    private double[][] Films(Section of, PredictionConditions at)
    {
        LayerModelResponses films = LayerModelResponses.Solve(of, plan, at, catalog, progress: null, cancellation);
        ErrorEstimate = Math.Max(ErrorEstimate, films.ErrorEstimate);
        return [.. films.Powers.Seen.Select(response => response.Reflectance.Values.ToArray())];
    }

    private static Angle Azimuth(double acrossShare)
        => acrossShare >= 1 ? Angle.FromDegrees(0) : acrossShare <= 0 ? Angle.FromDegrees(90) : Angle.FromDegrees(double.RadiansToDegrees(Math.Acos(Math.Sqrt(acrossShare))));
}

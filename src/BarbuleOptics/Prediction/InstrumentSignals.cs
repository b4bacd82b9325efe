using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra.Instruments;

namespace BarbuleOptics.Prediction;

/// <summary>What an instrument reads, at each angle asked for.</summary>
/// <remarks>The signal is a weighted sum of spectra at few directions; their number is raised, in angle, azimuth or both, until what further ones add
/// is below the accuracy asked for, and the sum of what the last ones added is the error estimate.</remarks>
internal sealed class InstrumentSignals
{
    /// <summary>What the last directions may add, over the accuracy: they are counted, and what is left out is a small part of that.</summary>
    public const double LastAdded = 5;

    private readonly Section _section;
    private readonly PredictionConditions _conditions;
    private readonly SignalSpectra _spectra;
    private readonly CollectedOrders _orders;

    private InstrumentSignals(Section section, SolverPlan plan, PredictionConditions conditions, IMaterialCatalog catalog, CancellationToken cancellation)
    {
        (_section, _conditions) = (section, conditions);
        _spectra = new SignalSpectra(section, plan, conditions, catalog, cancellation);
        _orders = new CollectedOrders(section, plan, conditions, catalog);
    }

    /// <summary>Solves them.</summary>
    /// <param name="section">The section.</param>
    /// <param name="plan">How it is solved.</param>
    /// <param name="conditions">With an instrument.</param>
    /// <param name="catalog">Where materials are.</param>
    /// <param name="progress">Told the share of the angles done.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static InstrumentSignal[] Solve(
        Section section, SolverPlan plan, PredictionConditions conditions, IMaterialCatalog catalog, IProgress<double>? progress, CancellationToken cancellation)
    {
        var signals = new InstrumentSignals(section, plan, conditions, catalog, cancellation);
        var found = new InstrumentSignal[conditions.Incidences.Count];
        for (int i = 0; i < found.Length; i++)
        {
            found[i] = signals.At(conditions.Incidences[i]);
            progress?.Report((i + 1.0) / found.Length);
        }
        return found;
    }

    private InstrumentSignal At(Angle angle)
    {
        Instrument instrument = _conditions.Instrument!;
        var directions = new LocalDirections(instrument, angle, _section.Axis);
        double scale = instrument.Reference == SignalReference.WhiteStandard ? instrument.WhiteFactor(angle) : 1;
        (double[] signal, double error) = directions.Samples.Count == 0 ? (new double[_conditions.Wavelengths.Count], 0) : Specular(directions);
        if (directions.HasNoCones && directions.Share > 0)
            scale /= directions.Share;
        (double[] diffracted, double orderError) = directions.HasNoCones ? (new double[signal.Length], 0) : _orders.At(instrument, angle, _spectra);
        double specular = signal.Sum(), other = diffracted.Sum();
        for (int i = 0; i < signal.Length; i++)
            signal[i] = scale * (signal[i] + diffracted[i]);
        return new InstrumentSignal(
            angle, new Spectrum(_conditions.Wavelengths, signal), directions.HasNoCones ? 1 : scale, directions.HasNoCones ? null : directions.Share, directions.MeanIncidence,
            scale * (error + orderError), _spectra.Count, other > 0 ? other / (specular + other) : 0);
    }

    // Dimension-adaptive sum of differences between levels (T. Gerstner and M. Griebel, Computing 71 (2003) 65; from memory): the largest one on the border of
    // what is taken is taken next, and its neighbors, whose own predecessors are taken, join the border.
    private (double[] Signal, double Error) Specular(LocalDirections directions)
    {
        var grid = new DirectionGrid(directions);
        // Light of one polarization, and films, do not see the azimuth.
        int mostAcross = !_spectra.IsUnpolarized || _section.IsFilms ? 0 : grid.MostAcross;
        double allowed = LastAdded * _conditions.Accuracy * directions.Share;
        var sums = new Dictionary<(int, int), double[]>();
        var border = new Dictionary<(int Sine, int Across), double>();
        var taken = new HashSet<(int, int)>();
        double[] signal = new double[_conditions.Wavelengths.Count];
        Join((0, 0));
        while (border.Count > 0)
        {
            // The first levels are taken in any case: the middle may happen to be right.
            (int Sine, int Across)[] first = [.. border.Keys.Where(level => level.Sine + level.Across <= 1)];
            if (first.Length == 0 && border.Values.Sum() <= allowed)
                break;
            (int sine, int across) = first.Length > 0 ? first[0] : border.MaxBy(pair => pair.Value).Key;
            border.Remove((sine, across));
            taken.Add((sine, across));
            if (sine < grid.MostSine && (across == 0 || taken.Contains((sine + 1, across - 1))))
                Join((sine + 1, across));
            if (across < mostAcross && (sine == 0 || taken.Contains((sine - 1, across + 1))))
                Join((sine, across + 1));
        }
        return (signal, border.Values.Sum());

        void Join((int Sine, int Across) level)
        {
            double most = 0;
            double[] difference = Difference(grid, sums, level.Sine, level.Across);
            for (int i = 0; i < difference.Length; i++)
            {
                signal[i] += difference[i];
                most = Math.Max(most, Math.Abs(difference[i]));
            }
            border.Add(level, most);
        }
    }

    // What a level adds to those below it in either direction.
    private double[] Difference(DirectionGrid grid, Dictionary<(int, int), double[]> sums, int sine, int across)
    {
        double[] difference = [.. At(sine, across)];
        for (int i = 0; i < difference.Length; i++)
            difference[i] += -At(sine - 1, across)[i] - At(sine, across - 1)[i] + At(sine - 1, across - 1)[i];
        return difference;

        double[] At(int s, int a)
        {
            if (!sums.TryGetValue((s, a), out double[]? sum))
                sums.Add((s, a), sum = s < 0 || a < 0 ? new double[_conditions.Wavelengths.Count] : Sum(grid.At(s, a)));
            return sum;
        }
    }

    private double[] Sum(List<GridDirection> points)
    {
        _spectra.Prepare(points);
        var sum = new double[_conditions.Wavelengths.Count];
        foreach (GridDirection point in points)
        {
            double[] specular = _spectra.At(point).Specular;
            for (int i = 0; i < sum.Length; i++)
                sum[i] += point.Weight * specular[i];
        }
        return sum;
    }
}

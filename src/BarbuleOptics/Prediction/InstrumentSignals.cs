using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra.Instruments;

namespace BarbuleOptics.Prediction;

/// <summary>What an instrument reads, at each angle asked for.</summary>
/// <remarks>The signal is a weighted sum of spectra at few directions; their number is raised, in angle and azimuth in turn, until the sum changes by less than the
/// accuracy asked for, and the last change of each is the error estimate.</remarks>
internal sealed class InstrumentSignals
{
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

    private (double[] Signal, double Error) Specular(LocalDirections directions)
    {
        var grid = new DirectionGrid(directions);
        double allowed = _conditions.Accuracy * directions.Share;
        int sine = Math.Min(1, grid.MostSine), across = Math.Min(1, grid.MostAcross);
        double[] signal = Sum(grid.At(sine, across));
        double sineError = sine == 0 ? 0 : double.PositiveInfinity, acrossError = across == 0 ? 0 : double.PositiveInfinity;
        // Light of one polarization, and films, do not see the azimuth.
        if (!_spectra.IsUnpolarized || _section.IsFilms)
            (across, acrossError) = (0, 0);
        while ((sineError > allowed && sine < grid.MostSine) || (acrossError > allowed && across < grid.MostAcross))
        {
            bool inSine = sine < grid.MostSine && (sineError >= acrossError || across == grid.MostAcross || acrossError <= allowed) && sineError > allowed;
            double[] finer = Sum(inSine ? grid.At(sine + 1, across) : grid.At(sine, across + 1));
            double change = LargestChange(signal, finer);
            (sine, across) = inSine ? (sine + 1, across) : (sine, across + 1);
            (sineError, acrossError) = inSine ? (change, acrossError) : (sineError, change);
            signal = finer;
        }
        return (signal, sineError + acrossError);
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

    private static double LargestChange(double[] one, double[] other)
    {
        double most = 0;
        for (int i = 0; i < one.Length; i++)
            most = Math.Max(most, Math.Abs(one[i] - other[i]));
        return most;
    }
}

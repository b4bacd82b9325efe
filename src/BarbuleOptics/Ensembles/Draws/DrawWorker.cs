using BarbuleOptics.Ensembles.Sequences;
using BarbuleOptics.Ensembles.Spreads;
using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles.Draws;

/// <summary>Makes and solves draws one after another on one thread.</summary>
internal sealed class DrawWorker
{
    /// <summary>Largest error estimate of a draw that counts; the same as for a prediction.</summary>
    private const double MostError = Prediction.GratingResponses.MostError;

    private readonly DrawPlan _plan;
    private readonly DrawSolver _solver;
    private readonly OutcomeReader _reader;
    private readonly PeakFollower[] _followers;
    private readonly SectionDrawer _drawer;
    private readonly PeakScan _peaks;
    private readonly double[] _coordinates;
    private readonly double[] _scores;
    private readonly double[] _lengthsNm;
    private readonly double[] _asDrawnNm;
    private readonly int[] _rowCounts;

    public DrawWorker(DrawPlan plan, DrawSolver solver, OutcomeReader reader, PeakFollower[] followers, WavelengthGrid grid)
    {
        (_plan, _solver, _reader, _followers) = (plan, solver, reader, followers);
        _drawer = new SectionDrawer(plan.Barbule, plan.Slots, plan.SeparateRows);
        _peaks = new PeakScan(grid);
        _coordinates = new double[plan.Dimensions];
        (_scores, _lengthsNm, _asDrawnNm) = (new double[plan.Slots.Length], new double[plan.Slots.Length], new double[plan.Slots.Length]);
        _rowCounts = new int[plan.Barbule.Layers.Count];
    }

    /// <summary>One draw into its place of a round.</summary>
    /// <param name="net">The points.</param>
    /// <param name="number">Number of the point.</param>
    /// <param name="round">Where it goes.</param>
    /// <param name="place">Its place there.</param>
    public void Draw(ScrambledNet net, long number, DrawRound round, int place)
    {
        net.Point(number, _coordinates);
        Draw(_coordinates, round, place);
    }

    /// <summary>One draw of given coordinates into its place of a round.</summary>
    /// <param name="coordinates">Numbers above 0 and below 1, one a dimension of the plan.</param>
    /// <param name="round">Where it goes.</param>
    /// <param name="place">Its place there.</param>
    public void Draw(ReadOnlySpan<double> coordinates, DrawRound round, int place)
    {
        _plan.Draw(coordinates, _lengthsNm, _rowCounts, _scores);
        _lengthsNm.CopyTo(_asDrawnNm.AsSpan());
        Section section = _drawer.Draw(_lengthsNm, _rowCounts);
        Span<double> moved = round.Moved(place);
        for (int slot = 0; slot < moved.Length; slot++)
            moved[slot] = _lengthsNm[slot] - _asDrawnNm[slot];
        round.Errors[place] = TrySolve(section, round.Reflectances(place));
        for (int angle = 0; angle < _followers.Length; angle++)
            Read(round, place, angle);
    }

    private double TrySolve(Section section, Span<double> reflectances)
    {
        double error;
        try
        {
            error = _solver.Solve(section, reflectances);
        }
        catch (ArithmeticException)
        {
            error = double.PositiveInfinity;
        }
        if (!(error <= MostError))
            reflectances.Fill(double.NaN);
        return error;
    }

    private void Read(DrawRound round, int place, int angle)
    {
        Span<double> outcomes = round.Outcomes(place, angle);
        ref DrawMarks marks = ref round.Marks(place, angle);
        marks = default;
        if (!(round.Errors[place] <= MostError))
        {
            outcomes.Fill(double.NaN);
            marks.Term = -1;
            marks.IsFailed = true;
            return;
        }
        ReadOnlySpan<double> reflectance = round.Reflectance(place, angle);
        _peaks.Scan(reflectance);
        int followed = _followers[angle].Find(_peaks, _lengthsNm);
        marks.Term = _reader.Read(reflectance, _peaks, followed, outcomes);
        marks.IsLost = followed < 0 && _followers[angle].HasPeak;
        marks.IsOtherHighest = followed >= 0 && _peaks.Highest != followed;
    }
}

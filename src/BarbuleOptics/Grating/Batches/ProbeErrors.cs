using System.Runtime.CompilerServices;
using BarbuleOptics.Grating.Joining;

namespace BarbuleOptics.Grating.Batches;

/// <summary>Errors of each step of the ladder at the probes of a group, and what they say of the wavelengths between.</summary>
/// <param name="safety">Factor on the change that the next step made, for what all later ones would change.</param>
/// <param name="leastFall">No larger fall of the change from one step to the next is believed: it may be so by accident.</param>
/// <param name="isEven">Whether changes fall evenly, so that falls seen tell of those to come.</param>
/// <param name="least">No estimate is smaller.</param>
internal sealed class ProbeErrors(double safety, double leastFall, bool isEven, double least)
{
    /// <summary>Number of probes.</summary>
    public const int Count = 8;

    /// <summary>Least fall once falls were seen: this share of the slowest, and no less than that.</summary>
    private const double ShareOfFall = 0.3, LeastFallKnown = 0.003;

    /// <summary>Largest ratio of two changes that is carried on.</summary>
    private const double MostRatio = 0.8;

    /// <summary>Factor on the change of the first step, which nothing is known to have fallen to.</summary>
    private const double Unproven = 2;

    /// <summary>Factor for wavelengths that are no probes.</summary>
    private const double Carrying = 1.6;

    /// <summary>Share of the error at the probes beyond the nearest on either side that counts.</summary>
    private const double Beyond = 0.25;

    /// <summary>Share of a neighboring probe's error that counts at a probe itself.</summary>
    private const double Beside = 0.2;

    /// <summary>No change is told from rounding below this.</summary>
    private const double Rounding = 1e-12;

    private readonly double[] _errors = new double[BatchLadder.MostSteps * Count];
    private readonly double[] _changes = new double[Count];
    private readonly double[] _ratios = new double[Count];
    private readonly int[] _wavelengths = new int[Count];
    private int _count;

    /// <summary>Number of steps whose errors are known.</summary>
    public int Steps { get; private set; }

    /// <summary>Forgets all, for probes at other wavelengths, in rising positions.</summary>
    public void Start(ReadOnlySpan<int> wavelengths)
    {
        wavelengths.CopyTo(_wavelengths);
        (_count, Steps) = (wavelengths.Length, 0);
        Array.Clear(_changes);
        Array.Clear(_ratios);
    }

    /// <summary>Takes the answers of one step and the next over.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Add(ReadOnlySpan<double> coarse, ReadOnlySpan<double> fine, int length)
    {
        for (int probe = 0; probe < _count; probe++)
        {
            double change = coarse[probe * length + OutcomeLayout.Error] + fine[probe * length + OutcomeLayout.Error];
            for (int i = 0; i < OutcomeLayout.Judged; i++)
                change = Math.Max(change, Math.Abs(fine[probe * length + i] - coarse[probe * length + i]));
            _errors[Steps * Count + probe] = Math.Max(least, safety * Believed(probe, change));
            _changes[probe] = change;
        }
        Steps++;
    }

    private double Believed(int probe, double change)
    {
        if (Steps == 0)
            return Unproven * change;
        double ratio = change / Math.Max(_changes[probe], Rounding), slowest = _ratios[probe];
        double fall = Steps == 1 || !isEven ? leastFall : Math.Clamp(ShareOfFall * slowest, LeastFallKnown, 1);
        _ratios[probe] = Math.Max(slowest, ratio);
        // All later changes together, should they go on falling as slowly.
        return Math.Max(change, fall * _changes[probe]) / (1 - Math.Clamp(ratio, 0, MostRatio));
    }

    /// <summary>Error of a step at a probe, not much below that at its neighbors; NaN where it could not be solved.</summary>
    public double At(int step, int probe)
    {
        double own = Of(step, probe), near = Math.Max(probe > 0 ? Of(step, probe - 1) : 0, probe + 1 < _count ? Of(step, probe + 1) : 0);
        return near > own ? Math.Max(own, Beside * near) : own;
    }

    private double Of(int step, int probe) => _errors[step * Count + probe];

    /// <summary>The largest of a step, but for probes that could not be solved; 0 where none could.</summary>
    public double Largest(int step)
    {
        double largest = 0;
        for (int probe = 0; probe < _count; probe++)
        {
            if (Of(step, probe) > largest)
                largest = Of(step, probe);
        }
        return largest;
    }

    /// <summary>The largest of a step at any wavelength of the group.</summary>
    public double LargestCarried(int step) => Carrying * Largest(step);

    /// <summary>Error of a step at any wavelength of the group; NaN where no probe tells.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public double Carried(int step, int wavelength)
    {
        if (Steps == 0)
            return double.NaN;
        int right = 0;
        while (right < _count && _wavelengths[right] < wavelength)
            right++;
        double error = Math.Max(Side(step, right - 1, -1), Side(step, right, 1));
        return error > 0 ? Carrying * error : double.NaN;
    }

    /// <summary>The first step with errors up to <paramref name="accuracy"/> at some wavelengths; the last one where none has.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public int StepFor(int first, int count, double accuracy)
    {
        int step = 0;
        for (; step + 1 < Steps; step++)
        {
            bool all = true;
            for (int wavelength = first; wavelength < first + count && all; wavelength++)
                all = Carried(step, wavelength) <= accuracy;
            if (all)
                return step;
        }
        return step;
    }

    // The nearest probe on one side, and the next one beyond it.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private double Side(int step, int probe, int direction)
    {
        double error = 0, share = 1;
        for (; probe >= 0 && probe < _count && share >= Beyond; probe += direction)
        {
            if (double.IsNaN(Of(step, probe)))
                continue;
            error = Math.Max(error, share * Of(step, probe));
            share *= Beyond;
        }
        return error;
    }
}

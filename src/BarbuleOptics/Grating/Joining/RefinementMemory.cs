namespace BarbuleOptics.Grating.Joining;

/// <summary>What refinement learned at neighboring wavelengths: where it stopped, and by which ratio changes fall from step to step.</summary>
/// <remarks>Single ratios scatter, for a change may happen to be small; so their logarithms are averaged, the newer ones counting more, and
/// the mean deviation from the average is added.</remarks>
/// <param name="steps">Number of steps.</param>
/// <param name="cautious">Ratio expected before one was measured.</param>
/// <param name="least">No smaller ratio is counted on.</param>
internal sealed class RefinementMemory(int steps, double cautious, double least)
{
    private const double LeastRatio = 1e-3;
    private const double MostRatio = 2;

    /// <summary>Part of a change that the next wavelength is held to.</summary>
    private const double Memory = 0.15;

    /// <summary>Weight of the newest ratio.</summary>
    private const double Newest = 0.3;

    private readonly double[] _means = new double[steps];
    private readonly double[] _deviations = new double[steps];
    private readonly double[] _changes = new double[steps];
    private readonly int[] _counts = new int[steps];

    /// <summary>The step that was accurate enough; -1 before the first.</summary>
    public int Accepted { get; set; } = -1;

    /// <summary>Number of wavelengths since the last one that was solved a step further than needed.</summary>
    public int SinceProbe { get; set; }

    /// <summary>Forgets.</summary>
    public void Clear()
    {
        Array.Clear(_counts);
        Array.Clear(_changes);
        Accepted = -1;
        SinceProbe = 0;
    }

    /// <summary>Whether a ratio was measured from a step to the next.</summary>
    public bool Knows(int step) => step < steps && _counts[step] > 0;

    /// <summary>Notes the change a step made, divided into that which the next one made.</summary>
    public void Note(int step, double ratio)
    {
        double log = Math.Log(Math.Clamp(ratio, LeastRatio, MostRatio));
        if (_counts[step]++ == 0)
        {
            (_means[step], _deviations[step]) = (log, Math.Log(2));
            return;
        }
        _deviations[step] += Newest * (Math.Abs(log - _means[step]) - _deviations[step]);
        _means[step] += Newest * (log - _means[step]);
    }

    /// <summary>The change a step made, but not much less than it was at the wavelengths before: where it is, it may be so by accident.</summary>
    public double Smooth(int step, double change)
    {
        _changes[step] = Math.Max(change, Memory * _changes[step]);
        return _changes[step];
    }

    /// <summary>Expected change of the next step, divided by that of this one.</summary>
    public double Ratio(int step)
    {
        if (Knows(step))
            return Math.Max(least, Math.Exp(_means[step] + _deviations[step]));
        return step > 0 && Knows(step - 1) ? Math.Max(Math.Exp(_means[step - 1] + _deviations[step - 1]), 0.3 * cautious) : cautious;
    }
}

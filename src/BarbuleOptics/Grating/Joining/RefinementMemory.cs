namespace BarbuleOptics.Grating.Joining;

/// <summary>What refinement learned at neighboring wavelengths: where it stopped, and how fast differences fall.</summary>
internal sealed class RefinementMemory(int steps, double cautious)
{
    private const double LeastRatio = 0.02;
    private const double MostRatio = 0.9;

    private readonly double[] _ratios = new double[steps];

    /// <summary>The step that was accurate enough; -1 before the first.</summary>
    public int Accepted { get; set; } = -1;

    /// <summary>Forgets.</summary>
    public void Clear()
    {
        Array.Clear(_ratios);
        Accepted = -1;
    }

    /// <summary>Whether a ratio was measured from a step to the next.</summary>
    public bool Knows(int step) => step < steps && _ratios[step] > 0;

    /// <summary>Notes the difference a step made, divided into that which the next one made.</summary>
    public void Note(int step, double ratio)
    {
        double clamped = Math.Clamp(ratio, LeastRatio, MostRatio);
        _ratios[step] = Math.Max(clamped, 0.7 * _ratios[step] + 0.3 * clamped);
    }

    /// <summary>Expected difference of the next step, divided by that of this one.</summary>
    public double Ratio(int step)
    {
        if (Knows(step))
            return _ratios[step];
        return step > 0 && Knows(step - 1) ? Math.Max(_ratios[step - 1], 0.5 * cautious) : cautious;
    }
}

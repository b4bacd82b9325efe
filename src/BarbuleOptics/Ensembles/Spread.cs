namespace BarbuleOptics.Ensembles;

/// <summary>Which spread of the measurements is drawn from; the three answer different questions and are never mixed.</summary>
public enum Spread
{
    /// <summary>Of the mean, sd/sqrt(n): how sure is this color?</summary>
    Mean,

    /// <summary>Between barbules; all rows of a barbule move together, and intensities add: what does an instrument see over a spot?</summary>
    Between,

    /// <summary>Within a section; every row is drawn by itself, and amplitudes add: what does disorder do to the peak?</summary>
    Within,
}

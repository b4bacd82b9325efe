namespace BarbuleOptics.Ensembles.Draws;

/// <summary>What is counted of one draw at one angle.</summary>
internal struct DrawMarks
{
    /// <summary>Number of the hue term; -1 without color.</summary>
    public int Term;

    /// <summary>Whether the peak of the mean geometry is not found.</summary>
    public bool IsLost;

    /// <summary>Whether it is found, and another is higher.</summary>
    public bool IsOtherHighest;

    /// <summary>Whether the section could not be solved.</summary>
    public bool IsFailed;
}

namespace BarbuleOptics.Color;

/// <summary>A standard human observer of CIE 015.</summary>
public enum StandardObserver
{
    /// <summary>CIE 1931, a field of 2 degrees; "1931-2deg" in files. The default.</summary>
    Cie1931TwoDegree,

    /// <summary>CIE 1964, a field of 10 degrees; "1964-10deg" in files.</summary>
    Cie1964TenDegree,
}

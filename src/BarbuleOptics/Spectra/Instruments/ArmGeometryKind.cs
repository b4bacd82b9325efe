namespace BarbuleOptics.Spectra.Instruments;

/// <summary>Ways to hold light and collector.</summary>
public enum ArmGeometryKind
{
    /// <summary>Both arms turn, so that a mirror in the mean surface sends the light into the collector at every angle.</summary>
    TurningArms,

    /// <summary>Light and collection share one line.</summary>
    OneLine,

    /// <summary>Two arms at a fixed angle to each other; the specimen turns.</summary>
    FixedArms,
}

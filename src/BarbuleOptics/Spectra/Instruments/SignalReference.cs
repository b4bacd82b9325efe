namespace BarbuleOptics.Spectra.Instruments;

/// <summary>What a signal is divided by.</summary>
public enum SignalReference
{
    /// <summary>The signal of a perfect mirror turned to send light from the one arm into the other.</summary>
    Mirror,

    /// <summary>The signal of a perfect matt white in the mean surface, which sends the same radiance everywhere.</summary>
    WhiteStandard,
}

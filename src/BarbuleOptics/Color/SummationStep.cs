namespace BarbuleOptics.Color;

/// <summary>The wavelengths over which tristimulus values are summed.</summary>
public enum SummationStep
{
    /// <summary>Every nanometre, as CIE 015 defines them; the default.</summary>
    OneNanometre,

    /// <summary>Every fifth nanometre, which CIE 015 allows for most work.</summary>
    FiveNanometres,
}

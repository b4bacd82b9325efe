using BarbuleOptics.Color;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Prediction;

/// <summary>What is seen at one angle in one polarization.</summary>
/// <param name="Incidence">Angle of incidence in the surround.</param>
/// <param name="Polarization">Polarization of the incident light.</param>
/// <param name="Reflectance">Specular reflectance; with an instrument its signal.</param>
/// <param name="Features">Its peaks, brightness and contrast.</param>
/// <param name="Color">Its CIE color; null where the grid leaves out visible light.</param>
public sealed record View(Angle Incidence, Polarizations Polarization, Spectrum Reflectance, SpectrumFeatures Features, CieColor? Color)
{
    /// <summary>Where the power goes on average.</summary>
    public required PowerSummary Powers { get; init; }

    /// <summary>Its color to each of the eyes asked for; empty where the grid leaves out what birds see.</summary>
    public ValueList<BirdColor> Birds { get; init; } = [];

    /// <summary>The most prominent peak below 400 nm, which people do not see; null where there is none.</summary>
    public SpectralPeak? UltravioletPeak => Features.Peaks.Where(peak => peak.WavelengthNm < SpectrumFeatures.VisibleStartNm).MaxBy(peak => peak.Prominence);

    /// <summary>How the instrument came to what is seen; null without one.</summary>
    public InstrumentSignal? Signal { get; init; }

    /// <summary>How far the layer model is from the rigorous solution; null where they were not compared.</summary>
    public LayerModelError? LayerModelError { get; init; }
}

using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;

namespace BarbuleOptics.Prediction;

/// <summary>Where the power of a beam goes, on average over 300-700 nm or the part of it that the grid covers; null where it covers none.</summary>
/// <param name="MeanReflectance">Into the mirror's direction.</param>
/// <param name="MeanDiffractedReflectance">Back into other directions.</param>
/// <param name="MeanTransmittance">Through the last face.</param>
/// <param name="MeanAbsorptance">Lost inside.</param>
public sealed record PowerSummary(double? MeanReflectance, double? MeanDiffractedReflectance, double? MeanTransmittance, double? MeanAbsorptance)
{
    /// <summary>The averages of one response.</summary>
    public static PowerSummary Of(SpectralResponse response)
    {
        ArgumentNullException.ThrowIfNull(response);
        return new PowerSummary(Mean(response.Reflectance), Mean(response.DiffractedReflectance), Mean(response.Transmittance), Mean(response.Absorptance));
    }

    /// <summary>The average of one spectrum.</summary>
    internal static double? Mean(Spectrum spectrum)
        => SpectralBand.Covered(spectrum, SpectrumFeatures.UltravioletStartNm, SpectrumFeatures.VisibleEndNm)?.Mean;
}

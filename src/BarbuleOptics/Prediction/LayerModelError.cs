using BarbuleOptics.Color;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;

namespace BarbuleOptics.Prediction;

/// <summary>How far the layer model lies from the rigorous solution of the same section, at one angle in one polarization.</summary>
/// <param name="Mixing">Name of the mixing rule.</param>
/// <param name="PeakShiftNm">Wavelength of the main peak by the layer model less the rigorous one, in nm; null where no peak matches.</param>
/// <param name="LargestChange">Largest difference of the specular reflectance, a fraction, 0 or above.</param>
/// <param name="LargestChangeAtNm">The wavelength at which it is found, in nm.</param>
/// <param name="Ciede2000">Difference of the two colors; null where there is no color.</param>
/// <param name="OtherReflectance">The reflectance that the view does not show: the layer model's beside a rigorous view, the rigorous one beside a layer model's.</param>
/// <param name="OtherColor">Its color; null where there is none.</param>
public sealed record LayerModelError(
    string Mixing, double? PeakShiftNm, double LargestChange, double LargestChangeAtNm, double? Ciede2000, Spectrum OtherReflectance, CieColor? OtherColor)
{
    /// <summary>Farthest a matching peak may lie, as a share of the wavelength.</summary>
    private const double MostShiftShare = 0.1;

    /// <summary>Largest ratio of the prominences of two peaks that match: the narrow resonances of trapped orders have no counterpart among films.</summary>
    private const double MostProminenceRatio = 3;

    /// <summary>Compares two views of one section.</summary>
    internal static LayerModelError Between(string mixing, View layerModel, View rigorous, bool showsLayerModel)
    {
        (double change, double atNm) = LargestDifference(layerModel.Reflectance, rigorous.Reflectance);
        View other = showsLayerModel ? rigorous : layerModel;
        return new LayerModelError(
            mixing, PeakShift(layerModel.Features, rigorous.Features), change, atNm,
            layerModel.Color is CieColor one && rigorous.Color is CieColor two ? ColorDifference.Ciede2000(one.Lab, two.Lab) : null,
            other.Reflectance, other.Color);
    }

    /// <summary>From the rigorous main peak to the layer model's nearest peak of like prominence within a tenth of the wavelength.</summary>
    internal static double? PeakShift(SpectrumFeatures layerModel, SpectrumFeatures rigorous)
    {
        if (rigorous.MainPeak is not SpectralPeak main)
            return null;
        SpectralPeak? match = layerModel.Peaks
            .Where(peak => peak.Prominence < MostProminenceRatio * main.Prominence && main.Prominence < MostProminenceRatio * peak.Prominence)
            .MinBy(peak => Math.Abs(peak.WavelengthNm - main.WavelengthNm));
        double? shiftNm = match?.WavelengthNm - main.WavelengthNm;
        return Math.Abs(shiftNm ?? 0) <= MostShiftShare * main.WavelengthNm ? shiftNm : null;
    }

    private static (double Change, double AtNm) LargestDifference(Spectrum one, Spectrum other)
    {
        int worst = 0;
        for (int i = 1; i < one.Grid.Count; i++)
        {
            if (Math.Abs(one[i] - other[i]) > Math.Abs(one[worst] - other[worst]))
                worst = i;
        }
        return (Math.Abs(one[worst] - other[worst]), one.Grid.Nanometres[worst]);
    }
}

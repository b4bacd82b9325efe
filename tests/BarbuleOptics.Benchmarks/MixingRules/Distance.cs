using BarbuleOptics.Color;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;

namespace BarbuleOptics.Benchmarks.MixingRules;

/// <summary>How far one spectrum of the layer model is from the rigorous one.</summary>
/// <param name="Change">Largest difference of the reflectance.</param>
/// <param name="PeakNm">Shift of the main peak without its sign, in nm; null where no peak matches or the rigorous spectrum has none.</param>
/// <param name="HasPeak">Whether the rigorous spectrum has a peak.</param>
/// <param name="Color">CIEDE2000 under D65 for the 1931 observer.</param>
internal sealed record Distance(double Change, double? PeakNm, bool HasPeak, double Color)
{
    public static Distance Between(Spectrum layerModel, Spectrum rigorous, Colorimeter colorimeter)
    {
        double change = 0;
        for (int i = 0; i < rigorous.Grid.Count; i++)
            change = Math.Max(change, Math.Abs(layerModel[i] - rigorous[i]));
        SpectrumFeatures truth = SpectrumFeatures.Of(rigorous);
        double? shiftNm = LayerModelError.PeakShift(SpectrumFeatures.Of(layerModel), truth);
        double color = ColorDifference.Ciede2000(colorimeter.MeasureLab(layerModel.Values), colorimeter.MeasureLab(rigorous.Values));
        return new Distance(change, shiftNm is double shift ? Math.Abs(shift) : null, truth.MainPeak is not null, color);
    }
}

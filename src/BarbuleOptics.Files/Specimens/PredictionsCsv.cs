using System.Globalization;
using System.Text;
using BarbuleOptics.Color;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Ensembles.Statistics;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Spectra;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Files.Specimens;

/// <summary>Predictions of many specimens: one line a specimen and angle, at full precision; a cell is empty where there is no value.</summary>
public static class PredictionsCsv
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "predictions.csv";

    private const string Common = "specimen,incidence_deg,polarization,solver,error_estimate,peak_nm,peak_reflectance,half_height_width_nm,mean_reflectance,contrast,ultraviolet_share,"
        + "X,Y,Z,x,y,L,a,b,C,h_deg,dominant_wavelength_nm,excitation_purity,sRGB,sRGB_brightened,hue_term";

    private static readonly string[] DrawnNames = ["peak_nm", "peak_reflectance", "L", "a", "b", "C", "h_deg"];
    private static readonly string[] DrawnBird = ["chroma", "azimuth_deg", "elevation_deg"];
    private static readonly string[] BirdColumns = ["hue_term", "chroma", "azimuth_deg", "elevation_deg", "chromatic_contrast", "achromatic_contrast"];

    /// <summary>The header line, which depends on the eyes and on whether there are draws.</summary>
    public static string Header(PredictionConditions conditions, bool hasDraws)
    {
        ArgumentNullException.ThrowIfNull(conditions);
        IEnumerable<string> birds = conditions.Eyes.SelectMany(eye => BirdColumns.Select(column => $"{eye.Name}.{column}"));
        IEnumerable<string> drawn = hasDraws ? Drawn(conditions).SelectMany(Intervals).Concat(["likeliest_hue_term", "likeliest_hue_term_share"]) : [];
        return string.Join(',', [Common, .. birds.Concat(drawn).Select(DelimitedText.Quoted), "warnings"]) + "\n";

        static IEnumerable<string> Intervals(string name) => [$"{name}_median", $"{name}_from_50", $"{name}_to_50", $"{name}_from_95", $"{name}_to_95"];
    }

    /// <summary>The lines of one specimen.</summary>
    public static string Lines(string specimen, StructurePrediction prediction, EnsemblePrediction? ensemble)
    {
        ArgumentNullException.ThrowIfNull(specimen);
        ArgumentNullException.ThrowIfNull(prediction);
        var text = new StringBuilder();
        for (int i = 0; i < prediction.Views.Count; i++)
        {
            View view = prediction.Views[i];
            IEnumerable<string> drawn = ensemble is null ? [] : OfDraws(ensemble.Views[i], prediction.Conditions);
            IEnumerable<string> cells = [specimen, .. OfView(view, prediction), .. prediction.Conditions.Eyes.SelectMany(eye => OfEye(view, eye)), .. drawn, Warnings(prediction, ensemble)];
            text.AppendJoin(',', cells.Select(DelimitedText.Quoted)).Append('\n');
        }
        return text.ToString();
    }

    private static IEnumerable<string> Drawn(PredictionConditions conditions)
        => [.. DrawnNames, .. conditions.Eyes.SelectMany(eye => DrawnBird.Select(column => $"{eye.Name}.{column}"))];

    private static IEnumerable<string> OfView(View view, StructurePrediction prediction)
    {
        SpectrumFeatures features = view.Features;
        CieColor? color = view.Color;
        return
        [
            Text(view.Incidence.Degrees), PolarizationNames.Of(view.Polarization), prediction.Solver, Text(prediction.ErrorEstimate),
            Text(features.MainPeak?.WavelengthNm), Text(features.MainPeak?.Reflectance), Text(features.MainPeak?.HalfHeightWidthNm),
            Text(features.MeanReflectance), Text(features.Contrast), Text(features.UltravioletShare),
            Text(color?.Tristimulus.X), Text(color?.Tristimulus.Y), Text(color?.Tristimulus.Z), Text(color?.Chromaticity.X), Text(color?.Chromaticity.Y),
            Text(color?.Lab.L), Text(color?.Lab.A), Text(color?.Lab.B), Text(color?.Lab.Chroma), Text(color?.Lab.HueDegrees),
            Text(color?.DominantWavelengthNm), Text(color?.ExcitationPurity), color?.Srgb.ToString() ?? "", color?.SrgbBrightened.ToString() ?? "", color?.HueTerm ?? "",
        ];
    }

    private static string[] OfEye(View view, VisualSystem eye)
        => view.Birds.FirstOrDefault(bird => bird.System.Name == eye.Name) is not { } bird ? [.. BirdColumns.Select(_ => "")] :
        [
            bird.Hue.Term, Text(bird.Place.Chroma), Text(bird.Place.AzimuthDegrees), Text(bird.Place.ElevationDegrees), Text(bird.ChromaticContrast), Text(bird.AchromaticContrast),
        ];

    private static IEnumerable<string> OfDraws(DrawnView view, PredictionConditions conditions)
    {
        foreach (string name in Drawn(conditions))
        {
            DrawnValue? value = view.Value(name);
            foreach (double? number in (double?[])[value?.Median, value?.From50, value?.To50, value?.From95, value?.To95])
                yield return Text(number);
        }
        TermShare? likeliest = view.Terms.Count > 0 ? view.Terms[0] : null;
        yield return likeliest?.Term ?? "";
        yield return Text(likeliest?.Share);
    }

    private static string Warnings(StructurePrediction prediction, EnsemblePrediction? ensemble)
        => string.Join(' ', prediction.Warnings.Concat(ensemble is null ? [] : ensemble.Warnings).Select(warning => warning.Code).Distinct());

    private static string Text(double? value) => value?.ToString(CultureInfo.InvariantCulture) ?? "";
}

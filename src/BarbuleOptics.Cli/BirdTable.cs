using System.Globalization;
using BarbuleOptics.Prediction;
using BarbuleOptics.Spectra;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Cli;

/// <summary>What birds see, as a table for a person: a row an angle and eye.</summary>
internal static class BirdTable
{
    private static readonly (string Head, int Width)[] Columns =
    [
        ("shortest", 10), ("chroma", 8), ("share", 7), ("azimuth", 9), ("elev", 7), ("contrast", 10), ("bright", 8),
    ];

    /// <summary>Writes the table; nothing where no eye can be asked.</summary>
    public static void Write(StructurePrediction prediction, TextWriter output)
    {
        BirdColor[] colors = [.. prediction.Views.SelectMany(view => view.Birds)];
        if (colors.Length == 0)
            return;
        int eyeWidth = Math.Max(3, colors.Max(color => color.System.Name.Length));
        output.WriteLine($" angle  {"eye".PadRight(eyeWidth)}{string.Concat(Columns.Select(column => column.Head.PadLeft(column.Width)))}  bird hue");
        foreach (View view in prediction.Views)
        {
            foreach (BirdColor color in view.Birds)
                output.WriteLine($"{Text(view.Incidence.Degrees, "0.##"),6}  {color.System.Name.PadRight(eyeWidth)}{Cells(color)}  {color.Hue.Term}{(color.Hue.IsNonspectral ? ", nonspectral" : "")}");
        }
        output.WriteLine();
    }

    /// <summary>What the table means and leans on.</summary>
    public static IEnumerable<string> Remarks(StructurePrediction prediction)
    {
        if (prediction.Views.All(view => view.Birds.Count == 0))
            yield break;
        yield return UltravioletPeaks(prediction.Views);
        PredictionConditions conditions = prediction.Conditions;
        string background = conditions.Background is AdaptingBackground own ? own.Name : "a flat background, a perfect mirror";
        yield return $"To birds: 'shortest' is the relative catch of the shortest cone (gray 0.25), 'share' the chroma as a share of the largest in its direction; 'contrast' (of color) and 'bright' are distances from {background}, in just noticeable differences.";
        yield return $"The light is {conditions.Illuminant.Name} for people and birds; the ultraviolet of real daylight varies most. Eyes: {string.Join(", ", conditions.Eyes.Select(eye => eye.Name))}; some of their numbers are from memory or stated shapes, as bird_vision in --json says with the sources.";
    }

    private static string Cells(BirdColor color)
    {
        string[] cells =
        [
            Text(color.RelativeCatches[0], "0.000"), Text(color.Place.Chroma, "0.000"), Text(color.Place.ChromaShare, "0.00"), Text(color.Place.AzimuthDegrees, "0.0"),
            Text(color.Place.ElevationDegrees, "0.0"), Text(color.ChromaticContrast, "0.0"), Text(color.AchromaticContrast, "0.0"),
        ];
        return string.Concat(cells.Select((cell, i) => cell.PadLeft(Columns[i].Width)));
    }

    private static string UltravioletPeaks(IReadOnlyList<View> views)
    {
        IEnumerable<string> found = views.Select(view => view.UltravioletPeak is SpectralPeak peak
            ? string.Create(CultureInfo.InvariantCulture, $"{peak.WavelengthNm:0.0} nm (prominence {peak.Prominence:0.000}) at {view.Incidence.Degrees:0.##} degrees") : "").Where(text => text.Length > 0);
        string[] all = [.. found];
        return all.Length == 0 ? "No peak below 400 nm." : $"Peaks below 400 nm, which people do not see: {string.Join(", ", all)}.";
    }

    private static string Text(double? value, string format) => value?.ToString(format, CultureInfo.InvariantCulture) ?? "-";
}

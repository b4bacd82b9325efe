using System.Globalization;
using BarbuleOptics.Color;
using BarbuleOptics.Files;
using BarbuleOptics.Files.Results;
using BarbuleOptics.Materials;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;

namespace BarbuleOptics.Cli;

/// <summary>A prediction as a short table for a person.</summary>
internal static class PredictionTable
{
    private const int TextWidth = 100, CodeWidth = 9, SwatchWidth = 3;

    private static readonly (string Head, int Width)[] Columns =
    [
        ("angle", 6), ("peak nm", 9), ("height", 8), ("width nm", 10), ("mean R", 8), ("x", 8), ("y", 8), ("L*", 7), ("C*", 7), ("h deg", 7),
    ];

    public static void Write(PredictedStructure predicted, IReadOnlyList<FileNote> notes, TextWriter output, TerminalColors colors)
    {
        StructurePrediction prediction = predicted.Prediction;
        output.WriteLine($"{prediction.Barbule.Name}  ({predicted.File})");
        output.WriteLine(Summary(prediction));
        output.WriteLine();
        output.WriteLine(Line([.. Columns.Select(column => column.Head)], Code("sRGB", null, colors), Code("bright", null, colors), "hue"));
        foreach (View view in prediction.Views)
            output.WriteLine(Row(view, colors));
        output.WriteLine();
        BirdTable.Write(prediction, output);
        DrawsTable.Write(predicted.Draws, output);
        foreach (string line in Remarks(prediction).Concat(UnknownLines.Corrections(prediction.Barbule)).Concat(UnknownLines.Of(predicted.Unknowns)).Concat(DrawsTable.Remarks(predicted.Draws)).Concat(notes.Select(note => $"Warning {note.Code}: {note}.")).Concat(WarningLines.Of([.. prediction.Warnings, .. predicted.Draws?.Warnings ?? []])))
            Wrap(line, output);
    }

    private static string Summary(StructurePrediction prediction)
    {
        string how = prediction.IsRigorous
            ? "grating solver, rigorous for this section"
            : string.Create(CultureInfo.InvariantCulture, $"multilayer solver{(prediction.Mixing is null ? "" : $", {prediction.Mixing} mixing")}, {prediction.FilmCount} films");
        PredictionConditions conditions = prediction.Conditions;
        return string.Create(CultureInfo.InvariantCulture,
            $"{how}, {PolarizationNames.Of(conditions.Polarization)}, {conditions.Illuminant.Name}, {StandardObservers.NameOf(conditions.Observer)}, error estimate {prediction.ErrorEstimate:0.0e+0}");
    }

    private static string Row(View view, TerminalColors colors)
    {
        SpectralPeak? peak = view.Features.MainPeak;
        string[] cells =
        [
            Text(view.Incidence.Degrees, "0.##"), Text(peak?.WavelengthNm, "0.0"), Text(peak?.Reflectance, "0.0000"),
            Text(peak?.HalfProminenceWidthNm, "0.0"), Text(view.Features.MeanReflectance, "0.0000"),
            Text(view.Color?.Chromaticity.X, "0.0000"), Text(view.Color?.Chromaticity.Y, "0.0000"), Text(view.Color?.Lab.L, "0.0"),
            Text(view.Color?.Lab.Chroma, "0.0"), Text(view.Color?.Lab.HueDegrees, "0.0"),
        ];
        SrgbColor? computed = view.Color?.Srgb, brightened = view.Color?.SrgbBrightened;
        return Line(cells, Code(computed?.Hex ?? "-", computed, colors), Code(brightened?.Hex ?? "-", brightened, colors), view.Color?.HueTerm ?? "-");
    }

    private static string Line(string[] cells, string computed, string brightened, string hue)
        => string.Concat(cells.Select((cell, i) => cell.PadLeft(Columns[i].Width))) + computed + brightened + "  " + hue;

    /// <summary>The code of a color, behind a block of it where the terminal shows colors.</summary>
    private static string Code(string code, SrgbColor? color, TerminalColors colors)
    {
        if (!colors.AreShown)
            return code.PadLeft(CodeWidth);
        string swatch = color is SrgbColor shown ? colors.Block(shown, SwatchWidth) : new string(' ', SwatchWidth);
        return "  " + swatch + code.PadLeft(CodeWidth - 1);
    }

    private static IEnumerable<string> Remarks(StructurePrediction prediction)
    {
        if (FollowedElsewhere(prediction) is string followed)
            yield return followed;
        if (prediction.Track.Shift is BlueShift shift)
        {
            yield return string.Create(CultureInfo.InvariantCulture,
                $"The main peak of the smallest angle moves as for an effective index of {shift.EffectiveIndex:0.000} ({shift.NormalWavelengthNm:0.0} nm at normal incidence, {shift.ResidualNm:0.00} nm rms).");
        }
        if (prediction.IsRigorous)
            yield return $"'Rigorous' means: solved without averaging, for {prediction.Picture}.";
        if (LayerModelLine.Of(prediction) is string compared)
            yield return compared;
        foreach (string line in SignalLines.Of(prediction))
            yield return line;
        WavelengthGrid grid = prediction.Conditions.Wavelengths;
        if (grid.StartNm > SpectrumFeatures.UltravioletStartNm || grid.StopNm < SpectrumFeatures.VisibleEndNm)
            yield return string.Create(CultureInfo.InvariantCulture, $"'mean R' is over the part of 300-700 nm that {grid.StartNm}-{grid.StopNm} nm covers.");
        yield return $"Materials: {string.Join(", ", prediction.Materials.Select(Describe))}.";
        string reference = prediction.Conditions.Instrument is null ? "Reflectance 1 is a perfect mirror. " : "";
        yield return $"{reference}'width' is at half prominence; 'bright' is the color at a lightness a screen shows well.";
        foreach (string remark in BirdTable.Remarks(prediction))
            yield return remark;
        yield return StructurePrediction.Scope;
    }

    private static string Describe(Material material)
        => material.LeastNm <= WavelengthGrid.LeastNm && material.MostNm >= WavelengthGrid.MostNm
            ? material.Name
            : string.Create(CultureInfo.InvariantCulture, $"{material.Name} (published for {material.LeastNm}-{material.MostNm} nm)");

    /// <summary>Where the peak that is followed over angle is not the highest one of the table.</summary>
    private static string? FollowedElsewhere(StructurePrediction prediction)
    {
        Dictionary<double, SpectralPeak?> highest = prediction.Views.ToDictionary(view => view.Incidence.Degrees, view => view.Features.MainPeak);
        if (prediction.Track.Sightings.All(sighting => sighting.Peak == highest[sighting.Incidence.Degrees]))
            return null;
        IEnumerable<string> places = prediction.Track.Sightings.Select(sighting => $"{Text(sighting.Peak?.WavelengthNm, "0.0")} at {Text(sighting.Incidence.Degrees, "0.##")}");
        return $"The main peak of the smallest angle, followed by continuity, lies at (nm at degrees): {string.Join(", ", places)}.";
    }

    private static string Text(double? value, string format) => value?.ToString(format, CultureInfo.InvariantCulture) ?? "-";

    /// <summary>A text in lines of a readable length, the second and later ones set in.</summary>
    public static void Wrap(string text, TextWriter output)
    {
        string line = "";
        foreach (string word in text.Split(' '))
        {
            if (line.Length > 0 && line.Length + 1 + word.Length > TextWidth)
            {
                output.WriteLine(line);
                line = "  " + word;
            }
            else
            {
                line = line.Length == 0 ? word : line + " " + word;
            }
        }
        output.WriteLine(line);
    }
}

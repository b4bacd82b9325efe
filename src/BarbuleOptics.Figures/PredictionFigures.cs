using BarbuleOptics.Figures.Colors;
using BarbuleOptics.Figures.Curves;
using BarbuleOptics.Figures.Sections;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Figures;

/// <summary>The figures that go with every prediction, under the names that their files have.</summary>
public static class PredictionFigures
{
    private const string Reflectance = "reflectance";
    private const string Section = "section";
    private const string Chromaticity = "chromaticity";
    private const string BirdSpace = "bird-space";
    private const string Swatches = "swatches";

    private static readonly string[] Names = [Reflectance, Section, Chromaticity, BirdSpace, Swatches];

    private static readonly FigureFormat[] Formats = [FigureFormat.Svg, FigureFormat.Pdf, FigureFormat.Png];

    /// <summary>The names of all files, in the order in which <see cref="Render"/> returns them.</summary>
    public static IReadOnlyList<string> FileNames { get; } = [.. Names.SelectMany(name => Formats.Select(format => Name(name, format)))];

    /// <summary>Every figure in every format, drawn on as many threads as the prediction was given; the bytes do not depend on them.</summary>
    /// <param name="prediction">What to draw.</param>
    /// <param name="size">Width of all figures.</param>
    /// <param name="overlays">Whether the reflectance figure also holds, dashed, what the layer model says beside the rigorous solution or the reverse.</param>
    /// <param name="cancellation">Ends the drawing early with an <see cref="OperationCanceledException"/>.</param>
    public static IReadOnlyList<(string FileName, byte[] Bytes)> Render(StructurePrediction prediction, FigureSize size, bool overlays = false, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        var figures = new Lazy<Figure>[] { new(() => ReflectanceFigure.Draw(prediction, size, overlays)), new(() => SectionFigure.Draw(prediction, size)),
            new(() => ChromaticityFigure.Draw(prediction, size)), new(() => BirdSpaceFigure.Draw(prediction, size)), new(() => SwatchFigure.Draw(prediction, size)) };
        var files = new (string, byte[])[FileNames.Count];
        var options = new ParallelOptions { MaxDegreeOfParallelism = prediction.Conditions.Threads, CancellationToken = cancellation };
        Parallel.For(0, files.Length, options, file =>
            files[file] = (FileNames[file], figures[file / Formats.Length].Value.Render(Formats[file % Formats.Length])));
        return files;
    }

    private static string Name(string figure, FigureFormat format) => format switch
    {
        FigureFormat.Svg => figure + ".svg",
        FigureFormat.Pdf => figure + ".pdf",
        _ => figure + ".png",
    };
}

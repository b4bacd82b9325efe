using BarbuleOptics.Figures.Curves;
using BarbuleOptics.Figures.Sections;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Figures;

/// <summary>The figures that go with every prediction, under the names that their files have.</summary>
public static class PredictionFigures
{
    private const string Reflectance = "reflectance";
    private const string Section = "section";

    private static readonly FigureFormat[] Formats = [FigureFormat.Svg, FigureFormat.Pdf, FigureFormat.Png];

    /// <summary>The names of all files, in the order in which <see cref="Render"/> yields them.</summary>
    public static IReadOnlyList<string> FileNames { get; } = [.. Formats.Select(format => Name(Reflectance, format)), .. Formats.Select(format => Name(Section, format))];

    /// <summary>Every figure in every format, one file at a time.</summary>
    public static IEnumerable<(string FileName, byte[] Bytes)> Render(StructurePrediction prediction, FigureSize size)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        return Each(prediction, size);
    }

    private static IEnumerable<(string FileName, byte[] Bytes)> Each(StructurePrediction prediction, FigureSize size)
    {
        Figure reflectance = ReflectanceFigure.Draw(prediction, size);
        foreach (FigureFormat format in Formats)
            yield return (Name(Reflectance, format), reflectance.Render(format));
        Figure section = SectionFigure.Draw(prediction, size);
        foreach (FigureFormat format in Formats)
            yield return (Name(Section, format), section.Render(format));
    }

    private static string Name(string figure, FigureFormat format) => format switch
    {
        FigureFormat.Svg => figure + ".svg",
        FigureFormat.Pdf => figure + ".pdf",
        _ => figure + ".png",
    };
}

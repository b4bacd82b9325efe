using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures.Ensembles;

namespace BarbuleOptics.Figures;

/// <summary>The figure of a sensitivity analysis, under the names that its files have.</summary>
public static class SensitivityFigures
{
    private static readonly FigureFormat[] Formats = [FigureFormat.Svg, FigureFormat.Pdf, FigureFormat.Png];

    /// <summary>The names of all files.</summary>
    public static IReadOnlyList<string> FileNames { get; } = ["sensitivity.svg", "sensitivity.pdf", "sensitivity.png"];

    /// <summary>The figure in every format.</summary>
    /// <param name="result">The analysis.</param>
    /// <param name="name">What the structure is called.</param>
    /// <param name="size">Printed width.</param>
    public static IReadOnlyList<(string FileName, byte[] Bytes)> Render(SensitivityResult result, string name, FigureSize size)
    {
        ArgumentNullException.ThrowIfNull(result);
        Figure figure = SensitivityFigure.Draw(result, name, size);
        return [.. Formats.Select((format, i) => (FileNames[i], figure.Render(format)))];
    }
}

using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures.Ensembles;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Figures;

/// <summary>The figure that goes with draws, under the names that its files have.</summary>
public static class EnsembleFigures
{
    private static readonly FigureFormat[] Formats = [FigureFormat.Svg, FigureFormat.Pdf, FigureFormat.Png];

    /// <summary>The names of all files.</summary>
    public static IReadOnlyList<string> FileNames { get; } = ["bands.svg", "bands.pdf", "bands.png"];

    /// <summary>The bands of the reflectance in every format.</summary>
    /// <param name="prediction">The mean geometry.</param>
    /// <param name="ensemble">Its draws.</param>
    /// <param name="size">Printed width.</param>
    public static IReadOnlyList<(string FileName, byte[] Bytes)> Render(StructurePrediction prediction, EnsemblePrediction ensemble, FigureSize size)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        ArgumentNullException.ThrowIfNull(ensemble);
        Figure figure = BandFigure.Draw(prediction, ensemble, size);
        return [.. Formats.Select((format, i) => (FileNames[i], figure.Render(format)))];
    }
}

using System.Globalization;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Layering;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Figures.Sections;

/// <summary>The section that a prediction was computed for, to scale, with the light.</summary>
public static class SectionFigure
{
    private const double MarginPt = 4;
    private const double GapPt = 6;
    private const double MostDepthPt = 300;

    /// <summary>Lays the figure out.</summary>
    /// <remarks>What is too deep or too wide for the page is cut with torn edges, and a label says how much. The surround and a backing
    /// without end are drawn as far as there is room.</remarks>
    public static Figure Draw(StructurePrediction prediction, FigureSize size)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        double width = size.WidthPt;
        double labels = Math.Clamp(0.29 * width, 60, 105);
        var layout = SectionLayout.Fit(
            prediction.Section, MarginPt, MarginPt, width - 2 * MarginPt - labels - LabelColumn.LeaderPt, Math.Min(MostDepthPt, 0.85 * width));

        var elements = new List<PageElement>();
        var fills = new MaterialFills(prediction.Section);
        new SectionPanes(layout, fills).Draw(elements);
        int rays = LightArrows.Draw(elements, layout, prediction.Conditions.Incidences, fills.Of(prediction.Section.Surround).Color);
        double cells = CellMarks.Draw(elements, layout);
        double column = LabelColumn.Draw(elements, SectionLabels.Of(layout, prediction.Barbule), layout.Box, width - MarginPt);
        double bottom = ScaleBar.Draw(elements, new(MarginPt, cells + GapPt), layout.PtPerNm);
        bottom = NoteBlock.Add(elements, Notes(prediction, rays), MarginPt, width - MarginPt, Math.Max(bottom, column) + GapPt);
        return new Figure(new Page($"Section of {prediction.Barbule.Name}", width, bottom + MarginPt, elements));
    }

    private static IEnumerable<string> Notes(StructurePrediction prediction, int rays)
    {
        Section section = prediction.Section;
        yield return "To scale, at the central measurements.";
        if (section.Runs.Count > 0)
        {
            yield return section switch
            {
                { IsAcross: true } => "Axis across: bodies are normal to the page, which is the plane of incidence.",
                { IsAlong: true } => "Axis along: bodies are normal to the page, and so is the plane of incidence; light tilts along them.",
                _ => string.Create(CultureInfo.InvariantCulture, $"Axis {section.Axis.Degrees:0.##}°: bodies are normal to the page, and the plane of incidence is turned out of it by that angle; directions are drawn as seen on the page."),
            };
        }
        ValueList<Angle> angles = prediction.Conditions.Incidences;
        if (!section.IsAlong && rays < angles.Count)
            yield return $"{angles.Count} angles of incidence, {LightArrows.Range(angles)}; {rays} {(rays == 1 ? "is" : "are")} drawn.";
    }
}

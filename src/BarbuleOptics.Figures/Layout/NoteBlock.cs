using BarbuleOptics.Figures.Drawing;

namespace BarbuleOptics.Figures.Layout;

/// <summary>Small print under a figure.</summary>
internal static class NoteBlock
{
    private const double LinePt = Ink.SmallPt * FigureFont.LineHeight;

    /// <summary>Adds the sentences, wrapped; the bottom of the last line.</summary>
    public static double Add(List<PageElement> elements, IEnumerable<string> sentences, double left, double right, double top)
    {
        double baseline = top + FigureFont.CapHeight * Ink.SmallPt;
        double bottom = top;
        foreach (string line in TextWrap.Lines(string.Join(" ", sentences), Ink.SmallPt, right - left))
        {
            elements.Add(new TextRun(line, new Point(left, baseline), Ink.SmallPt, TextAlign.Start, Ink.Note));
            bottom = baseline + FigureFont.Descent * Ink.SmallPt;
            baseline += LinePt;
        }
        return bottom;
    }
}

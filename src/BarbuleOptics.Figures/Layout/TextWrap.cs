using BarbuleOptics.Figures.Drawing;

namespace BarbuleOptics.Figures.Layout;

/// <summary>Breaks text into lines of limited width.</summary>
internal static class TextWrap
{
    private const string Ellipsis = "…";

    /// <summary>The lines; a word that is wider than a line is cut off with an ellipsis.</summary>
    public static IReadOnlyList<string> Lines(string text, double sizePt, double widthPt)
    {
        var lines = new List<string>();
        string line = "";
        foreach (string word in text.Split(' ', StringSplitOptions.RemoveEmptyEntries))
        {
            string longer = line.Length == 0 ? word : line + " " + word;
            if (line.Length > 0 && FigureFont.WidthPt(longer, sizePt) > widthPt)
            {
                lines.Add(line);
                longer = word;
            }
            line = Cut(longer, sizePt, widthPt);
        }
        if (line.Length > 0)
            lines.Add(line);
        return lines;
    }

    private static string Cut(string text, double sizePt, double widthPt)
    {
        if (FigureFont.WidthPt(text, sizePt) <= widthPt)
            return text;
        int length = text.Length - 1;
        while (length > 1 && FigureFont.WidthPt(text[..length] + Ellipsis, sizePt) > widthPt)
            length--;
        return text[..length] + Ellipsis;
    }
}

using System.Globalization;
using BarbuleOptics.Figures.Drawing;

namespace BarbuleOptics.Figures.Sections;

/// <summary>A bar of a round length.</summary>
internal static class ScaleBar
{
    private const double WantedPt = 55;
    private const double ThickPt = 1.4;

    /// <summary>Draws the bar with its length; the bottom.</summary>
    public static double Draw(List<PageElement> elements, Point topLeft, double ptPerNm)
    {
        double lengthNm = RoundNm(WantedPt / ptPerNm);
        double y = topLeft.Y + Ink.SmallPt / 2, right = topLeft.X + lengthNm * ptPerNm;
        elements.Add(new StrokedShape(Shape.Line(new(topLeft.X, y), new(right, y)), new Stroke(Ink.Text, ThickPt), "scale-bar"));
        elements.Add(TextRun.CenteredAt(lengthNm.ToString("0.######", CultureInfo.InvariantCulture) + " nm", new(right + 4, y), Ink.SmallPt, TextAlign.Start, Ink.Text));
        return topLeft.Y + Ink.SmallPt;
    }

    /// <summary>The longest 1, 2 or 5 times a power of ten that is not above <paramref name="mostNm"/>.</summary>
    public static double RoundNm(double mostNm)
    {
        double decade = Math.Pow(10, Math.Floor(Math.Log10(mostNm)));
        double share = mostNm / decade;
        return decade * (share >= 5 ? 5 : share >= 2 ? 2 : 1);
    }
}

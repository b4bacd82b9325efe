using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Figures.Sections;

/// <summary>Scale and place of a section on the page; the scale is the same in both directions.</summary>
internal sealed class SectionLayout
{
    /// <summary>Height of the surround, which has no end, in points.</summary>
    public const double SurroundPt = 52;

    private const double BackingPt = 22;
    private const double MostCells = 9;
    private const double FewestCells = 2.6;
    private const double WholeCells = 1.3;
    private const double LeastBodyPt = 3.5;
    private const double LeastFilmPt = 1.5;
    private const double FilmHeightShare = 0.8;

    private SectionLayout(Section section, SectionAxis across, SectionAxis depth, double ptPerNm, double bottomNm)
        => (Section, Across, Depth, PtPerNm, BottomNm) = (section, across, depth, ptPerNm, bottomNm);

    public Section Section { get; }

    /// <summary>The axis along the surface; 0 is the middle of a body of the first row.</summary>
    public SectionAxis Across { get; }

    /// <summary>The axis of depth; the surround lies at negative depths.</summary>
    public SectionAxis Depth { get; }

    public double PtPerNm { get; }

    /// <summary>Depth of the last face, in nm.</summary>
    public double BottomNm { get; }

    public Box Box => new(Across.StartPt, Depth.StartPt, Across.EndPt, Depth.EndPt);

    /// <summary>Place of a point that is drawn.</summary>
    public Point At(double xNm, double zNm) => new(Across.At(xNm), Depth.At(zNm));

    /// <summary>Fits a section into a width; the height is at most <paramref name="mostDepthPt"/> and what surround and backing take.</summary>
    public static SectionLayout Fit(Section section, double leftPt, double topPt, double widthPt, double mostDepthPt)
    {
        double bottomNm = Math.Max(1, section.DepthNm + (section.Back?.Thickness.CentralNm ?? 0));
        double worthNm = bottomNm - DepthCuts.SpareNm(section, bottomNm);
        double scale = section.Runs.Count > 0 ? ScaleOfRows(section, worthNm, widthPt, mostDepthPt) : ScaleOfFilms(section, worthNm, widthPt, mostDepthPt);
        IReadOnlyList<(double FromNm, double ToNm)> cuts = DepthCuts.Find(section, bottomNm, mostDepthPt / scale, scale);
        var depth = SectionAxis.Create(-SurroundPt / scale, bottomNm + BackingPt / scale, cuts, topPt, scale);
        return new SectionLayout(section, AcrossOf(section, leftPt, widthPt, scale), depth, scale, bottomNm);
    }

    private static double ScaleOfRows(Section section, double bottomNm, double widthPt, double mostDepthPt)
    {
        double spacingNm = section.Runs.Max(run => run.SpacingNm);
        double scale = Math.Clamp(mostDepthPt / bottomNm, widthPt / (MostCells * spacingNm), widthPt / (FewestCells * spacingNm));
        double thinnestNm = section.Runs.Min(run => run.Cell.Min(body => 2 * Math.Min(body.Outer.HalfHeightNm, body.Outer.HalfWidthNm)));
        return Math.Max(scale, LeastBodyPt / thinnestNm);
    }

    private static double ScaleOfFilms(Section section, double bottomNm, double widthPt, double mostDepthPt)
    {
        double scale = Math.Min(mostDepthPt, FilmHeightShare * widthPt) / bottomNm;
        double thinnestNm = section.Films.Select(film => film.ThicknessNm).Where(thickness => thickness > 0).DefaultIfEmpty(bottomNm).Min();
        // A film of atomic thickness becomes a hairline rather than cut all else away.
        return Math.Max(scale, Math.Min(LeastFilmPt / thinnestNm, 4 * mostDepthPt / bottomNm));
    }

    private static SectionAxis AcrossOf(Section section, double leftPt, double widthPt, double scale)
    {
        double seenNm = widthPt / scale;
        double spacingNm = section.Runs.Count > 0 ? section.Runs.Max(run => run.SpacingNm) : 0;
        if (seenNm >= WholeCells * spacingNm)
            return SectionAxis.Create(-seenNm / 2, seenNm / 2, [], leftPt, scale);
        // Wider than the page: both ends of a cell, without its middle.
        seenNm = (widthPt - SectionAxis.BreakPt) / scale;
        double endNm = spacingNm / 2 + 0.15 * seenNm, cutNm = endNm - seenNm / 2;
        return SectionAxis.Create(-endNm, endNm, [(-cutNm, cutNm)], leftPt, scale);
    }
}

namespace BarbuleOptics.Layering;

/// <summary>The section from the surface down as intervals; equal ones are kept once and named by number.</summary>
public sealed class DepthProfile
{
    /// <summary>Edges closer than this, in nm, are one edge: touching bodies leave no film between them.</summary>
    private const double SameEdgeNm = 1e-6;

    private DepthProfile(Section section, IReadOnlyList<DepthInterval> kinds, IReadOnlyList<int> order)
    {
        Section = section;
        Kinds = kinds;
        Order = order;
    }

    /// <summary>The section.</summary>
    public Section Section { get; }

    /// <summary>Number of different intervals.</summary>
    public int KindCount => Kinds.Count;

    internal IReadOnlyList<DepthInterval> Kinds { get; }

    /// <summary>Number of the kind of each interval, from the surface down.</summary>
    internal IReadOnlyList<int> Order { get; }

    /// <summary>Divides <paramref name="section"/> at every top and bottom of a body, a core or a film.</summary>
    public static DepthProfile Of(Section section)
    {
        ArgumentNullException.ThrowIfNull(section);
        double[] edges = Edges(section);
        SectionFilm[] films = [.. section.Films.OrderBy(film => film.TopNm)];
        var kinds = new List<DepthInterval>();
        var numbers = new Dictionary<string, int>();
        var order = new List<int>();
        for (int i = 0; i + 1 < edges.Length; i++)
        {
            DepthInterval interval = Between(section, films, edges[i], edges[i + 1]);
            string key = interval.Key();
            if (!numbers.TryGetValue(key, out int number))
            {
                number = numbers[key] = kinds.Count;
                kinds.Add(interval);
            }
            order.Add(number);
        }
        return new DepthProfile(section, kinds, order);
    }

    private static double[] Edges(Section section)
    {
        var edges = new List<double> { 0, section.DepthNm };
        foreach (SectionFilm film in section.Films)
            edges.AddRange([film.TopNm, film.BottomNm]);
        foreach (SectionRun run in section.Runs)
        {
            foreach (SectionRow row in run.Rows)
            {
                foreach (CellBody body in run.Cell)
                {
                    double centerNm = row.CenterNm + body.ZNm;
                    edges.AddRange([centerNm - body.Outer.HalfHeightNm, centerNm + body.Outer.HalfHeightNm]);
                    if (body.Core is Outline core)
                        edges.AddRange([centerNm - core.HalfHeightNm, centerNm + core.HalfHeightNm]);
                }
            }
        }
        edges.Sort();
        var distinct = new List<double>();
        foreach (double edge in edges)
        {
            if (edge >= 0 && edge <= section.DepthNm && (distinct.Count == 0 || edge - distinct[^1] > SameEdgeNm))
                distinct.Add(edge);
        }
        return [.. distinct];
    }

    private static DepthInterval Between(Section section, ReadOnlySpan<SectionFilm> films, double topNm, double bottomNm)
    {
        double middleNm = (topNm + bottomNm) / 2;
        int background = BackgroundAt(films, middleNm);
        var met = new List<(SectionRun Run, PlacedOutline Placed)>();
        foreach (SectionRun run in section.Runs)
        {
            (int first, int last) = RowsAt(run, middleNm);
            for (int row = first; row <= last; row++)
            {
                foreach (CellBody body in run.Cell)
                {
                    double centerNm = run.Rows[row].CenterNm + body.ZNm;
                    if (Math.Abs(middleNm - centerNm) < body.Outer.HalfHeightNm)
                        met.Add((run, new PlacedOutline(body, run.Rows[row].ShiftNm + body.XNm, centerNm - topNm)));
                }
            }
        }
        if (met.Count == 0)
            return new DepthInterval(bottomNm - topNm, background, 1, []);
        // Two runs whose spacings have no common period never overlap in depth (LayerOverlap), so any two here have one.
        double periodNm = CommonPeriod.OfPairwise([.. met.Select(item => item.Run.SpacingNm)]);
        var bodies = new List<PlacedOutline>();
        foreach ((SectionRun run, PlacedOutline placed) in met)
        {
            int images = (int)Math.Round(periodNm / run.SpacingNm);
            for (int image = 0; image < images; image++)
                bodies.Add(placed with { XNm = Wrap(placed.XNm + image * run.SpacingNm, periodNm) });
        }
        return new DepthInterval(bottomNm - topNm, background, periodNm, bodies);
    }

    // Films lie one below the other, so the last that starts above a depth is the one there, if any is.
    private static int BackgroundAt(ReadOnlySpan<SectionFilm> films, double depthNm)
    {
        int low = 0, high = films.Length;
        while (low < high)
        {
            int middle = (low + high) / 2;
            if (films[middle].TopNm < depthNm)
                low = middle + 1;
            else
                high = middle;
        }
        return low > 0 && depthNm < films[low - 1].BottomNm ? films[low - 1].Material : Section.Matrix;
    }

    // Rows lie at equal steps; one more on each side covers rounding.
    private static (int First, int Last) RowsAt(SectionRun run, double depthNm)
    {
        double firstNm = run.Rows[0].CenterNm;
        if (run.Rows.Count == 1 || run.PitchNm <= 0)
            return depthNm < firstNm + run.CellTopNm || depthNm > run.Rows[^1].CenterNm + run.CellBottomNm ? (0, -1) : (0, run.Rows.Count - 1);
        double first = Math.Floor((depthNm - run.CellBottomNm - firstNm) / run.PitchNm) - 1;
        double last = Math.Ceiling((depthNm - run.CellTopNm - firstNm) / run.PitchNm) + 1;
        return ((int)Math.Clamp(first, 0, run.Rows.Count), (int)Math.Clamp(last, -1, run.Rows.Count - 1));
    }

    private static double Wrap(double xNm, double periodNm) => xNm - periodNm * Math.Floor(xNm / periodNm);
}

using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Turns rows into elements, each kind once.</summary>
internal sealed class ElementKinds(Section section)
{
    /// <summary>Rows up to this number that share depths are one slab; more are cut at their centers, where equal pieces repeat.</summary>
    private const int MostUncutRows = 2;

    private readonly List<ElementKind> _kinds = [];
    private readonly Dictionary<ElementKind, int> _numbers = [];

    /// <summary>All kinds.</summary>
    public ElementKind[] All => [.. _kinds];

    /// <summary>The elements from the top down.</summary>
    public List<PlannedElement> Place(RowMethods methods)
    {
        IEnumerable<PlannedRow> rows = section.Runs.SelectMany(run => PlannedRow.Of(run, methods));
        List<List<PlannedRow>> clusters = RowClusters.Of(rows);
        Dictionary<RodKind, double> reaches = Reaches(clusters);
        var elements = new List<PlannedElement>();
        foreach (List<PlannedRow> cluster in clusters)
        {
            if (cluster is [{ Rods: not null } rod])
                elements.Add(PlaceRods(rod, reaches));
            else
                PlaceSlabs(cluster, elements);
        }
        return elements;
    }

    // One reach for all rows of one kind of rod, so that they share one element: planes reach up to the rods, or half way to the next centers.
    private static Dictionary<RodKind, double> Reaches(List<List<PlannedRow>> clusters)
    {
        PlannedRow[] rods = [.. clusters.Where(cluster => cluster is [{ Rods: not null }]).Select(cluster => cluster[0]).OrderBy(rod => rod.CenterNm)];
        var reaches = new Dictionary<RodKind, double>();
        for (int i = 0; i < rods.Length; i++)
        {
            double reachNm = rods[i].RadiusNm;
            if (i > 0)
                reachNm = Math.Min(reachNm, (rods[i].CenterNm - rods[i - 1].CenterNm) / 2);
            if (i + 1 < rods.Length)
                reachNm = Math.Min(reachNm, (rods[i + 1].CenterNm - rods[i].CenterNm) / 2);
            RodKind kind = KindOf(rods[i], 0);
            reaches[kind] = reaches.TryGetValue(kind, out double sofarNm) ? Math.Min(sofarNm, reachNm) : reachNm;
        }
        return reaches;
    }

    private static RodKind KindOf(PlannedRow row, double reachNm)
    {
        CellBody[] rods = row.Rods!;
        int parts = RodCells.PartsOf(rods, row.Run.SpacingNm);
        CellRod[] places = [.. rods.Select(rod => new CellRod(
            RodCells.PlaceOf(rods[0], rod, row.Run.SpacingNm, parts), rod.Outer, rod.Core,
            rod.Material, rod.Core is null ? rod.Material : rod.CoreMaterial))];
        return new RodKind(row.Run.SpacingNm, ValueList.Create<CellRod>(places), parts, reachNm);
    }

    private PlannedElement PlaceRods(PlannedRow row, Dictionary<RodKind, double> reaches)
    {
        double reachNm = reaches[KindOf(row, 0)];
        RodKind kind = KindOf(row, Math.Round(reachNm, 9));
        return new PlannedElement(kind, NumberOf(kind), row.CenterNm - reachNm, row.CenterNm, row.Row.ShiftNm + row.Rods![0].XNm, row.TopNm, row.BottomNm);
    }

    private void PlaceSlabs(List<PlannedRow> cluster, List<PlannedElement> elements)
    {
        double topNm = cluster.Min(row => row.TopNm), bottomNm = cluster.Max(row => row.BottomNm);
        double[] centersNm = [.. cluster.Select(row => Math.Round(row.Row.CenterNm, 9)).Distinct().Order()];
        double[] planesNm = centersNm.Length > MostUncutRows ? [topNm, .. centersNm, bottomNm] : [topNm, bottomNm];
        double periodNm = CommonPeriod.OfPairwise([.. cluster.Select(row => row.Run.SpacingNm)]);
        for (int i = 0; i + 1 < planesNm.Length; i++)
        {
            (double shiftNm, PlacedOutline[] bodies) = Between(cluster, planesNm[i], planesNm[i + 1], periodNm);
            bool isCut = planesNm.Length > 2;
            var kind = new SlabKind(periodNm, Math.Round(planesNm[i + 1] - planesNm[i], 9), isCut, ValueList.Create<PlacedOutline>(bodies));
            double bodiesTopNm = isCut && i > 0 ? planesNm[i] : topNm, bodiesBottomNm = isCut && i + 2 < planesNm.Length ? planesNm[i + 1] : bottomNm;
            elements.Add(new PlannedElement(
                kind, NumberOf(kind), planesNm[i], (planesNm[i] + planesNm[i + 1]) / 2, shiftNm, bodiesTopNm, bodiesBottomNm));
        }
    }

    /// <summary>The bodies that reach between two planes, their places along the surface counted from the first one's.</summary>
    private static (double ShiftNm, PlacedOutline[] Bodies) Between(List<PlannedRow> cluster, double topNm, double bottomNm, double periodNm)
    {
        const double touchingNm = 1e-7;
        double? shiftNm = null;
        var bodies = new List<PlacedOutline>();
        foreach (PlannedRow row in cluster)
        {
            int images = (int)Math.Round(periodNm / row.Run.SpacingNm);
            foreach (CellBody body in row.Bodies)
            {
                double centerNm = row.Row.CenterNm + body.ZNm - topNm;
                if (centerNm + body.Outer.HalfHeightNm <= touchingNm || centerNm - body.Outer.HalfHeightNm >= bottomNm - topNm - touchingNm)
                    continue;
                double xNm = row.Row.ShiftNm + body.XNm;
                shiftNm ??= xNm;
                for (int image = 0; image < images; image++)
                    bodies.Add(new PlacedOutline(Anonymous(body), Wrap(xNm - shiftNm.Value + image * row.Run.SpacingNm, periodNm), Math.Round(centerNm, 9)));
            }
        }
        return (shiftNm ?? 0, [.. bodies]);
    }

    // Where the body lies is said by the placing alone, so that equal pieces compare equal.
    private static CellBody Anonymous(CellBody body) => body with { XNm = 0, ZNm = 0 };

    private static double Wrap(double xNm, double periodNm)
    {
        double wrapped = Math.Round(xNm - periodNm * Math.Floor(xNm / periodNm), 9);
        return wrapped >= Math.Round(periodNm, 9) ? 0 : wrapped;
    }

    private int NumberOf(ElementKind kind)
    {
        if (!_numbers.TryGetValue(kind, out int number))
        {
            number = _numbers[kind] = _kinds.Count;
            _kinds.Add(kind);
        }
        return number;
    }
}

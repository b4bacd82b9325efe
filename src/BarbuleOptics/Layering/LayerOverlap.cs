namespace BarbuleOptics.Layering;

/// <summary>Finds layers that reach into each other, out of the surface or into the backing.</summary>
/// <remarks>Rows of spacings without a common period meet at every sideways offset somewhere, so there the worst one counts.</remarks>
internal static class LayerOverlap
{
    /// <summary>The first problem from the outside in, at the gap that would mend it (what lies deeper follows from it); null when there is none.</summary>
    public static GapShortage? Find(Section section)
    {
        List<Extent> extents = [.. section.Runs.Select(run => new Extent(run)), .. section.Films.GroupBy(film => film.LayerNumber).Select(films => new Extent([.. films]))];
        extents.Sort((a, b) => a.Layer.CompareTo(b.Layer));
        double deepestAboveNm = extents.Count == 0 ? 0 : extents[0].BottomNm;
        for (int lower = 1; lower < extents.Count; lower++)
        {
            if (extents[lower].TopNm < -SectionBuilder.TouchingNm)
                return new GapShortage(extents[lower].Layer - 1, FormattableString.Invariant($"layer {extents[lower].Layer} reaches {-extents[lower].TopNm:0.###} nm out of the surface"), -extents[lower].TopNm);
            for (int upper = 0; upper < lower && deepestAboveNm > extents[lower].TopNm; upper++)
            {
                double missingNm = MissingNm(extents[upper], extents[lower]);
                if (missingNm > SectionBuilder.TouchingNm)
                    return new GapShortage(extents[lower].Layer - 1, FormattableString.Invariant($"layers {extents[upper].Layer} and {extents[lower].Layer} overlap"), missingNm);
            }
            deepestAboveNm = Math.Max(deepestAboveNm, extents[lower].BottomNm);
        }
        double deepestNm = extents.Count == 0 ? section.CortexNm : extents.Max(extent => extent.BottomNm);
        return deepestNm > section.DepthNm + SectionBuilder.TouchingNm
            ? new GapShortage(extents[^1].Layer, "bodies reach into the backing", deepestNm - section.DepthNm)
            : null;
    }

    /// <summary>How much deeper the lower layer would have to lie, in nm; 0 or less when they are clear.</summary>
    private static double MissingNm(Extent upper, Extent lower)
    {
        if (upper.BottomNm <= lower.TopNm)
            return 0;
        double missingNm = 0;
        foreach (Slab above in upper.Slabs)
        {
            foreach (Slab below in lower.Slabs)
            {
                if (above.BottomNm > below.TopNm && below.BottomNm > above.TopNm)
                    missingNm = Math.Max(missingNm, MissingNm(upper.Run, above, lower.Run, below));
                else if (below.BottomNm <= above.TopNm)
                    missingNm = Math.Max(missingNm, above.BottomNm - below.TopNm);
            }
        }
        return missingNm;
    }

    private static double MissingNm(SectionRun? upper, Slab above, SectionRun? lower, Slab below)
    {
        if (upper is null || lower is null)
            return above.BottomNm - below.TopNm;
        double? period = CommonPeriod.Of(upper.SpacingNm, lower.SpacingNm);
        double needed = double.NegativeInfinity;
        foreach (CellBody first in upper.Cell)
        {
            foreach (CellBody second in lower.Cell)
                needed = Math.Max(needed, NeededNm(first, second, upper.SpacingNm, lower.SpacingNm, below.ShiftNm - above.ShiftNm, period));
        }
        return needed - (below.CenterNm - above.CenterNm);
    }

    private static double NeededNm(CellBody first, CellBody second, double upperSpacingNm, double lowerSpacingNm, double shiftNm, double? periodNm)
    {
        if (periodNm is not double period)
            return first.BottomNm - second.TopNm;
        double needed = double.NegativeInfinity;
        int upperCells = (int)Math.Round(period / upperSpacingNm), lowerCells = (int)Math.Round(period / lowerSpacingNm);
        for (int i = 0; i < upperCells; i++)
        {
            for (int j = 0; j < lowerCells; j++)
                needed = Math.Max(needed, RowNesting.LeastDepthNm(first, second, shiftNm + j * lowerSpacingNm - i * upperSpacingNm, period, -SectionBuilder.TouchingNm));
        }
        return needed;
    }

    private readonly record struct Slab(double TopNm, double BottomNm, double CenterNm, double ShiftNm);

    private sealed class Extent
    {
        public Extent(SectionRun run)
        {
            Layer = run.LayerNumber;
            Run = run;
            Slabs = [.. run.Rows.Select(row => new Slab(row.CenterNm + run.CellTopNm, row.CenterNm + run.CellBottomNm, row.CenterNm, row.ShiftNm))];
        }

        public Extent(IReadOnlyList<SectionFilm> films)
        {
            Layer = films[0].LayerNumber;
            Slabs = [.. films.Select(film => new Slab(film.TopNm, film.BottomNm, film.TopNm, 0))];
        }

        public int Layer { get; }

        public SectionRun? Run { get; }

        public IReadOnlyList<Slab> Slabs { get; }

        public double TopNm => Slabs[0].TopNm;

        public double BottomNm => Slabs[^1].BottomNm;
    }
}

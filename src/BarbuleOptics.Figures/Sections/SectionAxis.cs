namespace BarbuleOptics.Figures.Sections;

/// <summary>One axis of a section on the page: stretches to scale, with breaks where something is left out.</summary>
internal sealed class SectionAxis
{
    /// <summary>Room that a break takes, in points.</summary>
    public const double BreakPt = 6;

    private SectionAxis(IReadOnlyList<Stretch> stretches, IReadOnlyList<(double FromNm, double ToNm)> cuts)
        => (Stretches, Cuts) = (stretches, cuts);

    /// <summary>What is drawn, at least one.</summary>
    public IReadOnlyList<Stretch> Stretches { get; }

    /// <summary>What is left out, between the stretches.</summary>
    public IReadOnlyList<(double FromNm, double ToNm)> Cuts { get; }

    public double StartPt => Stretches[0].StartPt;

    public double EndPt => Stretches[^1].EndPt;

    /// <summary>An axis from <paramref name="fromNm"/> to <paramref name="toNm"/> without the <paramref name="cuts"/>, which ascend and lie apart.</summary>
    public static SectionAxis Create(double fromNm, double toNm, IReadOnlyList<(double FromNm, double ToNm)> cuts, double startPt, double ptPerNm)
    {
        var stretches = new List<Stretch>();
        foreach ((double cutFromNm, double cutToNm) in cuts)
        {
            stretches.Add(new Stretch(fromNm, cutFromNm, startPt, ptPerNm));
            startPt = stretches[^1].EndPt + BreakPt;
            fromNm = cutToNm;
        }
        stretches.Add(new Stretch(fromNm, toNm, startPt, ptPerNm));
        return new SectionAxis(stretches, cuts);
    }

    /// <summary>The place of a coordinate; one that is left out falls into the middle of its break.</summary>
    public double At(double nm)
    {
        for (int i = 0; i < Stretches.Count; i++)
        {
            if (nm <= Stretches[i].ToNm || i == Stretches.Count - 1)
                return i > 0 && nm < Stretches[i].FromNm ? Stretches[i].StartPt - BreakPt / 2 : Stretches[i].At(nm);
        }
        return EndPt;
    }

    public bool Shows(double nm) => Stretches.Any(stretch => stretch.Holds(nm));

    /// <summary>The middle of the longest part of an interval that is drawn; null when none is.</summary>
    public double? MiddleShown(double fromNm, double toNm)
    {
        (double From, double To) best = (0, 0);
        foreach (Stretch stretch in Stretches)
        {
            (double from, double to) = (Math.Max(fromNm, stretch.FromNm), Math.Min(toNm, stretch.ToNm));
            if (to - from > best.To - best.From)
                best = (from, to);
        }
        return best.To > best.From ? (best.From + best.To) / 2 : null;
    }
}

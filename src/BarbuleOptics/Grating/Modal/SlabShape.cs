using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Modal;

/// <summary>What lies between the two planes of a slab: bodies of one period, the stretches of depth between their tops and bottoms, mirrors.</summary>
internal sealed class SlabShape
{
    /// <summary>Edges closer than this, in nm, are one edge.</summary>
    private const double SameEdgeNm = 1e-6;

    /// <summary>Describes bodies by their place below the slab's top plane.</summary>
    public SlabShape(IReadOnlyList<PlacedOutline> bodies, double heightNm, double periodNm)
    {
        HeightNm = heightNm;
        PeriodNm = periodNm;
        AxisNm = FindAxis(bodies, periodNm) ?? double.NaN;
        HasAxis = !double.IsNaN(AxisNm);
        if (!HasAxis)
            AxisNm = 0;
        Bodies = [.. bodies.Select(placed => placed with { XNm = placed.XNm - AxisNm })];
        HasMiddle = bodies.All(body => HasImage(bodies, body, body.XNm, heightNm - body.CenterNm, periodNm));
        Intervals = Divide();
        HalfIntervals = HasMiddle ? [.. Intervals.Where(interval => interval.BottomNm <= heightNm / 2)] : Intervals;
    }

    /// <summary>Distance between the planes, in nm.</summary>
    public double HeightNm { get; }

    /// <summary>The period, in nm.</summary>
    public double PeriodNm { get; }

    /// <summary>Place along the surface from which x is counted here: that of the mirror axis, where there is one, in nm.</summary>
    public double AxisNm { get; }

    /// <summary>Whether the bodies are their own mirror image about the upright axis x = 0.</summary>
    public bool HasAxis { get; }

    /// <summary>Whether they are their own mirror image about the plane half way down.</summary>
    public bool HasMiddle { get; }

    /// <summary>The bodies, x counted from the axis; a later one covers an earlier one.</summary>
    public PlacedOutline[] Bodies { get; }

    /// <summary>Stretches from the top plane to the bottom plane.</summary>
    public SlabInterval[] Intervals { get; }

    /// <summary>Stretches from the top plane to the middle where there is a mirror there; all stretches otherwise.</summary>
    public SlabInterval[] HalfIntervals { get; }

    private SlabInterval[] Divide()
    {
        var edges = new List<(double ZNm, bool IsTip)> { (0, false), (HeightNm, false) };
        if (HasMiddle)
            edges.Add((HeightNm / 2, false));
        foreach (PlacedOutline placed in Bodies)
        {
            AddEdges(edges, placed.Body.Outer, placed.CenterNm);
            if (placed.Body.Core is Outline core)
                AddEdges(edges, core, placed.CenterNm);
        }
        edges.Sort((first, second) => first.ZNm.CompareTo(second.ZNm));
        var distinct = new List<(double ZNm, bool IsTip)>();
        foreach ((double zNm, bool isTip) in edges)
        {
            if (distinct.Count == 0 || zNm - distinct[^1].ZNm > SameEdgeNm)
                distinct.Add((zNm, isTip));
            else
                distinct[^1] = (distinct[^1].ZNm, distinct[^1].IsTip || isTip);
        }
        var intervals = new SlabInterval[distinct.Count - 1];
        for (int i = 0; i < intervals.Length; i++)
            intervals[i] = Between(distinct[i], distinct[i + 1]);
        return intervals;
    }

    private void AddEdges(List<(double ZNm, bool IsTip)> edges, in Outline outline, double centerNm)
    {
        bool isTip = outline.Shape == OutlineShape.Ellipse;
        foreach (double zNm in (ReadOnlySpan<double>)[centerNm - outline.HalfHeightNm, centerNm + outline.HalfHeightNm])
        {
            if (zNm > -SameEdgeNm && zNm < HeightNm + SameEdgeNm)
                edges.Add((Snap(Math.Clamp(zNm, 0, HeightNm)), isTip));
        }
    }

    private double Snap(double zNm) => HasMiddle && Math.Abs(zNm - HeightNm / 2) < SameEdgeNm ? HeightNm / 2 : zNm;

    private SlabInterval Between((double ZNm, bool IsTip) top, (double ZNm, bool IsTip) bottom)
    {
        double middleNm = (top.ZNm + bottom.ZNm) / 2;
        var outers = new List<int>();
        var cores = new List<int>();
        bool upright = true;
        for (int b = 0; b < Bodies.Length; b++)
        {
            PlacedOutline placed = Bodies[b];
            double below = Math.Abs(middleNm - placed.CenterNm);
            if (below >= placed.Body.Outer.HalfHeightNm)
                continue;
            outers.Add(b);
            upright &= placed.Body.Outer.Shape == OutlineShape.Rectangle;
            if (placed.Body.Core is Outline core && below < core.HalfHeightNm)
            {
                cores.Add(b);
                upright &= core.Shape == OutlineShape.Rectangle;
            }
        }
        return new SlabInterval(top.ZNm, bottom.ZNm, [.. outers], [.. cores], top.IsTip && !upright, bottom.IsTip && !upright, upright);
    }

    // A mirror axis maps the first body onto one of the bodies, so it lies half way between the two (or half a period from there,
    // which is an axis of the same mirror).
    private static double? FindAxis(IReadOnlyList<PlacedOutline> bodies, double periodNm)
    {
        if (bodies.Count == 0)
            return 0;
        foreach (PlacedOutline other in bodies)
        {
            double axisNm = (bodies[0].XNm + other.XNm) / 2;
            if (bodies.All(body => HasImage(bodies, body, 2 * axisNm - body.XNm, body.CenterNm, periodNm)))
                return axisNm;
        }
        return null;
    }

    private static bool HasImage(IReadOnlyList<PlacedOutline> bodies, PlacedOutline body, double xNm, double zNm, double periodNm)
    {
        const double same = 1e-9;
        foreach (PlacedOutline other in bodies)
        {
            if (Math.Abs(Math.IEEERemainder(other.XNm - xNm, periodNm)) < same * periodNm && Math.Abs(other.CenterNm - zNm) < same * periodNm
                && other.Body.Outer == body.Body.Outer && other.Body.Core == body.Body.Core
                && other.Body.Material == body.Body.Material && other.Body.CoreMaterial == body.Body.CoreMaterial)
                return true;
        }
        return false;
    }
}

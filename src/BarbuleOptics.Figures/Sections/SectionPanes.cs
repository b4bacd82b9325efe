using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Figures.Sections;

/// <summary>Draws what lies where, one pane for each part between breaks.</summary>
internal sealed class SectionPanes(SectionLayout layout, MaterialFills fills)
{
    private const double ToothPt = 5;
    private const double ToothDepthPt = 1.4;

    private static readonly Stroke Edge = new(new(0x75, 0x62, 0x54), Ink.HairPt);

    private Section Section => layout.Section;

    public void Draw(List<PageElement> elements)
    {
        Surround(elements);
        for (int i = 0; i < layout.Across.Stretches.Count; i++)
        {
            for (int j = 0; j < layout.Depth.Stretches.Count; j++)
            {
                Stretch x = layout.Across.Stretches[i], z = layout.Depth.Stretches[j];
                if (j == 0)
                    z = z with { FromNm = 0, StartPt = z.At(0) };
                var box = new Box(x.StartPt, z.StartPt, x.EndPt, z.EndPt);
                var edges = new Shape();
                Shape outline = Outline(box, i > 0, i < layout.Across.Stretches.Count - 1, j > 0, j < layout.Depth.Stretches.Count - 1, edges);
                elements.Add(new ClippedGroup(outline, [.. Content(x, z, box)]));
                elements.Add(new StrokedShape(edges, new Stroke(Ink.Axis, Ink.LinePt)));
            }
        }
    }

    /// <summary>The surround in one piece, since the light is drawn in it.</summary>
    private void Surround(List<PageElement> elements)
    {
        var box = new Box(layout.Across.StartPt, layout.Depth.StartPt, layout.Across.EndPt, layout.Depth.At(0));
        elements.AddRange(fills.Of(Section.Surround).Fill(Shape.Rectangle(box), box));
        var frame = new Stroke(Ink.Axis, Ink.LinePt);
        elements.Add(new StrokedShape(Shape.Polyline([new(box.Left, box.Bottom), new(box.Left, box.Top), new(box.Right, box.Top), new(box.Right, box.Bottom)]), frame));
    }

    private IEnumerable<PageElement> Content(Stretch x, Stretch z, Box box)
    {
        // Each ground reaches on under the next, so that no seam shows between two of one material.
        IEnumerable<PageElement> elements =
        [
            .. Band(fills.Of(Section.Backing), 0, z.ToNm, z, box),
            .. Section.Back is null ? [] : Band(fills.Of(Section.Back.Behind), layout.BottomNm, z.ToNm, z, box),
            .. Band(fills.Of(Section.Materials[Section.Matrix]), 0, Section.DepthNm, z, box),
        ];
        foreach (SectionFilm film in Section.Films)
            elements = elements.Concat(Film(film, z, box));
        foreach (SectionRun run in Section.Runs)
            elements = elements.Concat(Run(run, x, z, box));
        return elements.Concat(Faces(z, box));
    }

    private static IEnumerable<PageElement> Band(MaterialFill fill, double fromNm, double toNm, Stretch z, Box box)
    {
        double top = Math.Max(box.Top, z.At(fromNm)), bottom = Math.Min(box.Bottom, z.At(toNm));
        var band = new Box(box.Left, top, box.Right, bottom);
        return bottom > top ? fill.Fill(Shape.Rectangle(band), band) : [];
    }

    private IEnumerable<PageElement> Film(SectionFilm film, Stretch z, Box box)
    {
        if (film.BottomNm < z.FromNm || film.TopNm > z.ToNm)
            return [];
        SectionMaterial material = Section.Materials[film.Material];
        // A film on a backing of its own material has no lower face, and no seam either.
        bool joinsBacking = JoinsBacking(film);
        double bottomNm = film.BottomNm + (joinsBacking ? 1 / layout.PtPerNm : 0);
        IEnumerable<PageElement> band = Band(fills.Of(material), film.TopNm, bottomNm, z, box).Append(Level(box, z.At(film.TopNm), Edge));
        return joinsBacking ? band : band.Append(Level(box, z.At(film.BottomNm), Edge));
    }

    private bool JoinsBacking(SectionFilm film)
        => film.BottomNm.Equals(Section.DepthNm) && Section.Materials[film.Material] == SectionMaterial.Plain(Section.Backing);

    private IEnumerable<PageElement> Run(SectionRun run, Stretch x, Stretch z, Box box)
    {
        foreach (CellBody body in run.Cell)
        {
            Shape outer = new(), core = new();
            foreach (SectionRow row in run.Rows)
            {
                double centerNm = row.CenterNm + body.ZNm;
                if (centerNm + body.Outer.HalfHeightNm < z.FromNm || centerNm - body.Outer.HalfHeightNm > z.ToNm)
                    continue;
                foreach (double placeNm in BodyPlaces.Within(layout.Section, run, row, body, x.FromNm - body.Outer.HalfWidthNm, x.ToNm + body.Outer.HalfWidthNm))
                {
                    var place = new Point(x.At(placeNm), z.At(centerNm));
                    Add(outer, body.Outer, place);
                    if (body.Core is Outline hollow)
                        Add(core, hollow, place);
                }
            }
            foreach (PageElement element in Filled(outer, body.Material, box).Concat(Filled(core, body.CoreMaterial, box)))
                yield return element;
        }
    }

    private IEnumerable<PageElement> Filled(Shape shape, int material, Box box)
        => shape.IsEmpty ? [] : fills.Of(Section.Materials[material]).Fill(shape, box).Append(new StrokedShape(shape, Edge, "bodies"));

    private void Add(Shape shape, Outline outline, Point place)
    {
        var box = Box.Around(place, 2 * outline.HalfWidthNm * layout.PtPerNm, 2 * outline.HalfHeightNm * layout.PtPerNm);
        _ = outline.Shape == OutlineShape.Ellipse ? shape.AddEllipse(box) : shape.AddRectangle(box);
    }

    /// <summary>The surface, and the far face of a finite barbule.</summary>
    private IEnumerable<PageElement> Faces(Stretch z, Box box)
    {
        var face = new Stroke(Ink.Axis, Ink.LinePt);
        if (z.Holds(0))
            yield return Level(box, z.At(0), face);
        if (Section.Back is not null && z.Holds(layout.BottomNm))
            yield return Level(box, z.At(layout.BottomNm), face);
        if (Section.Backing != Section.Materials[Section.Matrix].Main && !Section.Films.Any(JoinsBacking) && z.Holds(Section.DepthNm))
            yield return Level(box, z.At(Section.DepthNm), Edge);
    }

    private static StrokedShape Level(Box box, double y, Stroke stroke) => new(Shape.Line(new(box.Left, y), new(box.Right, y)), stroke);

    /// <summary>The pane's outline, torn where a break is; torn edges go into <paramref name="edges"/>, and the frame at the sides.</summary>
    private static Shape Outline(Box box, bool tornLeft, bool tornRight, bool tornTop, bool tornBottom, Shape edges)
    {
        Point[] top = Side(new(box.Left, box.Top), new(box.Right, box.Top), tornTop), right = Side(new(box.Right, box.Top), new(box.Right, box.Bottom), tornRight);
        Point[] bottom = Side(new(box.Left, box.Bottom), new(box.Right, box.Bottom), tornBottom), left = Side(new(box.Left, box.Top), new(box.Left, box.Bottom), tornLeft);
        foreach (Point[] side in new[] { top, right, bottom, left })
        {
            edges.MoveTo(side[0]);
            foreach (Point point in side.Skip(1))
                edges.LineTo(point);
        }
        return Shape.Polyline([.. top, .. right, .. bottom.Reverse(), .. left.Reverse()], closed: true);
    }

    private static Point[] Side(Point from, Point to, bool torn)
    {
        if (!torn)
            return [from, to];
        double length = to.X - from.X + to.Y - from.Y;
        int teeth = Math.Max(2, (int)Math.Round(length / ToothPt));
        bool level = to.Y == from.Y;
        return [.. Enumerable.Range(0, teeth + 1).Select(i =>
        {
            double along = length * i / teeth, aside = i % 2 == 0 ? 0 : ToothDepthPt;
            return level ? new Point(from.X + along, from.Y + aside) : new Point(from.X + aside, from.Y + along);
        })];
    }
}

using System.Globalization;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Figures.Sections;

/// <summary>Says what everything in a section is; each thing once.</summary>
internal sealed class SectionLabels
{
    private const double InsidePt = 5;

    private readonly SectionLayout _layout;
    private readonly Barbule _barbule;
    private readonly List<SectionLabel> _labels = [];

    private SectionLabels(SectionLayout layout, Barbule barbule) => (_layout, _barbule) = (layout, barbule);

    private Section Section => _layout.Section;

    public static IReadOnlyList<SectionLabel> Of(SectionLayout layout, Barbule barbule)
    {
        var labels = new SectionLabels(layout, barbule);
        labels.Surround();
        labels.Matrix();
        foreach (SectionFilm film in layout.Section.Films)
            labels.Film(film);
        foreach (SectionRun run in layout.Section.Runs)
            labels.Run(run);
        labels.Back();
        labels.Breaks();
        return labels._labels;
    }

    /// <summary>A material as a label names it: a table by its file's name.</summary>
    public static string NameOf(MaterialReference material) => material switch
    {
        MaterialReference.TablePath table => Path.GetFileNameWithoutExtension(table.Path.Replace('\\', '/')),
        MaterialReference.Inline { K: 0 } constants => Unbroken(string.Create(CultureInfo.InvariantCulture, $"n = {constants.N:G4}")),
        MaterialReference.Inline constants => string.Create(CultureInfo.InvariantCulture, $"n\u00a0=\u00a0{constants.N:G4}, k\u00a0=\u00a0{constants.K:G4}"),
        _ => material.ToString() ?? "",
    };

    private void Surround()
        => Add(NameOf(Section.Surround), "surround", Edge(-SectionLayout.SurroundPt * 0.4 / _layout.PtPerNm));

    private void Matrix()
    {
        string name = NameOf(Section.Materials[Section.Matrix].Main);
        if (Section.CortexNm > 0)
            Add(name, "cortex, " + LengthText.Of(Section.CortexNm), Edge(_layout.Depth.MiddleShown(0, Section.CortexNm)));
        else if (DepthCuts.Bare(Section, Section.DepthNm).Select(bare => _layout.Depth.MiddleShown(bare.FromNm, bare.ToNm)).FirstOrDefault(middle => middle is not null) is double shownNm)
            Add(name, "matrix", Edge(shownNm));
        else if (Section.Runs.FirstOrDefault(run => run.Cell.Count == 1 && run.SpacingNm > 2 * run.Cell[0].Outer.HalfWidthNm) is SectionRun apart)
            Add(name, "matrix", Between(apart));
    }

    private void Film(SectionFilm film)
    {
        string detail = $"{(Section.Films.Count(other => other.LayerNumber == film.LayerNumber) > 1 ? "films" : "film")}, {LengthText.Of(film.ThicknessNm)}";
        Add(NameOf(Section.Materials[film.Material].Main), detail, Edge(_layout.Depth.MiddleShown(film.TopNm, film.BottomNm)));
    }

    private void Run(SectionRun run)
    {
        int leaders = 0;
        foreach (CellBody body in run.Cell)
        {
            Add(NameOf(Section.Materials[body.Material].Main), FormOf(body.Outer, run.Rows.Count), TargetOf(run, body, core: false, leaders++));
            if (body.Core is Outline core)
            {
                SectionMaterial inside = Section.Materials[body.CoreMaterial];
                string name = inside.Filler is null ? NameOf(inside.Main) : string.Create(CultureInfo.InvariantCulture, $"{inside.FillerShare * 100:0.#} % {NameOf(inside.Filler)} in {NameOf(inside.Main)}");
                Add(name, $"core, {SizeOf(core)}", TargetOf(run, body, core: true, leaders++));
            }
        }
    }

    private void Back()
    {
        string name = _barbule.Backing is null ? "backing unknown" : NameOf(Section.Backing);
        string detail = _barbule.Backing is null ? $"drawn as {NameOf(Section.Backing)}" : "backing";
        if (Section.Back is null)
        {
            Add(name, detail, Edge(_layout.Depth.MiddleShown(_layout.BottomNm, double.MaxValue)));
            return;
        }
        Add(name, $"{detail}, {LengthText.Of(Section.Back.Thickness.CentralNm)}", Edge(_layout.Depth.MiddleShown(Section.DepthNm, _layout.BottomNm)));
        Add(NameOf(Section.Back.Behind), "behind", Edge(_layout.Depth.MiddleShown(_layout.BottomNm, double.MaxValue)));
    }

    private void Breaks()
    {
        foreach ((double fromNm, double toNm) in _layout.Depth.Cuts)
        {
            int rows = Section.Runs.Sum(run => run.Rows.Count(row => row.CenterNm > fromNm && row.CenterNm < toNm))
                + Section.Films.Count(film => film.TopNm + film.ThicknessNm / 2 > fromNm && film.TopNm + film.ThicknessNm / 2 < toNm);
            string what = rows > 0 ? Unbroken($"{rows} {(Section.Runs.Count > 0 ? "rows" : "films")}") + ", " : "";
            Add("not drawn", what + LengthText.Of(toNm - fromNm), new Point(_layout.Box.Right, _layout.Depth.At((fromNm + toNm) / 2)));
        }
    }

    private void Add(string name, string detail, Point? target)
    {
        if (target is Point point && !_labels.Any(label => label.Name == name && label.Detail == detail))
            _labels.Add(new SectionLabel(name, detail, point));
    }

    /// <summary>A point just inside the right side of the drawing.</summary>
    private Point? Edge(double? depthNm) => depthNm is double shown ? new Point(_layout.Box.Right - InsidePt, _layout.Depth.At(shown)) : null;

    /// <summary>A point of the shell or of the core, as far to the right as it is drawn.</summary>
    /// <param name="run">The rows.</param>
    /// <param name="body">The body.</param>
    /// <param name="core">Whether the core is meant.</param>
    /// <param name="leader">How many leaders point into these rows already: each gets a row, or a height within a row, of its own.</param>
    private Point? TargetOf(SectionRun run, CellBody body, bool core, int leader)
    {
        SectionRow[] shown = [.. run.Rows.Where(row => _layout.Depth.Shows(row.CenterNm + body.ZNm))];
        if (shown.Length == 0)
            return null;
        SectionRow row = shown[leader % shown.Length];
        double sink = (leader / shown.Length % 3) switch { 0 => 0, 1 => 0.55, _ => -0.55 };
        double outerNm = body.Outer.HalfWidthNm, coreNm = body.Core?.HalfWidthNm ?? 0;
        (double reachNm, double fallNm) = (core, body.Core) switch
        {
            (true, Outline hollow) => (0.5 * hollow.HalfWidthNm, hollow.HalfHeightNm),
            (_, Outline hollow) => ((coreNm + outerNm) / 2, (hollow.HalfHeightNm + body.Outer.HalfHeightNm) / 2),
            _ => (0.4 * outerNm, body.Outer.HalfHeightNm),
        };
        // A point of a shell stays within it when it sinks: it follows the ellipse, or the upright wall of a rectangle.
        double asideNm = body.Outer.Shape == OutlineShape.Ellipse ? reachNm * Math.Sqrt(1 - sink * sink) : reachNm;
        Stretch last = _layout.Across.Stretches[^1];
        double mostNm = last.ToNm - 3 / _layout.PtPerNm;
        double[] points = [.. new[] { -asideNm, asideNm }.SelectMany(aside =>
            BodyPlaces.Within(Section, run, row, body, last.FromNm - aside, mostNm - aside).Select(place => place + aside))];
        return points.Length == 0 ? InsideLong(run, row, body, core) : _layout.At(points.Max(), row.CenterNm + body.ZNm + sink * fallNm);
    }

    /// <summary>A point of a body too long to be drawn whole: on its axis, or in the lower wall round a core.</summary>
    private Point? InsideLong(SectionRun run, SectionRow row, CellBody body, bool core)
    {
        Stretch last = _layout.Across.Stretches[^1];
        double halfNm = 0.9 * (core && body.Core is Outline inner ? inner.HalfWidthNm : body.Outer.HalfWidthNm), mostNm = last.ToNm - 3 / _layout.PtPerNm;
        double[] places = [.. BodyPlaces.Within(Section, run, row, body, last.FromNm - halfNm, mostNm + halfNm)];
        if (places.Length == 0)
            return null;
        double wallNm = !core && body.Core is Outline hollow ? (hollow.HalfHeightNm + body.Outer.HalfHeightNm) / 2 : 0;
        return _layout.At(Math.Min(mostNm, places[^1] + halfNm), row.CenterNm + body.ZNm + wallNm);
    }

    private Point? Between(SectionRun run)
    {
        double[] places = [.. BodyPlaces.Within(Section, run, run.Rows[0], run.Cell[0], _layout.Across.Stretches[^1].FromNm, _layout.Across.Stretches[^1].ToNm - run.SpacingNm / 2)];
        return places.Length > 0 && _layout.Depth.Shows(run.Rows[0].CenterNm) ? _layout.At(places[^1] + run.SpacingNm / 2, run.Rows[0].CenterNm) : null;
    }

    private static string FormOf(Outline outline, int rows)
    {
        string form = outline.Shape == OutlineShape.Rectangle ? "platelets" : IsRound(outline) ? "rods" : "flattened rods";
        return $"{form}, {SizeOf(outline)}{(rows > 1 ? ", " + Unbroken(rows.ToString(CultureInfo.InvariantCulture) + " rows") : "")}";
    }

    private static string SizeOf(Outline outline) => Unbroken(
        outline.Shape == OutlineShape.Ellipse && IsRound(outline)
            ? "Ø " + LengthText.Of(2 * outline.HalfWidthNm)
            : $"{LengthText.Number(2 * outline.HalfWidthNm)} × {LengthText.Number(2 * outline.HalfHeightNm)} nm");

    /// <summary>The text in words that stay on one line.</summary>
    private static string Unbroken(string text) => text.Replace(' ', '\u00a0');

    private static bool IsRound(Outline outline) => outline.HalfWidthNm.Equals(outline.HalfHeightNm);
}

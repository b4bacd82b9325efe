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
        labels.Films();
        labels.Bodies();
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

    /// <summary>One label for all films that are alike, with their number.</summary>
    private void Films()
    {
        foreach (IGrouping<(string Name, string Thickness), SectionFilm> alike in Section.Films.GroupBy(film => (NameOf(Section.Materials[film.Material].Main), LengthText.Of(film.ThicknessNm))))
        {
            string count = alike.Count() > 1 ? Unbroken($"{alike.Count()} films") : "film";
            double? shownNm = alike.Select(film => _layout.Depth.MiddleShown(film.TopNm, film.BottomNm)).FirstOrDefault(middle => middle is not null);
            Add(alike.Key.Name, $"{count}, {alike.Key.Thickness}", Edge(shownNm));
        }
    }

    /// <summary>One label for all bodies that are alike, with the number of their rows, and right after it one for their cores.</summary>
    private void Bodies()
    {
        IEnumerable<(SectionRun Run, CellBody Body)> bodies = Section.Runs.SelectMany(run => run.Cell.Select(body => (run, body)));
        foreach (var alike in bodies.GroupBy(member => TextsOf(member.Body)))
        {
            int rows = alike.Select(member => member.Run).Distinct().Sum(run => run.Rows.Count);
            string detail = alike.Key.Form + (rows > 1 ? ", " + Unbroken(rows.ToString(CultureInfo.InvariantCulture) + " rows") : "");
            foreach ((SectionRun run, CellBody body) in alike)
            {
                if (TargetOf(run, body, core: false) is not Point target)
                    continue;
                _labels.Add(new SectionLabel(alike.Key.Name, detail, target));
                if (body.Core is not null && TargetOf(run, body, core: true) is Point inside)
                    _labels.Add(new SectionLabel(alike.Key.CoreName, alike.Key.Core, inside, IsCore: true));
                break;
            }
        }
    }

    private (string Name, string Form, string CoreName, string Core) TextsOf(CellBody body)
    {
        string name = NameOf(Section.Materials[body.Material].Main);
        if (body.Core is not Outline core)
            return (name, FormOf(body.Outer), "", "");
        SectionMaterial inside = Section.Materials[body.CoreMaterial];
        string filling = inside.Filler is null ? NameOf(inside.Main) : string.Create(CultureInfo.InvariantCulture, $"{inside.FillerShare * 100:0.#} % {NameOf(inside.Filler)} in {NameOf(inside.Main)}");
        return (name, FormOf(body.Outer), filling, $"core, {SizeOf(core)}");
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
    private Point? TargetOf(SectionRun run, CellBody body, bool core)
    {
        SectionRow[] shown = [.. run.Rows.Where(row => _layout.Depth.Shows(row.CenterNm + body.ZNm))];
        if (shown.Length == 0)
            return null;
        int number = run.Cell.TakeWhile(other => !ReferenceEquals(other, body)).Count();
        SectionRow row = shown[number % shown.Length];
        double sink = SinkOf(run, number, shown.Length, core);
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

    /// <summary>The height of a leader's end within a row, from -1 at the top to 1: a body and its core share a row, and each leader has a height of its own.</summary>
    private static double SinkOf(SectionRun run, int number, int rowsShown, bool core)
    {
        const double Most = 0.55;
        int[] sharing = [.. Enumerable.Range(0, run.Cell.Count).Where(other => other % rowsShown == number % rowsShown)];
        int leaders = sharing.Sum(LeadersOf), before = sharing.Where(other => other < number).Sum(LeadersOf) + (core ? 1 : 0);
        return leaders == 1 ? 0 : Most * (2.0 * before / (leaders - 1) - 1);

        int LeadersOf(int other) => run.Cell[other].Core is null ? 1 : 2;
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

    private static string FormOf(Outline outline)
    {
        string form = outline.Shape == OutlineShape.Rectangle ? "platelets" : IsRound(outline) ? "rods" : "flattened rods";
        return $"{form}, {SizeOf(outline)}";
    }

    private static string SizeOf(Outline outline) => Unbroken(
        outline.Shape == OutlineShape.Ellipse && IsRound(outline)
            ? "Ø " + LengthText.Of(2 * outline.HalfWidthNm)
            : $"{LengthText.Number(2 * outline.HalfWidthNm)} × {LengthText.Number(2 * outline.HalfHeightNm)} nm");

    /// <summary>The text in words that stay on one line.</summary>
    private static string Unbroken(string text) => text.Replace(' ', '\u00a0');

    private static bool IsRound(Outline outline) => outline.HalfWidthNm.Equals(outline.HalfHeightNm);
}

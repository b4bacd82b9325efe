using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Layering;

/// <summary>Lays out the section of a barbule at its central measurements, and says why it cannot exist where it cannot.</summary>
/// <remarks>Depth counts from the surface down. A gap counts from the bottom of a layer's last row.</remarks>
public sealed class SectionBuilder
{
    /// <summary>Overlap that is taken for rounding, in nm: touching bodies may be given to this precision.</summary>
    public const double TouchingNm = 1e-6;

    /// <summary>Most rows of all layers together.</summary>
    private const int MostRows = 20_000;

    /// <summary>Most bodies of one cell.</summary>
    private const int MostBodies = 100;

    private readonly Barbule _barbule;
    private readonly MaterialNumbers _materials = new();
    private readonly List<SectionRun> _runs = [];
    private readonly List<SectionFilm> _films = [];
    private readonly List<AnatomyProblem> _problems = [];
    private GapShortage? _shortage;

    private SectionBuilder(Barbule barbule) => _barbule = barbule;

    /// <summary>Builds the section of <paramref name="barbule"/>, its lengths corrected for preparation and preservation; an unknown backing is taken as keratin.</summary>
    /// <param name="barbule">The structure as measured.</param>
    /// <param name="section">The section; null when it cannot exist.</param>
    /// <param name="problems">Everything that forbids it; empty when the section stands.</param>
    public static bool TryBuild(Barbule barbule, [NotNullWhen(true)] out Section? section, out IReadOnlyList<AnatomyProblem> problems)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        var builder = new SectionBuilder(TrueGeometry.Of(barbule));
        section = builder.Build();
        problems = builder._problems;
        if (problems.Count > 0)
            section = null;
        return section is not null;
    }

    /// <summary>Builds the section, or says by how much a gap is too small where that alone forbids it.</summary>
    /// <returns>Both null where something else forbids it.</returns>
    internal static (Section? Section, GapShortage? Shortage) LayOut(Barbule barbule)
    {
        var builder = new SectionBuilder(TrueGeometry.Of(barbule));
        Section? section = builder.Build();
        return builder._problems.Count == 0 ? (section, null) : (null, builder._shortage);
    }

    private Section? Build()
    {
        _materials.Of(SectionMaterial.Plain(_barbule.Matrix));
        double cortexNm = _barbule.Cortex?.CentralNm ?? 0;
        double depthNm = cortexNm;
        int rows = 0;
        for (int i = 0; i < _barbule.Layers.Count; i++)
        {
            BarbuleLayer layer = _barbule.Layers[i];
            rows += layer.Rows.Central;
            if (rows > MostRows)
            {
                Refuse(i + 1, "rows", FormattableString.Invariant($"found {rows} rows in all layers so far; allowed up to {MostRows}"));
                return null;
            }
            double? bottomNm = layer.IsFilm ? AddFilms(layer, i + 1, depthNm) : AddRun(layer, i + 1, depthNm);
            if (bottomNm is null)
                return null;
            depthNm = bottomNm.Value + layer.Gap.CentralNm;
        }

        MaterialReference backing = _barbule.Backing ?? new MaterialReference.Named(Barbule.DefaultMatrix);
        var section = new Section(
            _barbule.Surround, backing, _barbule.Axis, ValueList.Create<SectionMaterial>([.. _materials.All]), cortexNm, depthNm,
            ValueList.Create<SectionRun>([.. _runs]), ValueList.Create<SectionFilm>([.. _films]), _barbule.Back);
        _shortage = LayerOverlap.Find(section);
        if (_shortage is not null)
            _problems.Add(_shortage.Problem);
        return section;
    }

    private double? AddFilms(BarbuleLayer layer, int number, double topNm)
    {
        var form = (MelanosomeForm.Film)layer.Bodies[0].Form;
        double thicknessNm = form.Thickness.CentralNm;
        int rows = layer.Rows.Central;
        double pitchNm = 0;
        if (rows > 1)
        {
            if (layer.Depth is null)
                return Refuse(number, "pitch", "missing; needed when rows > 1");
            pitchNm = layer.Depth.Distance.CentralNm + (layer.Depth.BetweenSurfaces ? thicknessNm : 0);
            if (pitchNm < thicknessNm - TouchingNm)
                return Refuse(number, "pitch", FormattableString.Invariant($"found {pitchNm:0.######} nm, films overlap; allowed at least the thickness, {thicknessNm:0.######} nm"));
        }

        int material = _materials.Of(SectionMaterial.Plain(layer.Bodies[0].Material));
        for (int row = 0; row < rows; row++)
            _films.Add(new SectionFilm(number, topNm + row * pitchNm, thicknessNm, material));
        return topNm + (rows - 1) * pitchNm + thicknessNm;
    }

    private double? AddRun(BarbuleLayer layer, int number, double topNm)
    {
        if (layer.Bodies.Count > MostBodies)
            return Refuse(number, "body", FormattableString.Invariant($"found {layer.Bodies.Count} bodies in one cell; allowed up to {MostBodies}"));
        for (int b = 0; b < layer.Bodies.Count; b++)
        {
            if (FormCheck.Faults(layer.Bodies[b].Form).FirstOrDefault() is (string key, string message))
                return Refuse(number, BodyKey(layer, b, key), message);
        }

        if (SpacingOf(layer, number) is not double spacingNm)
            return null;
        ValueList<CellBody> cell = CellBuilder.Place(layer, spacingNm, _materials);
        if (!FitsSideways(cell, spacingNm, number) || PitchOf(layer, cell, spacingNm, number) is not double pitchNm)
            return null;

        double centerNm = topNm - cell.Min(body => body.TopNm);
        var rows = new SectionRow[layer.Rows.Central];
        for (int row = 0; row < rows.Length; row++)
        {
            double stagger = layer.Stacking == Stacking.Staggered && row % 2 == 1 ? 0.5 : 0;
            rows[row] = new SectionRow(centerNm + row * pitchNm, (layer.ShiftShare + stagger) * spacingNm);
        }
        var run = new SectionRun(number, spacingNm, pitchNm, cell, ValueList.Create<SectionRow>(rows));
        _runs.Add(run);
        return rows[^1].CenterNm + run.CellBottomNm;
    }

    private double? SpacingOf(BarbuleLayer layer, int number)
    {
        if (layer.Lateral is null)
            return Refuse(number, "spacing", "missing; rows of bodies need spacing or separation");
        double distanceNm = layer.Lateral.Distance.CentralNm;
        if (!layer.Lateral.BetweenSurfaces)
            return distanceNm > 0 ? distanceNm : Refuse(number, "spacing", FormattableString.Invariant($"found {distanceNm} nm; allowed above 0"));
        if (layer.Bodies.Count > 1)
            return Refuse(number, "separation", "found a cell of several bodies; allowed with one body only, give spacing instead");
        return distanceNm + 2 * CellBuilder.OutlinesOf(layer.Bodies[0].Form).Outer.HalfWidthNm;
    }

    private bool FitsSideways(ValueList<CellBody> cell, double spacingNm, int number)
    {
        for (int b = 0; b < cell.Count; b++)
        {
            double widthNm = 2 * cell[b].Outer.HalfWidthNm;
            if (spacingNm < widthNm - TouchingNm)
            {
                Refuse(number, "spacing", FormattableString.Invariant($"found {spacingNm:0.######} nm, neighbors overlap; allowed at least the width, {widthNm:0.######} nm"));
                return false;
            }
            for (int other = 0; other < b; other++)
            {
                if (cell[other].BottomNm <= cell[b].TopNm || cell[b].BottomNm <= cell[other].TopNm)
                    continue;
                double clearanceNm = NearestNm(cell[other], cell[b], spacingNm);
                if (clearanceNm < -TouchingNm)
                {
                    Refuse(number, FormattableString.Invariant($"body{b + 1}.x"), FormattableString.Invariant(
                        $"body {b + 1} overlaps body {other + 1} by {-clearanceNm:0.###} nm; allowed up to touching"));
                    return false;
                }
            }
        }
        return true;
    }

    private static double NearestNm(CellBody first, CellBody second, double spacingNm)
    {
        double offset = Math.IEEERemainder(second.XNm - first.XNm, spacingNm);
        double nearest = double.PositiveInfinity;
        for (int image = -1; image <= 1; image++)
            nearest = Math.Min(nearest, Clearance.Between(first.Outer, second.Outer, offset + image * spacingNm, second.ZNm - first.ZNm));
        return nearest;
    }

    private double? PitchOf(BarbuleLayer layer, ValueList<CellBody> cell, double spacingNm, int number)
    {
        if (layer.Rows.Central == 1)
            return 0;
        if (layer.Depth is null)
            return Refuse(number, "pitch", "missing; needed when rows > 1");
        double distanceNm = layer.Depth.Distance.CentralNm;
        if (layer.Depth.BetweenSurfaces)
            return RowNesting.LeastPitchNm(cell, spacingNm, layer.Stacking, distanceNm);
        // Rows that do not reach into each other's depth are clear whatever their shapes.
        if (distanceNm >= cell.Max(body => body.BottomNm) - cell.Min(body => body.TopNm))
            return distanceNm;
        double leastNm = RowNesting.LeastPitchNm(cell, spacingNm, layer.Stacking, -TouchingNm);
        return distanceNm >= leastNm
            ? distanceNm
            : Refuse(number, "pitch", FormattableString.Invariant($"found {distanceNm:0.######} nm, rows overlap; allowed at least {RoundUp(leastNm)} nm"));
    }

    private double? Refuse(int layer, string key, string message)
    {
        _problems.Add(new AnatomyProblem(FormattableString.Invariant($"layer{layer}.{key}"), message));
        return null;
    }

    private static string BodyKey(BarbuleLayer layer, int body, string key)
        => layer.Bodies.Count == 1 ? key : FormattableString.Invariant($"body{body + 1}.{key}");

    private static string RoundUp(double nanometres) => FormattableString.Invariant($"{Math.Ceiling(nanometres * 1000) / 1000:0.###}");
}

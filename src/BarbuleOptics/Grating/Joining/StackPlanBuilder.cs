using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Lays the pieces of a section down from the surface to the backing.</summary>
internal sealed class StackPlanBuilder
{
    /// <summary>Thinner gaps, in nm, are rounding.</summary>
    private const double LeastGapNm = 1e-7;

    private readonly Section _section;
    private readonly List<PlanPiece> _pieces = [];
    private readonly List<PlanGroup> _groups = [];
    private readonly List<PlanJoint> _joints = [];
    private readonly List<PlannedElement> _elements;
    private readonly ElementKinds _kinds;
    private double _depthNm;
    private int _medium;
    private double _shiftNm;

    public StackPlanBuilder(Section section, RowMethods methods)
    {
        _section = section;
        _kinds = new ElementKinds(section);
        _elements = _kinds.Place(methods);
        _medium = section.Materials.Count; // the surround
    }

    /// <summary>The plan.</summary>
    public StackPlan Build()
    {
        SectionFilm[] films = [.. _section.Films.OrderBy(film => film.TopNm)];
        int next = 0;
        _shiftNm = _elements.Count > 0 ? _elements[0].ShiftNm : 0;
        for (int i = 0; i < _elements.Count; i++)
        {
            for (; next < films.Length && films[next].TopNm < _elements[i].CenterNm; next++)
                AddFilm(films[next]);
            AddElement(i, films);
        }
        for (; next < films.Length; next++)
            AddFilm(films[next]);
        AddBacking();
        if (_groups.Count == 0)
            _groups.Add(PlanGroup.Empty(0));
        return new StackPlan(_section, [.. _pieces], _kinds.All, [.. _groups], [.. _joints]);
    }

    private int Group => Math.Max(0, _groups.Count - 1);

    private void AddFilm(SectionFilm film)
    {
        AddGap(film.TopNm);
        AddLayer(film.Material, film.ThicknessNm);
        _depthNm = film.BottomNm;
    }

    private void AddElement(int number, SectionFilm[] films)
    {
        PlannedElement element = _elements[number];
        if (_groups.Count == 0 || !IsSame(_groups[^1].PeriodNm, element.Kind.PeriodNm))
            StartGroup(number, films);
        AddGap(element.TopNm);
        MoveTo(Section.Matrix);
        _shiftNm = element.ShiftNm;
        _pieces.Add(new PlanPiece(PlanStep.Element, Section.Matrix, Section.Matrix, 0, element.KindNumber, _shiftNm, Group));
        _depthNm = element.BottomNm;
        _groups[^1] = With(_groups[^1], element, Surroundings(number, films));
    }

    // The joint lies at the bottom of the last element above, in the matrix.
    private void StartGroup(int number, SectionFilm[] films)
    {
        PlannedElement element = _elements[number];
        if (_groups.Count > 0)
        {
            PlannedElement above = _elements[number - 1];
            double clearNm = element.BodiesTopNm - above.BodiesBottomNm, toFilmNm = clearNm;
            foreach (SectionFilm film in films)
            {
                if (film.TopNm >= above.BodiesBottomNm - LeastGapNm)
                    toFilmNm = Math.Min(toFilmNm, film.TopNm - above.BodiesBottomNm);
            }
            _joints.Add(new PlanJoint(Group, Math.Max(0, toFilmNm), Math.Max(0, clearNm)));
            InsertJoint();
        }
        _groups.Add(PlanGroup.Empty(element.Kind.PeriodNm));
    }

    private void InsertJoint()
    {
        int last = _pieces.FindLastIndex(piece => piece.Step == PlanStep.Element);
        _pieces.Insert(last + 1, new PlanPiece(PlanStep.Joint, Section.Matrix, Section.Matrix, 0, -1, _pieces[last].ShiftNm, Group));
        // What was laid between the groups belongs to the lower one.
        for (int i = last + 2; i < _pieces.Count; i++)
            _pieces[i] = _pieces[i] with { Group = Group + 1 };
    }

    private static PlanGroup With(in PlanGroup group, PlannedElement element, (double NearestNm, double Overlap, double ClearNm) around) => element.Kind is RodKind
        ? group with { HasRods = true, NearestNm = Math.Min(group.NearestNm, around.NearestNm), Overlap = Math.Max(group.Overlap, around.Overlap) }
        : group with
        {
            HasSlabs = true,
            HasCuts = group.HasCuts || element.Kind.IsCut,
            ClearNm = Math.Min(group.ClearNm, element.Kind.IsCut ? double.PositiveInfinity : around.ClearNm),
        };

    /// <summary>How near the next rows and faces are: by centers for a row of rods, by bodies for a slab.</summary>
    private (double NearestNm, double Overlap, double ClearNm) Surroundings(int number, SectionFilm[] films)
    {
        PlannedElement element = _elements[number];
        double nearestNm = double.PositiveInfinity, clearNm = double.PositiveInfinity, overlap = 1;
        foreach (int other in (ReadOnlySpan<int>)[number - 1, number + 1])
        {
            if (other < 0 || other >= _elements.Count)
                continue;
            nearestNm = Math.Min(nearestNm, _elements[other].Kind is RodKind
                ? Math.Abs(_elements[other].CenterNm - element.CenterNm)
                : 2 * Math.Max(_elements[other].TopNm - element.CenterNm, element.CenterNm - _elements[other].BottomNm));
            if (_elements[other].Kind is RodKind near && element.Kind is RodKind own)
                overlap = Math.Max(overlap, (near.RadiusNm + own.RadiusNm) / Math.Abs(_elements[other].CenterNm - element.CenterNm));
            clearNm = Math.Min(clearNm, Math.Max(_elements[other].BodiesTopNm - element.BodiesBottomNm, element.BodiesTopNm - _elements[other].BodiesBottomNm));
        }
        Face(0);
        Face(_section.DepthNm);
        foreach (SectionFilm film in films)
        {
            Face(film.TopNm);
            Face(film.BottomNm);
        }
        return (nearestNm, overlap, Math.Max(0, clearNm));

        void Face(double depthNm)
        {
            nearestNm = Math.Min(nearestNm, 2 * Math.Abs(depthNm - element.CenterNm));
            clearNm = Math.Min(clearNm, Math.Max(depthNm - element.BodiesBottomNm, element.BodiesTopNm - depthNm));
        }
    }

    private void AddGap(double toNm)
    {
        if (toNm - _depthNm > LeastGapNm)
            AddLayer(Section.Matrix, toNm - _depthNm);
        _depthNm = toNm;
    }

    private void AddLayer(int medium, double thicknessNm)
    {
        MoveTo(medium);
        _pieces.Add(new PlanPiece(PlanStep.Layer, medium, medium, thicknessNm, -1, _shiftNm, Group));
    }

    private void MoveTo(int medium)
    {
        if (medium != _medium)
            _pieces.Add(new PlanPiece(PlanStep.Interface, _medium, medium, 0, -1, _shiftNm, Group));
        _medium = medium;
    }

    private void AddBacking()
    {
        AddGap(_section.DepthNm);
        int backing = _section.Materials.Count + 1;
        MoveTo(backing);
        if (_section.Back is not { Coherent: true } back)
            return;
        AddLayer(backing, back.Thickness.CentralNm);
        MoveTo(backing + 1);
    }

    private static bool IsSame(double one, double other) => Math.Abs(one - other) <= 1e-9 * one;
}

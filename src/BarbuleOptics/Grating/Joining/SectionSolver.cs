using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Solves a section at one wavelength and direction: chooses how spacings are joined and how the backing ends.</summary>
internal sealed class SectionSolver
{
    /// <summary>Error from which on slabs solve flattened rods at less cost than multipoles.</summary>
    private const double SlabAccuracy = 5e-4;

    private readonly Section _section;
    private readonly SpacingPlan _spacing;
    private readonly bool _slabsOnly;
    private readonly Complex[] _media;
    private readonly bool _hasFlatRods;
    private readonly RefinedPoint?[] _points = new RefinedPoint?[8];
    private bool _flatRodsFailed;

    public SectionSolver(Section section, bool slabsOnly = false)
    {
        _section = section;
        _slabsOnly = slabsOnly;
        _hasFlatRods = !slabsOnly && section.Runs.Any(run => run.Cell.Count == 1 && FlatRod.Is(run.Cell[0], run.SpacingNm));
        _spacing = SpacingPlan.Of(section);
        _media = new Complex[section.Materials.Count + 3];
        BackingMaterial = section.Materials.AsSpan().IndexOf(SectionMaterial.Plain(section.Backing));
    }

    /// <summary>Number of the material that the backing is made of; -1 when it is none of the section's.</summary>
    public int BackingMaterial { get; }

    /// <summary>Forgets what neighboring wavelengths taught.</summary>
    public void StartBlock()
    {
        foreach (RefinedPoint? point in _points)
            point?.StartBlock();
        _flatRodsFailed = false;
    }

    /// <summary>Solves for light of one polarization, or of both where the rods couple them.</summary>
    public void Solve(
        SectionPermittivities structure, int wavelength, Angle incidence, RodField field, double accuracy, in OutcomeLayout layout,
        Span<double> first, Span<double> second)
    {
        PointLight light = LightOf(structure, wavelength, incidence);
        SetMedia(structure, wavelength, light.Index);
        // In conical mounting the answer of a flattened rod, one for each direction, costs more than a slab.
        bool byMultipoles = _hasFlatRods && accuracy < SlabAccuracy && !light.IsConical && !_flatRodsFailed;
        if (byMultipoles && TrySolve(structure, wavelength, light, field, byMultipoles, accuracy, layout, first, second)
            && first[OutcomeLayout.Error] <= accuracy)
        {
            return;
        }
        _flatRodsFailed |= byMultipoles;
        if (!TrySolve(structure, wavelength, light, field, byMultipoles: false, accuracy, layout, first, second))
            throw new ArithmeticException(FormattableString.Invariant($"The section has no finite solution at {light.WavelengthNm} nm at any resolution."));
    }

    private bool TrySolve(
        SectionPermittivities structure, int wavelength, PointLight light, RodField field, bool byMultipoles, double accuracy, in OutcomeLayout layout,
        Span<double> first, Span<double> second)
    {
        bool coherent = _section.Back is { Coherent: false } back
            && !AveragedBack.HasFringes(light, structure.Backing[wavelength], back.Thickness.CentralNm);
        RefinedPoint point = PointFor(moved: false, coherent, byMultipoles);
        double? periodNm = _section.PeriodNm;
        double joinError = 0;
        if (point.Plan.Joints.Length > 0)
        {
            joinError = SpacingJoin.Error(point.Plan, light, _media.AsSpan(0, _section.Materials.Count));
            double most = periodNm is null ? Math.Max(SpacingJoin.MostError, accuracy) : SpacingJoin.ShareOfAccuracy * accuracy;
            if (joinError <= most)
                periodNm = null;
            else if (periodNm is null)
                (point, periodNm, joinError) = (PointFor(moved: true, coherent, byMultipoles), _spacing.PeriodNm, 0);
            else
                joinError = 0;
        }
        double orderPeriodNm = _spacing.PeriodNm ?? 0;
        double wavesNm = periodNm ?? Shortest(point.Plan);
        if (point.Plan.Kinds.Length > 0)
            light = OrderCount.AwayFromGrazing(light, _media, wavesNm);
        int orders = point.Plan.Kinds.Length > 0 ? OrderCount.Most(light, _media, wavesNm) : 0;
        if (!point.TrySolve(light, _media, field, new PointPeriods(periodNm, orderPeriodNm, orders), accuracy, layout, first, second))
            return false;
        first[OutcomeLayout.Error] += joinError;
        if (field == RodField.Both)
            second[OutcomeLayout.Error] += joinError;
        return true;
    }

    private static double Shortest(StackPlan plan)
    {
        double shortestNm = double.PositiveInfinity;
        foreach (PlanGroup group in plan.Groups)
            shortestNm = Math.Min(shortestNm, group.PeriodNm > 0 ? group.PeriodNm : double.PositiveInfinity);
        return shortestNm;
    }

    private PointLight LightOf(SectionPermittivities structure, int wavelength, Angle incidence)
    {
        (double across, double along) = IncidentDirection.Of(_section, incidence);
        // The sine of the complement, which keeps its digits at grazing incidence.
        double cosine = Math.Sin(double.DegreesToRadians(90 - incidence.Degrees));
        return new PointLight(structure.WavelengthsNm[wavelength], structure.SurroundIndex[wavelength], across, along, cosine);
    }

    private void SetMedia(SectionPermittivities structure, int wavelength, double index)
    {
        structure.Inside(wavelength).CopyTo(_media);
        _media[^3] = index * index;
        _media[^2] = structure.Backing[wavelength];
        _media[^1] = structure.Behind.IsEmpty ? structure.Backing[wavelength] : structure.Behind[wavelength];
    }

    private RefinedPoint PointFor(bool moved, bool coherent, bool byMultipoles)
    {
        int number = (moved ? 1 : 0) + (coherent ? 2 : 0) + (byMultipoles ? 4 : 0);
        if (_points[number] is RefinedPoint known)
            return known;
        Section section = moved ? _spacing.Nearest : _section;
        if (coherent)
            section = section with { Back = section.Back! with { Coherent = true } };
        return _points[number] = new RefinedPoint(StackPlan.Of(section, _slabsOnly ? RowMethods.SlabsOnly : byMultipoles ? RowMethods.AllRods : RowMethods.RoundRods));
    }
}

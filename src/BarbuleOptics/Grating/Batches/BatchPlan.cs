using System.Runtime.CompilerServices;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Batches;

/// <summary>A section as steps for whole packs of wavelengths: the pieces of a <see cref="StackPlan"/> with neighboring layers of one medium and
/// all moves between two elements drawn together, and with the planes of rows of rods at their centers.</summary>
internal sealed class BatchPlan
{
    /// <summary>Thinner layers, in nm, are rounding.</summary>
    private const double LeastLayerNm = 1e-9;

    /// <summary>Largest order that blocks are solved with.</summary>
    public const int MostOrder = 40;

    private readonly (double Cosine, double Sine)[] _phases;
    private readonly List<BatchStep> _steps = [];
    private readonly List<BatchLayer> _layers = [];
    private double? _placeNm;
    private BatchLayer _open;

    private BatchPlan(StackPlan plan, double periodNm)
    {
        (Stack, PeriodNm) = (plan, periodNm);
        foreach (PlanPiece piece in plan.Pieces)
            Add(piece);
        Close();
        Steps = [.. _steps];
        Layers = [.. _layers];
        _phases = new (double Cosine, double Sine)[Layers.Length * (2 * MostOrder + 1)];
        for (int i = 0; i < _phases.Length; i++)
        {
            double turns = Layers[i / (2 * MostOrder + 1)].ShiftNm / periodNm * (i % (2 * MostOrder + 1) - MostOrder);
            (double sine, double cosine) = Math.SinCos(2 * Math.PI * (turns - Math.Round(turns)));
            _phases[i] = (cosine, sine);
        }
    }

    /// <summary>The pieces.</summary>
    public StackPlan Stack { get; }

    /// <summary>The period of all rows, in nm.</summary>
    public double PeriodNm { get; }

    /// <summary>From the top down; the first is an interface.</summary>
    public BatchStep[] Steps { get; }

    /// <summary>The different layers.</summary>
    public BatchLayer[] Layers { get; }

    /// <summary>A plan, or null where the scalar code has to solve the section.</summary>
    public static BatchPlan? TryOf(StackPlan plan)
    {
        if (plan.Kinds.Length == 0 || plan.Joints.Length > 0 || plan.HasAveragedBack || plan.Groups.Length != 1)
            return null;
        double periodNm = plan.Groups[0].PeriodNm;
        foreach (ElementKind kind in plan.Kinds)
        {
            if (!BatchElements.Covers(kind) || Math.Abs(kind.PeriodNm - periodNm) > 1e-9 * periodNm)
                return null;
        }
        return plan.Pieces[0].Step == PlanStep.Interface ? new BatchPlan(plan, periodNm) : null;
    }

    /// <summary>exp(2 pi i n d/P) of the move d behind a layer, for order n from -<see cref="MostOrder"/> to <see cref="MostOrder"/>.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> Phase<TLanes>(int layer, int order)
        where TLanes : struct, ILanes<TLanes>
    {
        (double cosine, double sine) = _phases[layer * (2 * MostOrder + 1) + MostOrder + order];
        return ComplexLanes<TLanes>.Broadcast(cosine, sine);
    }

    private void Add(in PlanPiece piece)
    {
        switch (piece.Step)
        {
            case PlanStep.Interface:
                Close();
                _steps.Add(new BatchStep(BatchStepKind.Interface, piece.Medium, piece.Below, -1));
                _open = new BatchLayer(piece.Below, 0, 0);
                break;
            case PlanStep.Layer:
                _open = _open with { Medium = piece.Medium, ThicknessNm = _open.ThicknessNm + piece.ThicknessNm };
                break;
            default:
                AddElement(piece);
                break;
        }
    }

    private void AddElement(in PlanPiece piece)
    {
        // The planes of a row lie at its centers, where it is the same seen from above and from below.
        ElementKind kind = Stack.Kinds[piece.Kind];
        double reachNm = kind is RodKind ? kind.HeightNm / 2 : 0;
        _open = _open with { ThicknessNm = _open.ThicknessNm + reachNm, ShiftNm = piece.ShiftNm - (_placeNm ?? piece.ShiftNm) };
        _placeNm = piece.ShiftNm;
        Close();
        _steps.Add(new BatchStep(BatchStepKind.Element, Section.Matrix, Section.Matrix, piece.Kind));
        _open = new BatchLayer(Section.Matrix, reachNm, 0);
    }

    private void Close()
    {
        double turns = _open.ShiftNm / PeriodNm;
        turns -= Math.Round(turns);
        // Half a period to the left is half a period to the right.
        if (turns < -0.5 + 1e-12)
            turns = 0.5;
        BatchLayer layer = _open with { ShiftNm = Math.Abs(turns) < 1e-14 ? 0 : turns * PeriodNm };
        _open = default;
        if (layer.ThicknessNm < LeastLayerNm && layer.ShiftNm == 0)
            return;
        int number = _layers.FindIndex(layer.IsSame);
        if (number < 0)
        {
            number = _layers.Count;
            _layers.Add(layer);
        }
        _steps.Add(new BatchStep(BatchStepKind.Layer, layer.Medium, layer.Medium, number));
    }
}

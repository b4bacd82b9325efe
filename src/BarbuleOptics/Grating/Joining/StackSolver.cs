using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Joins the pieces of a plan at one wavelength, direction and resolution, and finds the fields in each.</summary>
/// <remarks>
/// From the far end to the near one the reflection of all that lies beyond is carried from piece to piece (<see cref="ReflectionClimb"/>); then
/// amplitudes go the other way, from which all powers follow. Far sides are kept for one segment of the pieces at a time, so that memory grows
/// with the square root of their number; all but the first segment are climbed twice.
/// </remarks>
internal sealed class StackSolver
{
    private const int LeastSegment = 64;

    private readonly StackPlan _plan;
    private readonly KindSolver[] _kinds;
    private readonly int[] _groupOfKind;
    private readonly ChannelTable[] _tables;
    private readonly Dictionary<int, StackScratch> _scratches = [];
    private readonly int _segment;
    private StackScratch _scratch = null!;
    private Resolution _resolution;
    private bool _isJoined;
    private bool _fromBelow;

    public StackSolver(StackPlan plan)
    {
        _plan = plan;
        var shared = new SharedAnswers();
        _kinds = [.. plan.Kinds.Select(kind => new KindSolver(kind, shared))];
        _groupOfKind = new int[_kinds.Length];
        foreach (PlanPiece piece in plan.Pieces)
        {
            if (piece.Step == PlanStep.Element)
                _groupOfKind[piece.Kind] = piece.Group;
        }
        _tables = [.. plan.Groups.Select(_ => new ChannelTable())];
        _segment = Math.Max(LeastSegment, (int)Math.Ceiling(Math.Sqrt(plan.Pieces.Length)));
    }

    /// <summary>The plan.</summary>
    public StackPlan Plan => _plan;

    /// <summary>The channels at the top.</summary>
    public ChannelTable Top => _tables[0];

    /// <summary>The channels at the bottom.</summary>
    public ChannelTable Bottom => _tables[_isJoined ? ^1 : 0];

    /// <summary>Whether groups of different spacing are joined by their zeroth order alone.</summary>
    public bool IsJoined => _isJoined;

    /// <summary>Solves every kind of element.</summary>
    /// <param name="light">The incident light.</param>
    /// <param name="media">Permittivities of all media.</param>
    /// <param name="resolution">How finely.</param>
    /// <param name="field">Which fields are followed.</param>
    /// <param name="periodNm">The period of all groups; null when each keeps its own and the zeroth order joins them.</param>
    /// <returns>False where an element has no finite solution.</returns>
    public bool TryPrepare(in PointLight light, ReadOnlySpan<Complex> media, in Resolution resolution, RodField field, double? periodNm)
    {
        _isJoined = periodNm is null;
        _resolution = resolution;
        for (int group = 0; group < (_isJoined ? _tables.Length : 1); group++)
        {
            // Without rows any period will do: only the zeroth order is asked for.
            double period = periodNm ?? _plan.Groups[group].PeriodNm;
            _tables[group].Set(light, period > 0 ? period : light.WavelengthNm, media, _plan.Section.Materials.Count, resolution.Orders, field);
        }
        int channels = _tables[0].Channels;
        if (!_scratches.TryGetValue(channels, out StackScratch? scratch))
            scratch = _scratches[channels] = new StackScratch(channels, _kinds.Length);
        _scratch = scratch;
        for (int kind = 0; kind < _kinds.Length; kind++)
        {
            if (!_kinds[kind].TryScatter(TableOf(_groupOfKind[kind]), resolution, scratch.Block(kind)))
                return false;
        }
        return true;
    }

    /// <summary>Finds what the stack reflects; it is left in <see cref="Total"/>.</summary>
    /// <param name="fromBelow">Whether the light comes from below, where nothing else is reflected then.</param>
    /// <returns>False where there is no finite solution.</returns>
    public bool TryClimb(bool fromBelow)
    {
        _fromBelow = fromBelow;
        _scratch.Current.SetZero();
        for (int segment = Segments - 1; segment >= 0; segment--)
        {
            if (Segments > 1)
                _scratch.Boundary(segment).CopyFrom(_scratch.Current);
            if (!TryClimbSegment(segment))
                return false;
        }
        return true;
    }

    /// <summary>What the whole stack reflects; valid from <see cref="TryClimb"/> until the amplitudes are asked for in a stack of several segments.</summary>
    public Reflection Total => _scratch.Current;

    /// <summary>Finds the amplitudes that leave the far end.</summary>
    /// <param name="entering">Amplitudes that enter.</param>
    /// <param name="leaving">Receives those that leave at the far end.</param>
    /// <param name="byMaterial">Receives, by adding, the power lost in each material; empty when not asked for. The medium of a
    /// coherent backing counts as the last element, one more than the section has materials.</param>
    /// <returns>False where there is no finite solution.</returns>
    public bool TryDescend(ReadOnlySpan<Complex> entering, Span<Complex> leaving, Span<double> byMaterial)
    {
        entering.CopyTo(_scratch.Near);
        for (int segment = 0; segment < Segments; segment++)
        {
            // After a climb the first segment's far sides stand; so do they after a descent in a stack of one segment.
            if (Segments > 1)
            {
                _scratch.Current.CopyFrom(_scratch.Boundary(segment));
                if (!TryClimbSegment(segment))
                    return false;
            }
            int end = Math.Min(_plan.Pieces.Length, (segment + 1) * _segment);
            for (int place = segment * _segment; place < end; place++)
                Descend(place, byMaterial);
        }
        _scratch.Near.AsSpan(0, leaving.Length).CopyTo(leaving);
        return true;
    }

    /// <summary>From now on losses are told apart by material.</summary>
    public void SplitLosses() => _resolution = _resolution with { SplitsLosses = true };

    private int Segments => Math.Max(1, (_plan.Pieces.Length + _segment - 1) / _segment);

    private ChannelTable TableOf(int group) => _tables[_isJoined ? group : 0];

    // Places count from where the light comes.
    private ref readonly PlanPiece PieceAt(int place) => ref _plan.Pieces[_fromBelow ? _plan.Pieces.Length - 1 - place : place];

    private bool TryClimbSegment(int segment)
    {
        int first = segment * _segment;
        for (int place = Math.Min(_plan.Pieces.Length, first + _segment) - 1; place >= first; place--)
        {
            ref readonly PlanPiece piece = ref PieceAt(place);
            if (place + 1 < _plan.Pieces.Length && TrySetPhases(PieceAt(place + 1), piece))
                _scratch.Current.Rotate(_scratch.Phases, _scratch.Conjugates);
            _scratch.FarSide(place - first).CopyFrom(_scratch.Current);
            if (!TryClimbPiece(piece, place - first))
                return false;
        }
        return true;
    }

    private bool TryClimbPiece(in PlanPiece piece, int slot)
    {
        ChannelTable table = TableOf(piece.Group);
        switch (piece.Step)
        {
            case PlanStep.Layer:
                SetFactors(table, piece);
                _scratch.Current.ThroughLayer(_scratch.Factors);
                return true;
            case PlanStep.Interface:
                (int near, int far) = Sides(piece);
                return _scratch.Climb.TryInterface(table.Eta(near), table.Eta(far), _scratch.Current, _scratch.Passed(slot));
            case PlanStep.Element:
                return _scratch.Climb.TryElement(_scratch.Block(piece.Kind), _fromBelow, _scratch.Current, _scratch.Passed(slot));
            default:
                if (_isJoined)
                    KeepZeroth(table, _scratch.Current);
                return true;
        }
    }

    private void Descend(int place, Span<double> byMaterial)
    {
        ref readonly PlanPiece piece = ref PieceAt(place);
        if (place > 0 && TrySetPhases(PieceAt(place - 1), piece))
            Multiply(_scratch.Near, _scratch.Phases);
        int slot = place % _segment;
        Reflection far = _scratch.FarSide(slot);
        ChannelTable table = TableOf(piece.Group);
        Span<Complex> near = _scratch.Near;
        switch (piece.Step)
        {
            case PlanStep.Layer:
                DescendLayer(piece, table, far, byMaterial);
                break;
            case PlanStep.Interface when far.IsDiagonal:
                (int nearMedium, int farMedium) = Sides(piece);
                for (int i = 0; i < near.Length; i++)
                    near[i] *= ReflectionClimb.Passed(table.Eta(nearMedium)[i], table.Eta(farMedium)[i], far.Diagonal[i]);
                break;
            case PlanStep.Interface:
                Pass(slot);
                break;
            case PlanStep.Element:
                DescendElement(piece, table, far, slot, byMaterial);
                break;
            default:
                if (_isJoined)
                    DescendJoint(piece, far, byMaterial);
                break;
        }
    }

    private void DescendLayer(in PlanPiece piece, ChannelTable table, Reflection far, Span<double> byMaterial)
    {
        SetFactors(table, piece);
        Span<Complex> near = _scratch.Near, entered = _scratch.Work, back = _scratch.Back;
        near.CopyTo(entered);
        Multiply(near, _scratch.Factors);
        if (byMaterial.IsEmpty || table.Permittivity(piece.Medium).Imaginary == 0)
            return;
        far.Apply(near, back);
        double lost = 0;
        for (int channel = 0; channel < near.Length; channel++)
            lost += LayerLoss.Of(table, channel, piece.Medium, piece.ThicknessNm, entered[channel], back[channel]);
        // The backing, the only layer that is none of the section's materials, has the last place.
        byMaterial[Math.Min(piece.Medium, _plan.Section.Materials.Count)] += lost;
    }

    private void DescendElement(in PlanPiece piece, ChannelTable table, Reflection far, int slot, Span<double> byMaterial)
    {
        if (byMaterial.IsEmpty)
        {
            Pass(slot);
            return;
        }
        Span<Complex> entered = _scratch.Factors, back = _scratch.Back;
        _scratch.Near.CopyTo(entered);
        Pass(slot);
        far.Apply(_scratch.Near, back);
        Span<double> ofSection = byMaterial[.._plan.Section.Materials.Count];
        if (_fromBelow)
            _kinds[piece.Kind].AddLoss(table, _resolution, back, entered, ofSection);
        else
            _kinds[piece.Kind].AddLoss(table, _resolution, entered, back, ofSection);
    }

    // What the other orders carry to the joint, from either side, is lost in the matrix, if it absorbs; else they carry nothing.
    private void DescendJoint(in PlanPiece piece, Reflection far, Span<double> byMaterial)
    {
        ChannelTable table = TableOf(_fromBelow ? piece.Group + 1 : piece.Group), beyond = TableOf(_fromBelow ? piece.Group : piece.Group + 1);
        ReadOnlySpan<Complex> eta = table.Eta(Section.Matrix);
        Span<Complex> near = _scratch.Near, back = _scratch.Back;
        for (int channel = 0; channel < near.Length; channel++)
        {
            if (table.OrderOf(channel) == 0)
                continue;
            if (!byMaterial.IsEmpty)
                byMaterial[Section.Matrix] += eta[channel].Real * Multilayer.StableFunctions.Norm(near[channel]);
            near[channel] = Complex.Zero;
        }
        far.Apply(near, back);
        for (int channel = 0; channel < near.Length && !byMaterial.IsEmpty; channel++)
        {
            if (beyond.OrderOf(channel) != 0)
                byMaterial[Section.Matrix] += beyond.Eta(Section.Matrix)[channel].Real * Multilayer.StableFunctions.Norm(back[channel]);
        }
    }

    private static void KeepZeroth(ChannelTable table, Reflection reflection)
    {
        for (int to = 0; to < table.Channels; to++)
        {
            if (reflection.IsDiagonal)
            {
                if (table.OrderOf(to) != 0)
                    reflection.Diagonal[to] = Complex.Zero;
                continue;
            }
            for (int from = 0; from < table.Channels; from++)
            {
                if (table.OrderOf(to) != 0 || table.OrderOf(from) != 0)
                    reflection.Full[to, from] = Complex.Zero;
            }
        }
    }

    private (int Near, int Far) Sides(in PlanPiece piece) => _fromBelow ? (piece.Below, piece.Medium) : (piece.Medium, piece.Below);

    private void Pass(int slot)
    {
        _scratch.Passed(slot).Apply(_scratch.Near, _scratch.Work);
        _scratch.Work.CopyTo(_scratch.Near, 0);
    }

    private void SetFactors(ChannelTable table, in PlanPiece piece)
    {
        ReadOnlySpan<Complex> kz = table.Kz(piece.Medium);
        Span<Complex> factors = _scratch.Factors;
        for (int order = 0; order < kz.Length; order++)
        {
            double decay = Math.Exp(-kz[order].Imaginary * piece.ThicknessNm);
            (double sine, double cosine) = Math.SinCos(kz[order].Real * piece.ThicknessNm);
            factors[order] = new Complex(decay * cosine, decay * sine);
        }
        if (factors.Length > kz.Length)
            factors[..kz.Length].CopyTo(factors[kz.Length..]);
    }

    /// <summary>Phases from the place of one piece to that of the next; false when they count from the same place.</summary>
    private bool TrySetPhases(in PlanPiece from, in PlanPiece to)
    {
        // Across a joint the zeroth order alone goes on, which has no such phase.
        ChannelTable table = TableOf(to.Group);
        double turns = (to.ShiftNm - from.ShiftNm) / table.Waves.PeriodNm;
        turns -= Math.Round(turns);
        if (Math.Abs(turns) < 1e-14)
            return false;
        for (int channel = 0; channel < table.Channels; channel++)
        {
            double angle = 2 * Math.PI * turns * table.OrderOf(channel);
            (double sine, double cosine) = Math.SinCos(angle);
            _scratch.Phases[channel] = new Complex(cosine, sine);
            _scratch.Conjugates[channel] = new Complex(cosine, -sine);
        }
        return true;
    }

    private static void Multiply(Span<Complex> values, ReadOnlySpan<Complex> factors)
    {
        for (int i = 0; i < values.Length; i++)
            values[i] *= factors[i];
    }
}

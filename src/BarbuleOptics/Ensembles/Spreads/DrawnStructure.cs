using BarbuleOptics.Anatomy;
using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>A structure whose lengths are numbers, from the lengths of one draw; a length that cannot be is brought to the nearest that can.</summary>
/// <remarks>Only lengths that are drawn are ever moved. Sizes stay above 0, cores inside their bodies, neighbors in a row and rows of one layer at the least in touch,
/// a cortex at 0 or above. What a clamp on one length cannot mend (layers that reach into each other, bodies of one cell) shows when the section is laid
/// out (<see cref="SectionDrawer"/>).</remarks>
internal ref struct DrawnStructure
{
    private const double LeastSizeNm = 0.1;
    private const double LeastCoreNm = 1e-3;
    private const double MostCoreShare = 0.999;
    private const double MostObliquityDegrees = 85;
    private const double LeastScale = 0.05;

    private readonly Barbule _barbule;
    private readonly ReadOnlySpan<DrawSlot> _slots;
    private readonly Span<double> _lengthsNm;
    private readonly ReadOnlySpan<int> _rowCounts;
    private readonly bool _separateRows;
    private int _at;

    private DrawnStructure(Barbule barbule, ReadOnlySpan<DrawSlot> slots, Span<double> lengthsNm, ReadOnlySpan<int> rowCounts, bool separateRows)
    {
        _barbule = barbule;
        _slots = slots;
        _lengthsNm = lengthsNm;
        _rowCounts = rowCounts;
        _separateRows = separateRows;
    }

    /// <summary>The structure of one draw.</summary>
    /// <param name="barbule">As measured.</param>
    /// <param name="slots">Its lengths, see <see cref="StructureSlots"/>.</param>
    /// <param name="lengthsNm">The lengths drawn, one a slot; those that cannot be are changed here to what was taken.</param>
    /// <param name="rowCounts">Rows of each layer.</param>
    /// <param name="separateRows">Whether each row becomes a layer of its own.</param>
    public static Barbule Of(Barbule barbule, ReadOnlySpan<DrawSlot> slots, Span<double> lengthsNm, ReadOnlySpan<int> rowCounts, bool separateRows)
        => new DrawnStructure(barbule, slots, lengthsNm, rowCounts, separateRows).Make();

    private Barbule Make()
    {
        MeasuredLength? cortex = _barbule.Cortex is null ? null : Take(0);
        var layers = new List<BarbuleLayer>();
        for (int l = 0; l < _barbule.Layers.Count; l++)
        {
            BarbuleLayer layer = _barbule.Layers[l];
            if (_separateRows)
                AddRows(layers, layer, layer.Rows.Central);
            else
                layers.Add(Whole(layer, _rowCounts[l]));
        }
        Back? back = _barbule.Back is null ? null : _barbule.Back with { Thickness = Take(LeastSizeNm) };
        return WithFactors(_barbule with { Cortex = cortex, Layers = [.. layers], Back = back });
    }

    private readonly Barbule WithFactors(Barbule drawn)
    {
        int factors = MeasuredFactors.Of(_barbule).Count();
        Span<double> values = _lengthsNm.Slice(_at, factors), constants = _lengthsNm[(_at + factors)..];
        for (int i = 0; i < values.Length; i++)
        {
            // A cosine and a scale above 0, a shrinkage below 1.
            DrawSlot slot = _slots[_at + i];
            (double least, double most) = slot.Unit == "deg" ? (0, MostObliquityDegrees) : slot.Key.EndsWith("scale", StringComparison.Ordinal) ? (LeastScale, 1 / LeastScale) : (1 - 1 / LeastScale, 1 - LeastScale);
            values[i] = Math.Clamp(values[i], least, most);
        }
        drawn = values.Length == 0 ? drawn : MeasuredFactors.With(drawn, values);
        return constants.Length == 0 ? drawn : UncertainConstants.With(drawn, constants);
    }

    private BarbuleLayer Whole(BarbuleLayer layer, int rows)
    {
        ValueList<Body> bodies = Bodies(layer);
        Packing? lateral = Lateral(layer, WidthNm(bodies));
        BarbuleLayer drawn = layer with { Bodies = bodies, Lateral = lateral, Rows = new RowCount([rows]) };
        if (layer.Depth is not null)
        {
            double leastNm = layer.Depth.BetweenSurfaces || rows == 1 || _slots[_at].Law is null ? 0 : LeastPitchNm(drawn, _lengthsNm[_at]);
            drawn = drawn with { Depth = layer.Depth with { Distance = Take(leastNm) } };
        }
        return drawn with { Gap = Take(double.NegativeInfinity) };
    }

    // Each row a layer; the gap under it follows from the distance of the rows, and is negative where they nest.
    private void AddRows(List<BarbuleLayer> layers, BarbuleLayer layer, int rows)
    {
        var bodies = new ValueList<Body>[rows];
        double widthNm = 0;
        for (int row = 0; row < rows; row++)
        {
            bodies[row] = Bodies(layer);
            widthNm = Math.Max(widthNm, WidthNm(bodies[row]));
        }
        Packing? lateral = Lateral(layer, widthNm);
        // All rows keep one period: a separation is taken from the mean width.
        if (lateral is { BetweenSurfaces: true })
            lateral = new Packing(MeasuredLength.FromNanometres(Math.Max(widthNm, lateral.Distance.CentralNm + WidthNm(layer.Bodies))), false);
        int first = layers.Count;
        for (int row = 0; row < rows; row++)
        {
            double shift = layer.ShiftShare + (layer.Stacking == Stacking.Staggered && row % 2 == 1 ? 0.5 : 0);
            layers.Add(layer with { Bodies = bodies[row], Lateral = lateral, Rows = RowCount.One, Depth = null, ShiftShare = shift > 1 ? shift - 1 : shift, Gap = MeasuredLength.FromNanometres(0) });
        }
        if (layer.Depth is not null)
        {
            for (int row = 0; row < rows - 1; row++)
                layers[first + row] = layers[first + row] with { Gap = MeasuredLength.FromNanometres(RowGapNm(layer.Depth, layers, first, first + row)) };
            _at += rows == 1 ? 1 : 0;
        }
        layers[^1] = layers[^1] with { Gap = Take(double.NegativeInfinity) };
    }

    private double RowGapNm(Packing depth, List<BarbuleLayer> layers, int first, int row)
    {
        BarbuleLayer upper = layers[row], lower = layers[row + 1];
        if (upper.IsFilm)
        {
            double thicknessNm = ((MelanosomeForm.Film)upper.Bodies[0].Form).Thickness.CentralNm;
            return depth.BetweenSurfaces ? Take(0).CentralNm : Take(thicknessNm).CentralNm - thicknessNm;
        }
        ValueList<CellBody> above = CellOf(upper), below = CellOf(lower);
        double extentNm = above.Max(body => body.BottomNm) - below.Min(body => body.TopNm);
        double pitchNm;
        if (depth.BetweenSurfaces)
        {
            pitchNm = Math.Max(0, NestedNm(upper, lower, above, below, Take(0).CentralNm));
        }
        else
        {
            bool isClear = _slots[_at].Law is null || _lengthsNm[_at] >= extentNm;
            pitchNm = Take(isClear ? 0 : Math.Max(0, NestedNm(upper, lower, above, below, 0))).CentralNm;
        }
        // The row before last must be cleared as well; its distance is known by now.
        if (row > first)
        {
            ValueList<CellBody> beforeLast = CellOf(layers[row - 1]);
            double passedNm = layers[row - 1].Gap.CentralNm + beforeLast.Max(body => body.BottomNm) - above.Min(body => body.TopNm);
            if (passedNm + pitchNm < beforeLast.Max(body => body.BottomNm) - below.Min(body => body.TopNm))
                pitchNm = Math.Max(pitchNm, NestedNm(layers[row - 1], lower, beforeLast, below, 0) - passedNm);
        }
        return pitchNm - extentNm;
    }

    private static ValueList<CellBody> CellOf(BarbuleLayer layer) => CellBuilder.Place(layer, SpacingNm(layer), new MaterialNumbers());

    private static double SpacingNm(BarbuleLayer layer)
        => layer.Lateral!.Distance.CentralNm + (layer.Lateral.BetweenSurfaces ? WidthNm(layer.Bodies) : 0);

    private static double NestedNm(BarbuleLayer upper, BarbuleLayer lower, ValueList<CellBody> above, ValueList<CellBody> below, double clearanceNm)
    {
        double spacingNm = SpacingNm(upper), shiftNm = (lower.ShiftShare - upper.ShiftShare) * spacingNm, least = double.NegativeInfinity;
        foreach (CellBody first in above)
        {
            foreach (CellBody second in below)
                least = Math.Max(least, RowNesting.LeastDepthNm(first, second, shiftNm, spacingNm, clearanceNm));
        }
        return least;
    }

    private static double LeastPitchNm(BarbuleLayer layer, double drawnNm)
    {
        if (layer.IsFilm)
            return ((MelanosomeForm.Film)layer.Bodies[0].Form).Thickness.CentralNm;
        ValueList<CellBody> cell = CellOf(layer);
        // Rows that do not reach into each other's depth are clear whatever their shapes.
        return drawnNm >= cell.Max(body => body.BottomNm) - cell.Min(body => body.TopNm) ? 0 : RowNesting.LeastPitchNm(cell, SpacingNm(layer), layer.Stacking, 0);
    }

    private static double WidthNm(ValueList<Body> bodies)
    {
        double widest = 0;
        foreach (Body body in bodies)
            widest = Math.Max(widest, body.Form is MelanosomeForm.Film ? 0 : 2 * CellBuilder.OutlinesOf(body.Form).Outer.HalfWidthNm);
        return widest;
    }

    private Packing? Lateral(BarbuleLayer layer, double widthNm)
        => layer.Lateral is null ? null : layer.Lateral with { Distance = Take(layer.Lateral.BetweenSurfaces ? 0 : widthNm) };

    private ValueList<Body> Bodies(BarbuleLayer layer)
    {
        // Where the spacing is fixed it bounds the widths.
        double mostNm = layer.Lateral is { BetweenSurfaces: false } && IsFixed(layer.Lateral.Distance) ? layer.Lateral.Distance.CentralNm : double.PositiveInfinity;
        var bodies = new Body[layer.Bodies.Count];
        for (int b = 0; b < bodies.Length; b++)
            bodies[b] = layer.Bodies[b] with { Form = Form(layer.Bodies[b].Form, mostNm) };
        return ValueList.Create<Body>(bodies);
    }

    private readonly bool IsFixed(MeasuredLength length)
    {
        if (_separateRows)
            return true;
        foreach (DrawSlot slot in _slots)
        {
            if (ReferenceEquals(slot.Length, length))
                return slot.Law is null;
        }
        return true;
    }

    private MelanosomeForm Form(MelanosomeForm form, double mostWidthNm)
    {
        switch (form)
        {
            case MelanosomeForm.Rod rod:
                MeasuredLength.Exact diameter = Take(LeastSizeNm, mostWidthNm);
                return new MelanosomeForm.Rod(diameter, rod.Lumen is null ? null : Take(0, MostCoreShare * diameter.CentralNm));
            case MelanosomeForm.FlattenedRod rod:
                MeasuredLength.Exact height = Take(LeastSizeNm), width = Take(LeastSizeNm, mostWidthNm);
                bool isHollow = rod is { LumenHeight.CentralNm: > 0, LumenWidth.CentralNm: > 0 };
                MeasuredLength? lumenHeight = rod.LumenHeight is null ? null : Take(isHollow ? LeastCoreNm : 0, MostCoreShare * height.CentralNm);
                MeasuredLength? lumenWidth = rod.LumenWidth is null ? null : Take(isHollow ? LeastCoreNm : 0, MostCoreShare * width.CentralNm);
                return new MelanosomeForm.FlattenedRod(height, width, lumenHeight, lumenWidth);
            case MelanosomeForm.Platelet platelet:
                MeasuredLength.Exact thickness = Take(LeastSizeNm), breadth = Take(LeastSizeNm, mostWidthNm);
                double half = Math.Min(thickness.CentralNm, breadth.CentralNm) / 2;
                return new MelanosomeForm.Platelet(thickness, breadth, platelet.Wall is null ? null : Take(LeastCoreNm, MostCoreShare * half), platelet.CoreAir);
            case MelanosomeForm.Film:
                return new MelanosomeForm.Film(Take(LeastSizeNm));
            default:
                throw new ArgumentException("An unknown form.", nameof(form));
        }
    }

    /// <summary>The next length, brought between two bounds where it is drawn.</summary>
    private MeasuredLength.Exact Take(double leastNm, double mostNm = double.PositiveInfinity)
    {
        double nanometres = _lengthsNm[_at];
        if (_slots[_at].Law is not null)
            nanometres = _lengthsNm[_at] = Math.Max(leastNm, Math.Min(nanometres, mostNm));
        _at++;
        return new MeasuredLength.Exact(nanometres);
    }
}

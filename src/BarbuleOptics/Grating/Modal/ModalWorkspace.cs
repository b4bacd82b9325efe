using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>One sector's pieces of a slab and the chain that joins them.</summary>
internal sealed class ModalWorkspace
{
    /// <summary>Order of the thin elements that upright walls are doubled from.</summary>
    private const int UprightOrder = 6;

    /// <summary>Largest wave number times height of such an element; half of it changes R by less than 1e-8.</summary>
    private const double UprightReach = 1;

    /// <summary>Largest wave number in a material times height of a piece: below pi, no piece is a closed resonator.</summary>
    private const double PieceReach = 1.5;

    private readonly ModalSector _sector;
    private readonly FieldRecord? _record;
    private readonly CrowdedStore? _crowded;
    private readonly DepthPoint[] _points;
    private readonly DepthPoint[] _same = new DepthPoint[UprightOrder + 1];
    private readonly DepthElement?[] _elements = new DepthElement?[DepthMesh.MostOrder + 1];
    private readonly ComplexMatrix _piece;
    private readonly ComplexMatrix _double;
    private readonly ComplexMatrix _electric;
    private readonly ComplexMatrix _magnetic;

    /// <summary>Scratch for one sector.</summary>
    /// <param name="sector">The sector.</param>
    /// <param name="mostOrder">Largest incoming order.</param>
    /// <param name="crowded">Operators over crowded harmonics; null for plain ones.</param>
    /// <param name="record">Receives what the fields inside are found from; null where they are not asked for.</param>
    public ModalWorkspace(in ModalSector sector, int mostOrder, FieldRecord? record = null, CrowdedStore? crowded = null)
    {
        _record = record;
        _crowded = crowded;
        _sector = sector;
        Chain = new SlabChain(sector, mostOrder, crowded?.Planes);
        _points = new DepthPoint[DepthMesh.MostOrder + 2];
        for (int i = 0; i < _points.Length; i++)
            _points[i] = new DepthPoint(sector);
        _piece = new ComplexMatrix(2 * sector.Size, 2 * sector.Size);
        _double = new ComplexMatrix(3 * sector.Size, 3 * sector.Size);
        _electric = new ComplexMatrix(sector.Size, sector.Size);
        _magnetic = new ComplexMatrix(sector.Size, sector.Size);
    }

    /// <summary>The sector.</summary>
    public ModalSector Sector => _sector;

    /// <summary>The chain.</summary>
    public SlabChain Chain { get; }

    /// <summary>Joins all intervals to the chain.</summary>
    public bool TryJoin(ModalWaves waves, GratingWaves light, SlabInterval[] intervals, OperatorStore store, int depth)
    {
        int number = 0;
        Chain.Begin(waves, light.Matrix);
        foreach (SlabInterval interval in intervals)
        {
            bool joined = _crowded is not null
                ? TryJoinUpright(waves, light, interval, store, ref number)
                : _record is not null
                ? TryJoinElements(waves, light, interval, store, depth, ref number)
                : store.OnlyPermittivity(interval) is Complex only
                ? TryJoinLayer(waves, only, interval.ThicknessNm)
                : interval.IsUpright
                ? TryJoinUpright(waves, light, interval, store, ref number)
                : TryJoinElements(waves, light, interval, store, depth, ref number);
            if (!joined)
                return false;
        }
        return true;
    }

    private bool TryJoinLayer(ModalWaves waves, Complex permittivity, double heightNm)
    {
        double most = Complex.Sqrt(permittivity).Real * waves.K0;
        int pieces = Math.Max(1, (int)Math.Ceiling(heightNm * most / PieceReach));
        PlaneTerms.SetLayer(waves, _sector, permittivity, heightNm / pieces, _piece);
        return TryAppend(pieces);
    }

    private bool TryJoinUpright(ModalWaves waves, GratingWaves light, SlabInterval interval, OperatorStore store, ref int number)
    {
        (double steepest, double most) = WaveNumbers(waves, light);
        int pieces = Math.Max(1, (int)Math.Ceiling(interval.ThicknessNm * most / PieceReach));
        double pieceNm = interval.ThicknessNm / pieces;
        int doublings = Math.Max(0, (int)Math.Ceiling(Math.Log2(pieceNm * steepest / UprightReach)));
        if (!TrySetUpright(waves, interval, store, ref number))
            return false;
        Array.Fill(_same, _points[0]);
        if (!ElementOf(UprightOrder).TryCondense(ElementRule.Of(UprightOrder).Inside, _same, Math.ScaleB(pieceNm, -doublings), Chain.IsSymmetric, _piece))
            return false;
        for (int i = 0; i < doublings; i++)
        {
            if (!(Chain.IsSymmetric ? TryDoubleMirrored() : TryDouble()))
                return false;
        }
        return TryAppend(pieces);
    }

    private bool TrySetUpright(ModalWaves waves, SlabInterval interval, OperatorStore store, ref int number)
    {
        bool isElectric = waves.Field == RodField.Electric;
        if (_crowded is not null)
        {
            if (_crowded.At(interval, isElectric) is not CrowdedOperators crowded)
                return false;
            _points[0].Set(waves, _crowded.Slope, _crowded.Planes.Kx, crowded);
            return true;
        }
        if (store.At(number++, interval, (interval.TopNm + interval.BottomNm) / 2, isElectric) is not CutOperators operators)
            return false;
        _points[0].Set(waves, operators);
        return true;
    }

    private bool TryJoinElements(ModalWaves waves, GratingWaves light, SlabInterval interval, OperatorStore store, int depth, ref int number)
    {
        (double steepest, _) = WaveNumbers(waves, light);
        int elements = DepthMesh.Elements(interval, steepest, depth);
        bool isElectric = waves.Field == RodField.Electric;
        (ElementRule Inside, ElementRule TopTip, ElementRule BottomTip) rules = ElementRule.Of(DepthMesh.OrderAt(depth));
        DepthElement condenser = ElementOf(DepthMesh.OrderAt(depth));
        bool shared = false;
        for (int element = 0; element < elements; element++)
        {
            double topNm = DepthMesh.EdgeNm(interval, element, elements), bottomNm = DepthMesh.EdgeNm(interval, element + 1, elements);
            bool topTip = interval.TipAtTop && element == 0, bottomTip = interval.TipAtBottom && element == elements - 1 && !topTip;
            ElementRule rule = topTip ? rules.TopTip : bottomTip ? rules.BottomTip : rules.Inside;
            int count = rule.Places.Length;
            _record?.BeginElement(rule);
            for (int q = 0; q < count; q++)
            {
                double zNm = topNm + (bottomNm - topNm) * (1 + rule.Places[q]) / 2;
                // The last depth of one element is the first of the next.
                bool isShared = q == 0 && shared && rule.SharesEnds;
                _record?.AddPoint(interval, zNm, rule.Weights[q] * (bottomNm - topNm) / 2, isShared ? number - 1 : number);
                if (isShared)
                {
                    (_points[0], _points[count - 1]) = (_points[count - 1], _points[0]);
                    continue;
                }
                if (store.At(number++, interval, zNm, isElectric) is not CutOperators operators)
                    return false;
                _points[q].Set(waves, operators);
            }
            shared = rule.SharesEnds;
            if (!condenser.TryCondense(rule, _points.AsSpan(0, count), bottomNm - topNm, Chain.IsSymmetric, _piece) || !TryAppend(1))
                return false;
            _record?.EndElement(condenser, Chain, bottomNm - topNm);
        }
        return true;
    }

    private DepthElement ElementOf(int order) => _elements[order] ??= new DepthElement(order, _sector.Size);

    private bool TryAppend(int times)
    {
        for (int i = 0; i < times; i++)
        {
            if (!Chain.TryAppend(_piece))
                return false;
        }
        return true;
    }

    /// <summary>Doubles a piece of upright walls whose equations are symmetric.</summary>
    /// <remarks>
    /// The piece is its own mirror image about its middle, E even and H odd there: with S = 1 for E and -1 for H, (a, b; S b S, S a S) with
    /// S b S the transpose of b. The plane between two of them has M = a + S a S, in which E and H do not mix; removing the unknowns of
    /// E and of H leaves R = -b M^-1 b^T in two parts, and a becomes a + R_E + R_H, b becomes (R_E - R_H) S.
    /// </remarks>
    private bool TryDoubleMirrored()
    {
        int size = _sector.Size, split = _sector.Electric.Count;
        _electric.Clear();
        _magnetic.Clear();
        if (!TryReduceMiddle(0, split, _electric) || !TryReduceMiddle(split, size, _magnetic))
            return false;
        for (int row = 0; row < size; row++)
        {
            for (int column = 0; column < size; column++)
            {
                Complex electric = _electric[row, column], magnetic = _magnetic[row, column];
                Complex other = column < split ? electric - magnetic : magnetic - electric;
                double mirror = row < split == column < split ? 1 : -1;
                Complex same = _piece[row, column] += electric + magnetic;
                _piece[size + row, size + column] = mirror * same;
                _piece[row, size + column] = other;
                _piece[size + row, column] = mirror * other;
            }
        }
        return true;
    }

    // -b M^-1 b^T for the unknowns from first to end alone.
    private bool TryReduceMiddle(int first, int end, ComplexMatrix result)
    {
        int size = _sector.Size, count = end - first;
        if (count == 0)
            return true;
        for (int row = 0; row < count; row++)
        {
            for (int column = row; column < count; column++)
                _double[row, column] = 2 * _piece[first + row, first + column];
            for (int column = 0; column < size; column++)
                _double[row, count + column] = _piece[column, size + first + row];
        }
        for (int row = 0; row < size; row++)
            _double.Row(count + row).Slice(count, size).Clear();
        if (!Elimination.TryReduceSymmetric(_double, count, count + size))
            return false;
        Elimination.MirrorUpper(_double, count, count + size);
        for (int row = 0; row < size; row++)
            _double.Row(count + row).Slice(count, size).CopyTo(result.Row(row));
        return true;
    }

    // Two equal pieces one below the other; the plane between them comes first and is removed.
    private bool TryDouble()
    {
        int size = _sector.Size;
        for (int row = 0; row < size; row++)
        {
            Span<Complex> middle = _double.Row(row), top = _double.Row(size + row), bottom = _double.Row(2 * size + row);
            ReadOnlySpan<Complex> upper = _piece.Row(row), lower = _piece.Row(size + row);
            for (int column = 0; column < size; column++)
                middle[column] = upper[column] + lower[size + column];
            lower[..size].CopyTo(middle[size..]);
            upper[size..].CopyTo(middle[(2 * size)..]);
            upper[size..].CopyTo(top);
            upper[..size].CopyTo(top[size..]);
            top[(2 * size)..].Clear();
            lower[..size].CopyTo(bottom);
            bottom.Slice(size, size).Clear();
            lower[size..].CopyTo(bottom[(2 * size)..]);
        }
        if (!Elimination.TryReduce(_double, size, 3 * size))
            return false;
        for (int row = 0; row < 2 * size; row++)
            _double.Row(size + row)[size..].CopyTo(_piece.Row(row));
        return true;
    }

    /// <summary>The largest wave number in depth of any harmonic, and that of a plane wave in the densest material, in 1/nm.</summary>
    private static (double Steepest, double Most) WaveNumbers(ModalWaves waves, GratingWaves light)
    {
        double most = 0;
        foreach (Complex permittivity in light.Permittivities)
            most = Math.Max(most, Complex.Sqrt(permittivity).Magnitude * waves.K0);
        // The same for all directions within the first zone, so that meshes and what is kept for them last.
        double zone = 2 * Math.PI / light.PeriodNm;
        return (Math.Max(most, zone * (waves.Harmonics + Math.Max(0.5, Math.Abs(light.Kx0) / zone))), most);
    }
}

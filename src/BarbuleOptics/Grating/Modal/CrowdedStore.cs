using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>Crowded operators of all intervals of a slab, kept for as long as wavelength and ky stay the same.</summary>
internal sealed class CrowdedStore
{
    private readonly Dictionary<SlabInterval, Entry> _entries = new(ReferenceEqualityComparer.Instance);
    private readonly SlabShape _shape;
    private readonly WallCrowding _crowding;
    private readonly int _harmonics;
    private readonly Complex[] _coefficients;
    private readonly ComplexMatrix _matrix;
    private readonly LinearSolver _solver;
    private readonly ComplexMatrix _slopeInverse;
    private Complex[] _permittivities = [];
    private double _alpha;

    /// <summary>A store of the operators over harmonics up to N.</summary>
    public CrowdedStore(SlabShape shape, WallCrowding crowding, int harmonics)
    {
        int count = 2 * harmonics + 1;
        (_shape, _crowding, _harmonics) = (shape, crowding, harmonics);
        _coefficients = new Complex[2 * count - 1];
        _matrix = new ComplexMatrix(count, count);
        _solver = new LinearSolver(count);
        Slope = new ComplexMatrix(count, count);
        _slopeInverse = new ComplexMatrix(count, count);
        for (int stretch = 0; stretch < crowding.Stretches; stretch++)
            crowding.AddSlope(stretch, Complex.One, _coefficients);
        Fill(Slope);
        TryInvert(Slope, _slopeInverse);
        Planes = new CrowdedPlanes(crowding, Slope, harmonics, shape.PeriodNm);
    }

    /// <summary>[f].</summary>
    public ComplexMatrix Slope { get; }

    /// <summary>What plane waves are in the crowded harmonics.</summary>
    public CrowdedPlanes Planes { get; }

    /// <summary>Forgets everything unless it was made for these numbers.</summary>
    public void Use(ReadOnlySpan<Complex> permittivities, double alpha)
    {
        if (alpha == _alpha && permittivities.SequenceEqual(_permittivities))
            return;
        _permittivities = permittivities.Length == _permittivities.Length ? _permittivities : new Complex[permittivities.Length];
        permittivities.CopyTo(_permittivities);
        _alpha = alpha;
        foreach (Entry entry in _entries.Values)
            entry.Built = 0;
    }

    /// <summary>The operators of an interval; null where an inverse does not exist.</summary>
    public CrowdedOperators? At(SlabInterval interval, bool isElectric)
    {
        if (!_entries.TryGetValue(interval, out Entry? entry))
            entry = _entries[interval] = new Entry(new CrowdedOperators(_harmonics), MaterialsOf(interval));
        int needed = isElectric ? 1 : 2;
        if (entry.Built < needed)
        {
            if (!TryBuild(entry, isElectric))
                return null;
            entry.Built = needed;
        }
        return entry.Operators;
    }

    /// <summary>Material of each stretch.</summary>
    public int[] MaterialsOf(SlabInterval interval)
    {
        var cut = new SlabCut(_shape);
        cut.Set(interval, (interval.TopNm + interval.BottomNm) / 2);
        return [.. Enumerable.Range(0, _crowding.Stretches).Select(stretch => cut.MaterialBetween(_crowding.MiddleXNm(stretch)))];
    }

    private bool TryBuild(Entry entry, bool isElectric)
    {
        CrowdedOperators to = entry.Operators;
        Array.Clear(_coefficients);
        for (int stretch = 0; stretch < entry.Materials.Length; stretch++)
            _crowding.AddSlope(stretch, _permittivities[entry.Materials[stretch]], _coefficients);
        Fill(to.Permittivity);
        if (isElectric)
        {
            to.A.CopyFrom(_slopeInverse);
            return true;
        }
        double square = _alpha * _alpha;
        SetDifference(_matrix, to.Permittivity, square, Slope);
        if (!TryInvert(_matrix, to.Q))
            return false;
        Array.Clear(_coefficients);
        for (int stretch = 0; stretch < entry.Materials.Length; stretch++)
            _crowding.AddSlope(stretch, Complex.One / _permittivities[entry.Materials[stretch]], _coefficients);
        Fill(to.X);
        to.XWhole.CopyFrom(to.X);
        if (_alpha == 0)
        {
            to.A.CopyFrom(_slopeInverse);
            return true;
        }
        to.QSlope.SetProduct(to.Q, Slope);
        to.SlopeQ.SetProduct(Slope, to.Q);
        to.SlopeQSlope.SetProduct(Slope, to.QSlope);
        SetDifference(_matrix, Slope, square, to.X);
        if (!TryInvert(_matrix, to.A))
            return false;
        to.AX.SetProduct(to.A, to.X);
        to.XA.SetProduct(to.X, to.A);
        _matrix.SetProduct(to.XA, to.X);
        for (int i = 0; i < _matrix.Elements.Length; i++)
            to.XWhole.Elements[i] += square * _matrix.Elements[i];
        return true;
    }

    private void Fill(ComplexMatrix target) => FieldBasis.FillBetween(FieldBasis.All(_harmonics), FieldBasis.All(_harmonics), _coefficients, target);

    private static void SetDifference(ComplexMatrix result, ComplexMatrix first, double factor, ComplexMatrix second)
    {
        for (int i = 0; i < result.Elements.Length; i++)
            result.Elements[i] = first.Elements[i] - factor * second.Elements[i];
    }

    private bool TryInvert(ComplexMatrix matrix, ComplexMatrix inverse)
    {
        if (!_solver.TryFactor(matrix))
            return false;
        inverse.SetIdentity();
        _solver.Solve(inverse);
        return true;
    }

    private sealed class Entry(CrowdedOperators operators, int[] materials)
    {
        public CrowdedOperators Operators { get; } = operators;

        /// <summary>Material of each stretch.</summary>
        public int[] Materials { get; } = materials;

        public int Built { get; set; }
    }
}

using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Modal;

/// <summary>Operators of all depths of a slab, kept for as long as wavelength, mesh and ky stay the same.</summary>
internal sealed class OperatorStore
{
    /// <summary>Most bytes kept; operators beyond are computed anew each time.</summary>
    private const long MostBytes = 64L << 20;

    private readonly SlabShape _shape;
    private readonly int _harmonics;
    private readonly SlabCut _cut;
    private readonly CutOperatorBuilder _builder;
    private readonly List<CutOperators> _operators = [];
    private readonly List<int> _built = [];
    private readonly List<CutTransform> _transforms = [];
    private readonly CutTransform _spareTransform;
    private readonly CutOperators _spare;
    private readonly int _most;
    private Complex[] _permittivities = [];
    private double _alpha;
    private (int, int) _mesh;

    /// <summary>A store of the operators over harmonics up to N.</summary>
    public OperatorStore(SlabShape shape, int harmonics)
    {
        _shape = shape;
        _harmonics = harmonics;
        _cut = new SlabCut(shape);
        _builder = new CutOperatorBuilder(harmonics, shape.HasAxis);
        _spare = new CutOperators(harmonics);
        _spareTransform = new CutTransform(harmonics);
        int count = 2 * harmonics + 1;
        _most = (int)Math.Min(10_000, MostBytes / (3L * 16 * count * count));
    }

    /// <summary>Forgets everything unless it was made for these numbers.</summary>
    public void Use(ReadOnlySpan<Complex> permittivities, double alpha, (int, int) mesh)
    {
        if (alpha == _alpha && mesh == _mesh && permittivities.SequenceEqual(_permittivities))
            return;
        if (_permittivities.Length != permittivities.Length)
            _permittivities = new Complex[permittivities.Length];
        permittivities.CopyTo(_permittivities);
        _alpha = alpha;
        _mesh = mesh;
        for (int i = 0; i < _built.Count; i++)
            _built[i] = 0;
    }

    /// <summary>The permittivity that fills an interval wholly; null where there are walls between different ones.</summary>
    public Complex? OnlyPermittivity(SlabInterval interval)
    {
        if (interval.IsUpright)
        {
            _cut.Set(interval, (interval.TopNm + interval.BottomNm) / 2);
            if (_cut.WallCount == 0)
                return _permittivities[_cut.OnlyMaterial];
        }
        Complex matrix = _permittivities[Section.Matrix];
        foreach (int body in interval.Outers)
        {
            CellBody met = _shape.Bodies[body].Body;
            if (_permittivities[met.Material] != matrix || _permittivities[met.CoreMaterial] != matrix)
                return null;
        }
        return matrix;
    }

    /// <summary>The operators of a depth.</summary>
    /// <param name="number">Number of the depth in the mesh.</param>
    /// <param name="interval">The interval it lies in.</param>
    /// <param name="zNm">Depth below the slab's top, in nm.</param>
    /// <param name="isElectric">Whether the permittivity suffices.</param>
    /// <returns>Null where an inverse does not exist.</returns>
    public CutOperators? At(int number, SlabInterval interval, double zNm, bool isElectric)
    {
        int needed = isElectric ? 1 : 2;
        if (number >= _most)
            return Build(interval, zNm, isElectric, _spareTransform, _spare);
        while (_operators.Count <= number)
        {
            _operators.Add(new CutOperators(_harmonics));
            _transforms.Add(new CutTransform(_harmonics));
            _built.Add(0);
        }
        if (_built[number] < needed)
        {
            if (Build(interval, zNm, isElectric, _transforms[number], _operators[number]) is null)
                return null;
            _built[number] = needed;
        }
        return _operators[number];
    }

    private CutOperators? Build(SlabInterval interval, double zNm, bool isElectric, CutTransform transform, CutOperators operators)
    {
        transform.Set(_cut, interval, zNm, _permittivities.Length);
        return _builder.TryBuild(transform, _permittivities, _alpha, isElectric, operators) ? operators : null;
    }
}

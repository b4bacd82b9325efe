using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>The Fourier coefficients of one depth that depend on the bodies alone: where each material lies, and the normals.</summary>
internal sealed class CutTransform
{
    private readonly List<(int Material, Complex[] Inside)> _materials = [];
    private readonly int _length;
    private SlabInterval? _interval;
    private double _zNm;
    private int _met;

    /// <summary>Coefficients -2N..2N.</summary>
    public CutTransform(int harmonics)
    {
        _length = 4 * harmonics + 1;
        NormalXX = new Complex[_length];
        NormalXZ = new Complex[_length];
    }

    /// <summary>Coefficients of the continued n_x^2.</summary>
    public Complex[] NormalXX { get; }

    /// <summary>Coefficients of the continued n_x n_z.</summary>
    public Complex[] NormalXZ { get; }

    /// <summary>Takes a depth, unless it is the one held.</summary>
    public void Set(SlabCut cut, SlabInterval interval, double zNm, int materials)
    {
        if (ReferenceEquals(interval, _interval) && zNm == _zNm)
            return;
        (_interval, _zNm, _met) = (interval, zNm, 0);
        cut.Set(interval, zNm);
        cut.TransformNormals(NormalXX, NormalXZ);
        for (int m = 0; m < materials; m++)
        {
            if (!cut.Meets(m))
                continue;
            if (_materials.Count == _met)
                _materials.Add((m, new Complex[_length]));
            _materials[_met] = (m, _materials[_met].Inside);
            cut.TransformInside(m, _materials[_met++].Inside);
        }
    }

    /// <summary>Coefficients of a value that is constant in each material.</summary>
    public void Transform(ReadOnlySpan<Complex> byMaterial, Span<Complex> coefficients)
    {
        coefficients.Clear();
        for (int i = 0; i < _met; i++)
        {
            (int material, Complex[] inside) = _materials[i];
            Complex value = byMaterial[material];
            for (int k = 0; k < inside.Length; k++)
                coefficients[k] += value * inside[k];
        }
    }
}

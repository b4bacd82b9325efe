using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>The light at some wavelengths, one a lane, and what it makes of a medium; the formulas stand in <see cref="PlaneWave"/> and <see cref="MediumWave"/>.</summary>
internal readonly struct LightLanes<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    private readonly TLanes _index, _lateralSquared, _normalSquared;
    private readonly double _cosine;
    private readonly bool _isSteep;

    /// <summary>The light at one vector of wavelengths.</summary>
    /// <param name="surroundIndex">Index of the surround.</param>
    /// <param name="sine">Sine of the angle of incidence.</param>
    /// <param name="cosine">Its cosine.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public LightLanes(TLanes surroundIndex, double sine, double cosine)
    {
        _index = surroundIndex;
        _cosine = cosine;
        _isSteep = sine < cosine;
        _lateralSquared = surroundIndex * surroundIndex * TLanes.Broadcast(sine * sine);
        TLanes normal = surroundIndex * TLanes.Broadcast(cosine);
        _normalSquared = normal * normal;
    }

    /// <summary>Admittance of the surround in s.</summary>
    public TLanes SurroundS
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => _index * TLanes.Broadcast(_cosine);
    }

    /// <summary>Admittance of the surround in p.</summary>
    public TLanes SurroundP
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => TLanes.Broadcast(_cosine) / _index;
    }

    /// <summary>kz/k0 in s, which is the admittance, too.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> DepthS(in ComplexLanes<TLanes> y) => new ComplexLanes<TLanes>(MinusLateralSquared(y.Real), y.Imaginary).PassiveRoot();

    /// <summary>kz/k0, admittance, its inverse and the weight of |phi|^2 in the power lost, in p.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public (ComplexLanes<TLanes> Depth, ComplexLanes<TLanes> Admittance, ComplexLanes<TLanes> Inverse, TLanes PhiLoss) WaveP(
        in ComplexLanes<TLanes> x, in ComplexLanes<TLanes> z)
    {
        ComplexLanes<TLanes> index = x.PassiveRoot();
        TLanes inverse = TLanes.Broadcast(1) / z.Norm;
        TLanes loss = _lateralSquared * z.Imaginary * inverse;
        TLanes real = TLanes.MultiplyAdd(z.Real, MinusLateralSquared(z.Real), z.Imaginary * z.Imaginary) * inverse;
        ComplexLanes<TLanes> q = new ComplexLanes<TLanes>(real, loss).PassiveRoot();
        // q/index and index/q by one division.
        TLanes indexNorm = index.Norm, norm = q.Norm, both = TLanes.Broadcast(1) / (indexNorm * norm);
        ComplexLanes<TLanes> product = q * index.Conjugate;
        return (index * q, norm * both * product, indexNorm * both * product.Conjugate, loss);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private TLanes MinusLateralSquared(TLanes permittivity)
        => _isSteep ? permittivity - _lateralSquared : TLanes.SubtractProduct(_index, _index, permittivity) + _normalSquared;
}

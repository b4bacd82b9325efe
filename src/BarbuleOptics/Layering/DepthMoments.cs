using System.Numerics;

namespace BarbuleOptics.Layering;

/// <summary>Mean and first moment of one component, and the two halves that have both.</summary>
internal struct DepthMoments
{
    private Complex _mean;
    private Complex _moment;

    /// <summary>The mean.</summary>
    public readonly Complex Mean => _mean;

    /// <summary>Value of the upper half, with the lower one's of equal mean; halves that would amplify fall back to the mean.</summary>
    public readonly Complex Upper => IsPassive ? PassiveRoot.Passive(_mean - 4 * _moment) : _mean;

    /// <summary>Value of the lower half.</summary>
    public readonly Complex Lower => IsPassive ? PassiveRoot.Passive(_mean + 4 * _moment) : _mean;

    private readonly bool IsPassive => Math.Abs(4 * _moment.Imaginary) <= _mean.Imaginary * (1 + 1e-12) + 1e-15;

    /// <summary>Adds a cut of a weight (sum 1) at a place (-1/2 to 1/2).</summary>
    public void Add(Complex value, double weight, double place)
    {
        _mean += weight * value;
        _moment += weight * place * value;
    }
}

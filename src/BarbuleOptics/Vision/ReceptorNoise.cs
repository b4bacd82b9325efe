using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>How far apart two colors are to an eye whose cones are noisy, in units of which 1 is about the least difference seen.</summary>
/// <remarks>
/// dS^2 = sum over pairs i &lt; j of (e_k e_l)^2 (df_i - df_j)^2 / sum over i of (product of the e of the other three)^2, with df = ln(q_a/q_b) and the noise e of
/// <see cref="VisualSystem.Noise"/>. Source: Vorobyev and Osorio 1998, Proc. R. Soc. B 265:351, 10.1098/rspb.1998.0302; logarithms by Vorobyev et al. 1998,
/// J. Comp. Physiol. A 183:621. Brightness: |ln(q_a/q_b)| of the double cones over their Weber fraction. The model is one of thresholds: differences far
/// above 1 rank alike or unlike, no more.
/// </remarks>
public sealed class ReceptorNoise
{
    // One weight a pair of cones, all over the common denominator.
    private readonly double[] _pairs = new double[VisualSystem.SingleCount * VisualSystem.SingleCount];
    private readonly double _doubleWeberFraction;

    /// <summary>The noise of an eye.</summary>
    public ReceptorNoise(VisualSystem system)
    {
        ArgumentNullException.ThrowIfNull(system);
        _doubleWeberFraction = system.DoubleWeberFraction;
        double[] squares = [.. Enumerable.Range(0, VisualSystem.SingleCount).Select(cone => system.Noise(cone) * system.Noise(cone))];
        double all = squares.Aggregate((product, square) => product * square);
        double denominator = squares.Sum(square => all / square);
        for (int i = 0; i < VisualSystem.SingleCount; i++)
        {
            for (int j = 0; j < i; j++)
                _pairs[i * VisualSystem.SingleCount + j] = all / squares[i] / squares[j] / denominator;
        }
    }

    /// <summary>Chromatic contrast; null where a catch is not above 0, which has no logarithm. Allocates nothing.</summary>
    /// <param name="one">Adapted catches of the four single cones.</param>
    /// <param name="other">The same of the other color.</param>
    /// <exception cref="ArgumentException">There are not four.</exception>
    public double? Chromatic(ReadOnlySpan<double> one, ReadOnlySpan<double> other)
    {
        Guard.SameLength(VisualSystem.SingleCount, one.Length, nameof(one));
        Guard.SameLength(VisualSystem.SingleCount, other.Length, nameof(other));
        Span<double> differences = stackalloc double[VisualSystem.SingleCount];
        for (int i = 0; i < differences.Length; i++)
        {
            if (!(one[i] > 0 && other[i] > 0))
                return null;
            differences[i] = Math.Log(one[i] / other[i]);
        }
        double sum = 0;
        for (int i = 0; i < differences.Length; i++)
        {
            for (int j = 0; j < i; j++)
            {
                double apart = differences[i] - differences[j];
                sum += _pairs[i * VisualSystem.SingleCount + j] * apart * apart;
            }
        }
        return Math.Sqrt(sum);
    }

    /// <summary>Achromatic contrast from the catches of the double cones; null where one is not above 0.</summary>
    public double? Achromatic(double one, double other)
        => one > 0 && other > 0 ? Math.Abs(Math.Log(one / other)) / _doubleWeberFraction : null;
}

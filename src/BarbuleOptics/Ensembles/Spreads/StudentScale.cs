using MathNet.Numerics.Distributions;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>Turns normal scores into Student's t of some degrees of freedom, by equal probability.</summary>
/// <remarks>
/// <para>With P the normal and F Student's distribution, t(z) = F^-1(P(z)) solves dt/dz = p(z)/f(t), t(0) = 0; it is integrated once (Runge and Kutta, fourth
/// order) and read by cubic interpolation. Within 1e-8 relative of the closed forms for 1 and 2 degrees of freedom at probabilities from 1e-6.</para>
/// <para>Degrees of freedom need not be whole. Immutable and safe to share between threads.</para>
/// </remarks>
internal sealed class StudentScale
{
    private const double MostScore = 8.5;
    private const double Step = 1.0 / 256;
    private const int PartsOfStep = 16;

    private readonly double _degrees;
    private readonly double _logUnit;
    private readonly double[] _values;
    private readonly double[] _slopes;

    /// <param name="degrees">Degrees of freedom, 1 or above; infinity for the normal distribution itself.</param>
    public StudentScale(double degrees)
    {
        if (!(degrees >= 1))
            throw new ArgumentOutOfRangeException(nameof(degrees), degrees, "Must be 1 or above.");
        _degrees = degrees;
        int count = double.IsInfinity(degrees) ? 0 : (int)(MostScore / Step) + 1;
        (_values, _slopes) = (new double[count], new double[count]);
        if (count == 0)
            return;
        _logUnit = MathNet.Numerics.SpecialFunctions.GammaLn((degrees + 1) / 2) - MathNet.Numerics.SpecialFunctions.GammaLn(degrees / 2) - Math.Log(Math.PI * degrees) / 2;
        double t = 0, h = Step / PartsOfStep;
        for (int i = 0; i < count; i++)
        {
            (_values[i], _slopes[i]) = (t, Slope(i * Step, t));
            for (int part = 0; part < PartsOfStep; part++)
            {
                double z = i * Step + part * h;
                double first = Slope(z, t), second = Slope(z + h / 2, t + h / 2 * first), third = Slope(z + h / 2, t + h / 2 * second);
                t += h / 6 * (first + 2 * second + 2 * third + Slope(z + h, t + h * third));
            }
        }
    }

    /// <summary>The value of Student's t as probable as a normal score.</summary>
    public double Of(double score)
    {
        if (double.IsInfinity(_degrees))
            return score;
        double place = Math.Min(Math.Abs(score), MostScore) / Step;
        int left = Math.Min((int)place, _values.Length - 2);
        double u = place - left, v = 1 - u;
        double value = v * v * (1 + 2 * u) * _values[left] + u * u * (1 + 2 * v) * _values[left + 1]
            + Step * u * v * (v * _slopes[left] - u * _slopes[left + 1]);
        return Math.CopySign(value, score);
    }

    /// <summary>The normal score below which a share of all values lies.</summary>
    public static double Score(double share) => Normal.InvCDF(0, 1, share);

    // p(z)/f(t) in logarithms: both densities fall below the least double.
    private double Slope(double z, double t)
        => Math.Exp(-z * z / 2 - Math.Log(2 * Math.PI) / 2 - _logUnit + (_degrees + 1) / 2 * Math.Log(1 + t * t / _degrees));
}

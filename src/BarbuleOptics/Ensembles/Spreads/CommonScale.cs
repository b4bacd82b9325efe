using MathNet.Numerics.Distributions;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>The factor that makes normal draws of several lengths Student's t together: sqrt(nu/X), X chi-squared with nu degrees of freedom.</summary>
/// <remarks>
/// <para>With one factor for all lengths of a draw each is Student's t by itself, and so is every sum of them: an outcome linear in the lengths has the interval
/// of its degrees of freedom exactly (multivariate t: Cornish 1954, Aust. J. Phys. 7:531). Lengths drawn each from a t of its own would be too near to the normal.</para>
/// <para>With P the normal distribution and F that of X, X(z) = F^-1(P(z)) solves d ln X/dz = p(z)/(f(X) X) from the median; integrated once (Runge and Kutta, fourth
/// order), read by cubic interpolation.</para>
/// </remarks>
internal sealed class CommonScale
{
    private const double MostScore = 8.5;
    private const double Step = 1.0 / 64;
    private const int PartsOfStep = 8;

    private readonly double _degrees;
    private readonly double _logUnit;
    private readonly double[] _logs;
    private readonly double[] _slopes;
    private readonly int _middle;

    /// <param name="degrees">Degrees of freedom, 1 or above and finite.</param>
    public CommonScale(double degrees)
    {
        if (!(degrees >= 1 && double.IsFinite(degrees)))
            throw new ArgumentOutOfRangeException(nameof(degrees), degrees, "Must be finite and 1 or above.");
        _degrees = degrees;
        _logUnit = -degrees / 2 * Math.Log(2) - MathNet.Numerics.SpecialFunctions.GammaLn(degrees / 2);
        _middle = (int)(MostScore / Step);
        (_logs, _slopes) = (new double[2 * _middle + 1], new double[2 * _middle + 1]);
        double median = Math.Log(ChiSquared.InvCDF(degrees, 0.5));
        Fill(median, 1);
        Fill(median, -1);
    }

    /// <summary>The factor as probable as a normal score: large for low scores.</summary>
    public double Of(double score)
    {
        double place = Math.Clamp(score, -MostScore, MostScore) / Step + _middle;
        int left = Math.Min((int)place, _logs.Length - 2);
        double u = place - left, v = 1 - u;
        double log = v * v * (1 + 2 * u) * _logs[left] + u * u * (1 + 2 * v) * _logs[left + 1] + Step * u * v * (v * _slopes[left] - u * _slopes[left + 1]);
        return Math.Sqrt(_degrees * Math.Exp(-log));
    }

    private void Fill(double median, int side)
    {
        double log = median, h = side * Step / PartsOfStep;
        for (int i = 0; i <= _middle; i++)
        {
            (_logs[_middle + side * i], _slopes[_middle + side * i]) = (log, Slope(side * i * Step, log));
            for (int part = 0; part < PartsOfStep; part++)
            {
                double z = side * i * Step + part * h;
                double first = Slope(z, log), second = Slope(z + h / 2, log + h / 2 * first), third = Slope(z + h / 2, log + h / 2 * second);
                log += h / 6 * (first + 2 * second + 2 * third + Slope(z + h, log + h * third));
            }
        }
    }

    // p(z)/(f(x) x), x = exp(log), f(x) x = x^(nu/2) exp(-x/2)/(2^(nu/2) Gamma(nu/2)).
    private double Slope(double z, double log)
        => Math.Exp(-z * z / 2 - Math.Log(2 * Math.PI) / 2 - _logUnit - _degrees / 2 * log + Math.Exp(log) / 2);
}

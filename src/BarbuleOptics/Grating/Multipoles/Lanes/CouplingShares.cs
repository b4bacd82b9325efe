namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>Geometry factors of <see cref="RowCoupling"/>, the same at all wavelengths.</summary>
/// <param name="fill">Radius over period.</param>
internal sealed class CouplingShares(double fill)
{
    private double[] _sums = [];
    private double[] _differences = [];
    private int _top = -1;

    /// <summary>binomial(m + l, l) fill^(m + l), for m >= l.</summary>
    public double Sum(int l, int m) => _sums[l * (_top + 1) + m];

    /// <summary>(m - l)!/(l! m!) fill^(m - l), for m >= l.</summary>
    public double Difference(int l, int m) => _differences[l * (_top + 1) + m];

    /// <summary>Makes factors up to <paramref name="top"/> ready.</summary>
    public void Reserve(int top)
    {
        if (top <= _top)
            return;
        _top = top;
        (_sums, _differences) = (new double[(top + 1) * (top + 1)], new double[(top + 1) * (top + 1)]);
        for (int l = 0; l <= top; l++)
        {
            double sum = 1, difference = 1;
            for (int i = 1; i <= l; i++)
            {
                sum *= (l + i) / (double)i * fill * fill;
                difference /= (double)i * i;
            }
            for (int m = l; m <= top; m++)
            {
                _sums[l * (top + 1) + m] = sum;
                _differences[l * (top + 1) + m] = difference;
                sum *= (m + 1.0 + l) / (m + 1.0) * fill;
                difference *= (m + 1.0 - l) / (m + 1.0) * fill;
            }
        }
    }
}

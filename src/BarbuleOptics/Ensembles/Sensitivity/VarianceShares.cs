namespace BarbuleOptics.Ensembles.Sensitivity;

/// <summary>Shares of the variance of an outcome that each input explains, by the two matrices of Saltelli.</summary>
/// <remarks>
/// <para>With independent points A and B and A_i the point A whose input i is that of B, f0 the mean and V the variance of f:
/// first order S_i = mean of f(B) (f(A_i) - f(A)) / V (Saltelli et al. 2010, Comput. Phys. Commun. 181:259, 10.1016/j.cpc.2009.09.018, table 2 (b)), the share that
/// would go were the input known; total T_i = mean of (f(A) - f(A_i))^2 / (2 V) (Jansen 1999, Comput. Phys. Commun. 117:35, 10.1016/S0010-4655(98)00154-4), the share
/// that would stay were all others known. f is taken less f0, which lowers the scatter of S_i.</para>
/// <para>An outcome may have several components (a unit vector for an angle): variances and covariances add up over them.</para>
/// </remarks>
internal sealed class VarianceShares
{
    private readonly double[] _sums;
    private readonly double[] _squares;
    private readonly double[] _first;
    private readonly double[] _total;
    private readonly int _inputs;
    private readonly List<double[]> _points = [];

    /// <param name="inputs">Number of inputs, or of groups of them.</param>
    /// <param name="components">Number of components of the outcome.</param>
    public VarianceShares(int inputs, int components)
    {
        _inputs = inputs;
        Components = components;
        (_sums, _squares) = (new double[components], new double[components]);
        (_first, _total) = (new double[inputs], new double[inputs]);
    }

    /// <summary>Number of components.</summary>
    public int Components { get; }

    /// <summary>Number of points taken in.</summary>
    public int Count => _points.Count;

    /// <summary>Takes in one point: f(A), f(B), then f(A_i) of every input, all components of each.</summary>
    public void Add(ReadOnlySpan<double> values)
    {
        // What cannot be told of one of them cannot be told of the difference.
        foreach (double value in values)
        {
            if (double.IsNaN(value))
                return;
        }
        _points.Add(values.ToArray());
    }

    /// <summary>Variance over A and B, summed over components; 0 with fewer than two points.</summary>
    public double Variance { get; private set; }

    /// <summary>First-order share of an input; 0 where nothing varies.</summary>
    public double First(int input) => Variance > 0 ? _first[input] / Variance : 0;

    /// <summary>Total share of an input; 0 where nothing varies.</summary>
    public double Total(int input) => Variance > 0 ? _total[input] / Variance : 0;

    /// <summary>Computes the shares of the points taken in.</summary>
    public VarianceShares Close()
    {
        Array.Clear(_sums);
        Array.Clear(_squares);
        Array.Clear(_first);
        Array.Clear(_total);
        foreach (double[] point in _points)
        {
            for (int c = 0; c < 2 * Components; c++)
                _sums[c % Components] += point[c] / (2 * _points.Count);
        }
        foreach (double[] point in _points)
        {
            for (int c = 0; c < Components; c++)
            {
                double a = point[c] - _sums[c], b = point[Components + c] - _sums[c];
                _squares[c] += (a * a + b * b) / (2 * _points.Count);
                for (int input = 0; input < _inputs; input++)
                {
                    double mixed = point[(2 + input) * Components + c] - _sums[c];
                    _first[input] += b * (mixed - a) / _points.Count;
                    _total[input] += (a - mixed) * (a - mixed) / (2 * _points.Count);
                }
            }
        }
        Variance = _points.Count < 2 ? 0 : _squares.Sum();
        return this;
    }
}

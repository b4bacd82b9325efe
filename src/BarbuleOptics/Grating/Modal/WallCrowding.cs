using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>A coordinate u in place of x, one for a whole slab of upright walls, in which the surroundings of every wall are stretched.</summary>
/// <remarks>
/// u and x have the same period. Between two neighboring walls, L_x apart in x and L_u in u, with t from 0 to 1:
/// x = x1 + L_x (t - eta sin(2 pi t)/(2 pi)), f = dx/du = (L_x/L_u) (1 - eta cos(2 pi t)); at all walls f is the same small number, so that
/// f and its slope are continuous. Basis functions are exp(i kx0 x + i 2 pi m u/P). Adaptive spatial resolution: G. Granet,
/// J. Opt. Soc. Am. A 16, 2510 (1999) (from memory).
/// </remarks>
internal sealed class WallCrowding
{
    /// <summary>With more walls than this too few harmonics would be left to each stretch.</summary>
    private const int MostWalls = 16;

    /// <summary>Harmonics a wall below which stretching is slight.</summary>
    private const double Few = 1.15;

    private readonly double _periodNm;
    private readonly double[] _x;
    private readonly double[] _u;
    private readonly double[] _eta;

    private WallCrowding(double[] wallsNm, double periodNm, int harmonics)
    {
        int count = wallsNm.Length;
        // Harmonics to a wall: below about one they cannot follow the stretching, and do best when it is slight.
        double each = (double)harmonics / count, wanted = each < Few ? 0.7 : Math.Max(0.12, 0.56 / each), power = each < Few ? 0.85 : 0.5;
        _periodNm = periodNm;
        _x = [.. wallsNm, wallsNm[0] + periodNm];
        _u = new double[count + 1];
        _eta = new double[count];
        double sum = 0, slope = wanted;
        for (int w = 0; w < count; w++)
            sum += Math.Pow(_x[w + 1] - _x[w], power);
        for (int w = 0; w < count; w++)
        {
            double share = Math.Pow(_x[w + 1] - _x[w], power) / sum;
            _u[w + 1] = _u[w] + share * periodNm;
            slope = Math.Min(slope, 0.9 * (_x[w + 1] - _x[w]) / (share * periodNm));
        }
        for (int w = 0; w < count; w++)
            _eta[w] = 1 - slope * (_u[w + 1] - _u[w]) / (_x[w + 1] - _x[w]);
        double zero = PlaceOfZero();
        for (int w = 0; w <= count; w++)
            _u[w] -= zero;
    }

    /// <summary>Number of stretches between walls.</summary>
    public int Stretches => _eta.Length;

    /// <summary>The coordinate for harmonics -N..N between walls.</summary>
    /// <param name="wallsNm">From <see cref="WallsOf"/>.</param>
    /// <param name="shape">The slab.</param>
    /// <param name="harmonics">N.</param>
    public static WallCrowding Of(double[] wallsNm, SlabShape shape, int harmonics) => new(wallsNm, shape.PeriodNm, harmonics);

    /// <summary>Walls of a slab from left to right; null where some lean, where there are none or very many, or where the planes cut
    /// through bodies, so that the fields there are those of plane waves.</summary>
    public static double[]? WallsOf(SlabShape shape)
    {
        const double touchingNm = 1e-6;
        foreach (SlabInterval interval in shape.Intervals)
        {
            if (!interval.IsUpright)
                return null;
        }
        foreach (var placed in shape.Bodies)
        {
            double half = placed.Body.Outer.HalfHeightNm;
            if (placed.CenterNm - half < -touchingNm || placed.CenterNm + half > shape.HeightNm + touchingNm)
                return null;
        }
        var cut = new SlabCut(shape);
        var walls = new List<double>();
        foreach (SlabInterval interval in shape.Intervals)
        {
            cut.Set(interval, (interval.TopNm + interval.BottomNm) / 2);
            foreach (Wall wall in cut.Walls)
            {
                if (!walls.Exists(other => Math.Abs(Math.IEEERemainder(other - wall.XNm, shape.PeriodNm)) < touchingNm))
                    walls.Add(wall.XNm);
            }
        }
        walls.Sort();
        return walls.Count is 0 or > MostWalls ? null : [.. walls];
    }

    /// <summary>Ends in u, x and slope of a stretch at a share t of it.</summary>
    public (double U, double X, double Slope) At(int stretch, double t)
    {
        double u = _u[stretch + 1] - _u[stretch], x = _x[stretch + 1] - _x[stretch], eta = _eta[stretch];
        (double sin, double cos) = Math.SinCos(2 * Math.PI * t);
        return (_u[stretch] + u * t, _x[stretch] + x * (t - eta * sin / (2 * Math.PI)), x / u * (1 - eta * cos));
    }

    /// <summary>Widths of a stretch as shares of the period.</summary>
    public (double U, double X) Shares(int stretch) => ((_u[stretch + 1] - _u[stretch]) / _periodNm, (_x[stretch + 1] - _x[stretch]) / _periodNm);

    /// <summary>Middle of a stretch in x, in nm.</summary>
    public double MiddleXNm(int stretch) => (_x[stretch] + _x[stretch + 1]) / 2;

    /// <summary>Adds value times the coefficients of f within a stretch.</summary>
    public void AddSlope(int stretch, Complex value, Span<Complex> coefficients)
    {
        int zero = coefficients.Length / 2;
        (double share, double shareX) = Shares(stretch);
        double middle = (_u[stretch] + _u[stretch + 1]) / 2, eta = _eta[stretch];
        for (int k = 0; k <= zero; k++)
        {
            double half = Math.PI * k * share;
            double size = shareX * (Sinc(half) + eta / 2 * (Sinc(Math.PI - half) + Sinc(Math.PI + half)));
            (double sin, double cos) = Math.SinCos(2 * Math.PI * k * middle / _periodNm);
            coefficients[zero + k] += value * new Complex(size * cos, -size * sin);
            if (k > 0)
                coefficients[zero - k] += value * new Complex(size * cos, size * sin);
        }
    }

    private double PlaceOfZero()
    {
        int stretch = 0;
        double target = _periodNm * Math.Ceiling(_x[0] / _periodNm);
        while (stretch + 1 < Stretches && _x[stretch + 1] < target)
            stretch++;
        double low = 0, high = 1;
        for (int step = 0; step < 60; step++)
        {
            double middle = (low + high) / 2;
            if (At(stretch, middle).X < target)
                low = middle;
            else
                high = middle;
        }
        // x = 0 lies periods before.
        return At(stretch, (low + high) / 2).U - target;
    }

    private static double Sinc(double x) => Math.Abs(x) < 1e-12 ? 1 : Math.Sin(x) / x;
}

namespace BarbuleOptics.Spectra.Instruments;

/// <summary>A range of angles and azimuths, and interpolation between few directions in it.</summary>
/// <remarks>In the squares of the sine of the angle and of the cosine of the azimuth, on nested points in both.</remarks>
internal sealed class DirectionBox
{
    /// <summary>Highest level in either direction: 33 points.</summary>
    public const int MostLevel = 5;

    /// <summary>A range less than this needs one point.</summary>
    private const double LeastRange = 1e-7;

    private readonly double _firstSine, _sineRange, _firstAcross, _acrossRange;

    /// <summary>The range of some directions.</summary>
    /// <param name="directions">Squares of sine and of the azimuth's cosine.</param>
    public DirectionBox(IEnumerable<(double SineSquared, double AcrossShare)> directions)
    {
        (double leastSine, double mostSine, double leastAcross, double mostAcross) = (1, 0, 1, 0);
        foreach ((double sine, double across) in directions)
        {
            (leastSine, mostSine) = (Math.Min(leastSine, sine), Math.Max(mostSine, sine));
            (leastAcross, mostAcross) = (Math.Min(leastAcross, across), Math.Max(mostAcross, across));
        }
        (_firstSine, _sineRange, _firstAcross, _acrossRange) = (leastSine, mostSine - leastSine, leastAcross, mostAcross - leastAcross);
    }

    /// <summary>Highest useful level in the angle of incidence.</summary>
    public int MostSine => _sineRange < LeastRange ? 0 : MostLevel;

    /// <summary>Highest useful level in azimuth.</summary>
    public int MostAcross => _acrossRange < LeastRange ? 0 : MostLevel;

    /// <summary>Number of points at two levels.</summary>
    public static int Count(int sineLevel, int acrossLevel) => NestedNodes.Count(sineLevel) * NestedNodes.Count(acrossLevel);

    /// <summary>The points at two levels, azimuth after azimuth of one angle.</summary>
    public IEnumerable<GridDirection> Nodes(int sineLevel, int acrossLevel)
    {
        for (int i = 0; i < NestedNodes.Count(sineLevel); i++)
        {
            for (int j = 0; j < NestedNodes.Count(acrossLevel); j++)
            {
                // Rounding may leave 0 to 1 by a digit.
                double sine = Math.Clamp(_firstSine + _sineRange * NestedNodes.At(sineLevel, i), 0, 1);
                double across = Math.Clamp(_firstAcross + _acrossRange * NestedNodes.At(acrossLevel, j), 0, 1);
                // At normal incidence unpolarized light sees no azimuth.
                yield return sine < 1e-9 ? new GridDirection(0, 1, 0) : new GridDirection(sine, across, 0);
            }
        }
    }

    /// <summary>Fills the weights with which the points at two levels make up the value at a direction.</summary>
    public void Fill(double sineSquared, double acrossShare, int sineLevel, int acrossLevel, Span<double> weights)
    {
        int sines = NestedNodes.Count(sineLevel), azimuths = NestedNodes.Count(acrossLevel);
        Span<double> u = stackalloc double[sines], v = stackalloc double[azimuths];
        NestedNodes.Fill(sineLevel, Share(sineSquared, _firstSine, _sineRange), u);
        NestedNodes.Fill(acrossLevel, Share(acrossShare, _firstAcross, _acrossRange), v);
        for (int i = 0; i < sines; i++)
        {
            for (int j = 0; j < azimuths; j++)
                weights[i * azimuths + j] = u[i] * v[j];
        }
    }

    private static double Share(double value, double first, double range) => range < LeastRange ? 0.5 : Math.Clamp((value - first) / range, 0, 1);
}

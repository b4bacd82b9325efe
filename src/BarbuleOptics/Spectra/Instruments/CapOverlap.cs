namespace BarbuleOptics.Spectra.Instruments;

/// <summary>Points and weights for integrals over the solid angle that two caps of the sphere share.</summary>
/// <remarks>
/// In polar coordinates rho, omega about the center of the one cap, the other holds |omega - omega0| &lt;= w(rho), cos w = (cos b - cos rho cos d)/(sin rho sin d), with b
/// its half angle and d the distance of the centers. Where the other holds the whole circle the rule is periodic; elsewhere Gauss points, in rho
/// on a scale that makes the edges, which go like a root, smooth.
/// </remarks>
internal sealed class CapOverlap
{
    private const int Turns = 12;

    private static readonly (double[] Points, double[] Weights) Radial = GaussRule.Of(8);
    private static readonly (double[] Points, double[] Weights) Angular = GaussRule.Of(8);

    private readonly List<(Direction At, double Weight)> _samples = [];

    /// <summary>The points with their shares of the solid angle.</summary>
    public IReadOnlyList<(Direction At, double Weight)> Samples => _samples;

    /// <summary>Finds the points.</summary>
    /// <param name="first">Center of a cap.</param>
    /// <param name="firstHalf">Its half angle, in radians, above 0.</param>
    /// <param name="second">Center of the other.</param>
    /// <param name="secondHalf">Its half angle, in radians, above 0.</param>
    public void Set(Direction first, double firstHalf, Direction second, double secondHalf)
    {
        _samples.Clear();
        double distance = first.AngleTo(second);
        if (distance >= firstHalf + secondHalf)
            return;
        if (secondHalf < firstHalf)
            (first, firstHalf, second, secondHalf) = (second, secondHalf, first, firstHalf);
        double whole = Math.Min(firstHalf, secondHalf - distance);
        if (whole > 0)
            AddCircles(first, whole);
        double from = Math.Abs(secondHalf - distance);
        if (from < firstHalf && distance > 0)
            AddArcs(first, from, firstHalf, Azimuth(first, second), distance, secondHalf);
    }

    private void AddCircles(Direction center, double half)
    {
        // The solid angle to rho grows like sin^2(rho/2): points evenly in that.
        double most = Math.Pow(Math.Sin(half / 2), 2);
        for (int i = 0; i < Radial.Points.Length; i++)
        {
            double rho = 2 * Math.Asin(Math.Sqrt(Radial.Points[i] * most)), weight = 4 * Math.PI * most * Radial.Weights[i] / Turns;
            for (int j = 0; j < Turns; j++)
                _samples.Add((center.Around(rho, 2 * Math.PI * (j + 0.5) / Turns), weight));
        }
    }

    private void AddArcs(Direction center, double from, double to, double towards, double distance, double otherHalf)
    {
        for (int i = 0; i < Radial.Points.Length; i++)
        {
            double t = Radial.Points[i], rho = from + (to - from) * t * t * (3 - 2 * t), stretch = (to - from) * 6 * t * (1 - t);
            double cosine = (Math.Cos(otherHalf) - Math.Cos(rho) * Math.Cos(distance)) / (Math.Sin(rho) * Math.Sin(distance));
            double width = Math.Acos(Math.Clamp(cosine, -1, 1));
            for (int j = 0; j < Angular.Points.Length; j++)
            {
                double azimuth = towards + width * (2 * Angular.Points[j] - 1);
                _samples.Add((center.Around(rho, azimuth), Math.Sin(rho) * stretch * Radial.Weights[i] * 2 * width * Angular.Weights[j]));
            }
        }
    }

    // The azimuth about a center, as Around counts it, at which another direction lies.
    private static double Azimuth(Direction center, Direction other)
    {
        Direction x = new Direction(1, 0, 0).TurnedWith(center), y = new Direction(0, 1, 0).TurnedWith(center);
        return Math.Atan2(other.Dot(y), other.Dot(x));
    }
}

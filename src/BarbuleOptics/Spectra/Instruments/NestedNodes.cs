namespace BarbuleOptics.Spectra.Instruments;

/// <summary>Nested Chebyshev points on an interval and the polynomials that are 1 at one of them and 0 at the others.</summary>
/// <remarks>Level 0 is the middle; level l > 0 has 2^l + 1 extreme points, among them all of the level before. Barycentric formula: J.-P. Berrut and
/// L. N. Trefethen, SIAM Review 46 (2004) 501, equations 4.2 and 5.4 (numbers from memory).</remarks>
internal static class NestedNodes
{
    private static readonly double[][] Points = [.. Enumerable.Range(0, DirectionBox.MostLevel + 1).Select(
        level => level == 0 ? [0.5] : (double[])[.. Enumerable.Range(0, (1 << level) + 1).Select(i => 0.5 - 0.5 * Math.Cos(Math.PI * i / (1 << level)))])];

    /// <summary>Number of points of a level.</summary>
    public static int Count(int level) => Points[level].Length;

    /// <summary>A point, on 0 to 1.</summary>
    public static double At(int level, int number) => Points[level][number];

    /// <summary>Fills the values of all polynomials of a level at <paramref name="x"/>, on 0 to 1.</summary>
    public static void Fill(int level, double x, Span<double> values)
    {
        int count = Count(level);
        if (level == 0)
        {
            values[0] = 1;
            return;
        }
        double sum = 0;
        for (int i = 0; i < count; i++)
        {
            double distance = x - At(level, i);
            if (Math.Abs(distance) < 1e-14)
            {
                values[..count].Clear();
                values[i] = 1;
                return;
            }
            double weight = (i % 2 == 0 ? 1 : -1) * (i == 0 || i == count - 1 ? 0.5 : 1);
            values[i] = weight / distance;
            sum += values[i];
        }
        for (int i = 0; i < count; i++)
            values[i] /= sum;
    }
}

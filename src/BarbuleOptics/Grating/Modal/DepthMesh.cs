namespace BarbuleOptics.Grating.Modal;

/// <summary>How finely depth is divided, from the harmonics, the wavelength and the heights.</summary>
/// <remarks>
/// Elements of order p crowd like 1 - cos towards tips. The largest wave number times the largest height stays below a reach, and no
/// interval has fewer elements than a least number; both are set by the fineness. Error in R by depth alone, measured on five
/// staggered rows of 120 nm rods at 170 nm, solid and with a 70 nm lumen, 300-780 nm, 0 and 30 degrees, both fields, 2 and 5
/// harmonics, against fineness 5: at most 1e-4, 2e-5, 4e-7, 5e-8 and 3e-9 at fineness 0 to 4; solid rods ten times less.
/// </remarks>
internal static class DepthMesh
{
    /// <summary>The highest order of an element.</summary>
    public const int MostOrder = 6;

    private static readonly (int Order, int Least, double Reach)[] Levels = [(3, 2, 4), (4, 2, 4), (5, 4, 3.5), (6, 5, 3), (6, 10, 1.5)];

    /// <summary>Order of elements at a fineness, 0 the coarsest.</summary>
    public static int OrderAt(int depth) => Levels[Math.Min(depth, Levels.Length - 1)].Order;

    /// <summary>Number of elements of an interval.</summary>
    /// <param name="interval">The interval.</param>
    /// <param name="steepest">The largest wave number of any harmonic in depth, real or imaginary, in 1/nm.</param>
    /// <param name="depth">Fineness, 0 the coarsest.</param>
    public static int Elements(SlabInterval interval, double steepest, int depth)
    {
        (_, int least, double reach) = Levels[Math.Min(depth, Levels.Length - 1)];
        // Beyond the finest level both go on doubling.
        double finer = Math.ScaleB(1, Math.Clamp(depth - Levels.Length + 1, 0, 10));
        double stretch = interval.TipAtTop || interval.TipAtBottom ? Math.PI / 2 : 1;
        return (int)Math.Max(least * finer, Math.Ceiling(stretch * interval.ThicknessNm * steepest * finer / reach));
    }

    /// <summary>Top of an element below the slab's top, in nm: crowded like 1 - cos towards tips, where chords grow like a square root.</summary>
    public static double EdgeNm(SlabInterval interval, int element, int elements)
    {
        double share = (double)element / elements;
        double place = (interval.TipAtTop, interval.TipAtBottom) switch
        {
            (true, true) => (1 - Math.Cos(Math.PI * share)) / 2,
            (true, false) => 1 - Math.Cos(Math.PI / 2 * share),
            (false, true) => Math.Sin(Math.PI / 2 * share),
            _ => share,
        };
        return element == elements ? interval.BottomNm : interval.TopNm + place * interval.ThicknessNm;
    }
}

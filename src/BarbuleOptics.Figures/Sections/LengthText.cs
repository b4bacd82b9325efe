using System.Globalization;

namespace BarbuleOptics.Figures.Sections;

/// <summary>How lengths are written in figures: nm, and um from ten thousand nm on.</summary>
internal static class LengthText
{
    private const double NmInUm = 1000;
    private const double LeastUm = 10;

    /// <summary>The number and its unit, parted by a space that does not break.</summary>
    public static string Of(double nm)
        => nm < LeastUm * NmInUm ? Number(nm) + "\u00a0nm" : (nm / NmInUm).ToString("0.##", CultureInfo.InvariantCulture) + "\u00a0µm";

    /// <summary>The number of nm.</summary>
    public static string Number(double nm) => nm.ToString("0.#", CultureInfo.InvariantCulture);
}

using System.Globalization;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Figures.Layout;

/// <summary>How angles are written in figures.</summary>
internal static class Degrees
{
    public static string Text(Angle angle) => angle.Degrees.ToString("0.##", CultureInfo.InvariantCulture) + "°";
}

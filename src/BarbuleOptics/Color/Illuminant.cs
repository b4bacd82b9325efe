using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>A CIE illuminant: the relative spectral power of the light that falls on the sample, 100 at 560 nm.</summary>
/// <remarks>
/// A: the formula of CIE 015. D50, D55, D65, D75: the daylight formula of CIE 015 from the correlated color temperature with
/// M1 and M2 rounded to three decimals and straight lines between the 10 nm rows of S0, S1, S2, which yields the printed 5 nm table
/// of D65 to all its digits (49.9755 at 380 nm, 82.7549 at 400 nm, 71.6091 at 700 nm). E: equal power at every wavelength.
/// </remarks>
public sealed class Illuminant
{
    // The second radiation constant was 1.4380e-2 m K when the D illuminants were fixed and 1.4388e-2 when CIE 015 was written:
    // nominal temperatures grow by that ratio, D65 to 6504 K.
    private const double RadiationConstantRatio = 1.4388 / 1.4380;

    private readonly Func<double, double> _relativePower;

    private Illuminant(string name, Func<double, double> relativePower)
    {
        Name = name;
        _relativePower = relativePower;
    }

    /// <summary>Incandescent light, 2856 K.</summary>
    public static Illuminant A { get; } = new("A", PlanckianA);

    /// <summary>Daylight of 5003 K.</summary>
    public static Illuminant D50 { get; } = Daylight("D50", 5000);

    /// <summary>Daylight of 5503 K.</summary>
    public static Illuminant D55 { get; } = Daylight("D55", 5500);

    /// <summary>Average daylight, 6504 K.</summary>
    public static Illuminant D65 { get; } = Daylight("D65", 6500);

    /// <summary>Daylight of 7504 K.</summary>
    public static Illuminant D75 { get; } = Daylight("D75", 7500);

    /// <summary>Equal energy.</summary>
    public static Illuminant E { get; } = new("E", static _ => 100);

    /// <summary>All illuminants.</summary>
    public static ValueList<Illuminant> All { get; } = [A, D50, D55, D65, D75, E];

    /// <summary>Shortest wavelength at which an illuminant is known, in nanometres.</summary>
    public const double LeastNm = DaylightComponents.FirstNm;

    /// <summary>Longest wavelength at which an illuminant is known, in nanometres.</summary>
    public const double MostNm = DaylightComponents.LastNm;

    /// <summary>The name of the CIE, for instance "D65".</summary>
    public string Name { get; }

    /// <summary>The illuminant called <paramref name="name"/>, in any case; false when there is none.</summary>
    public static bool TryFind(string? name, [NotNullWhen(true)] out Illuminant? illuminant)
    {
        illuminant = All.FirstOrDefault(candidate => string.Equals(candidate.Name, name, StringComparison.OrdinalIgnoreCase));
        return illuminant is not null;
    }

    /// <summary>The power per wavelength, relative to 100 at 560 nm.</summary>
    /// <param name="wavelength">300 to 830 nm, the span of the daylight table.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="wavelength"/> lies outside 300 to 830 nm.</exception>
    public double RelativePower(Length wavelength)
        => _relativePower(Guard.Within(wavelength.Nanometres, LeastNm, MostNm, nameof(wavelength)));

    /// <summary>The name.</summary>
    public override string ToString() => Name;

    /// <summary>CIE 015: S = 100 (560/l)^5 (exp(1.435e7/(2848 560)) - 1) / (exp(1.435e7/(2848 l)) - 1), l in nm.</summary>
    private static double PlanckianA(double wavelengthNm)
    {
        const double Exponent = 1.435e7 / 2848;
        return 100 * Math.Pow(560 / wavelengthNm, 5) * (Math.Exp(Exponent / 560) - 1) / (Math.Exp(Exponent / wavelengthNm) - 1);
    }

    private static Illuminant Daylight(string name, double nominalTemperature)
    {
        (double m1, double m2) = DaylightFactors(nominalTemperature * RadiationConstantRatio);
        return new Illuminant(name, wavelengthNm => DaylightPower(wavelengthNm, m1, m2));
    }

    /// <summary>M1 and M2 of CIE 015, section on daylight, rounded to three decimals as it prescribes; 4000 to 25,000 K.</summary>
    private static (double M1, double M2) DaylightFactors(double t)
    {
        double x = t <= 7000
            ? -4.6070e9 / (t * t * t) + 2.9678e6 / (t * t) + 0.09911e3 / t + 0.244063
            : -2.0064e9 / (t * t * t) + 1.9018e6 / (t * t) + 0.24748e3 / t + 0.237040;
        double y = -3.000 * x * x + 2.870 * x - 0.275;
        double m = 0.0241 + 0.2562 * x - 0.7341 * y;
        return (Math.Round((-1.3515 - 1.7703 * x + 5.9114 * y) / m, 3), Math.Round((0.0300 - 31.4424 * x + 30.0717 * y) / m, 3));
    }

    private static double DaylightPower(double wavelengthNm, double m1, double m2)
    {
        double position = (wavelengthNm - DaylightComponents.FirstNm) / DaylightComponents.StepNm;
        int row = Math.Min((int)position, (DaylightComponents.LastNm - DaylightComponents.FirstNm) / DaylightComponents.StepNm - 1);
        double right = position - row;
        return (1 - right) * AtRow(row, m1, m2) + right * AtRow(row + 1, m1, m2);
    }

    private static double AtRow(int row, double m1, double m2)
    {
        ReadOnlySpan<double> s = DaylightComponents.Values.Slice(3 * row, 3);
        return s[0] + m1 * s[1] + m2 * s[2];
    }
}

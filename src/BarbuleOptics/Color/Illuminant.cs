using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>A CIE illuminant or a light of one's own: the relative spectral power of the light that falls on the sample, 100 at 560 nm.</summary>
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
    private readonly double _leastNm = LeastNm;
    private readonly double _mostNm = MostNm;

    private Illuminant(string name, Func<double, double> relativePower)
    {
        Name = name;
        _relativePower = relativePower;
    }

    private Illuminant(string name, double[] wavelengthsNm, double[] powers)
        : this(name, wavelengthNm => Between(wavelengthsNm, powers, wavelengthNm))
    {
        (_leastNm, _mostNm) = (wavelengthsNm[0], wavelengthsNm[^1]);
        IsOwn = true;
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

    /// <summary>Longest wavelength, in nanometres, that a light of one's own must reach to, from <see cref="LeastNm"/> on.</summary>
    public const double LeastStopNm = 780;

    /// <summary>The name of the CIE, for instance "D65", or that of a light of one's own.</summary>
    public string Name { get; }

    /// <summary>Whether it was measured by a user and is none of the CIE's.</summary>
    public bool IsOwn { get; }

    /// <summary>A light of one's own, measured at wavelengths that reach from 300 to 780 nm; straight lines between, scaled to 100 at 560 nm.</summary>
    /// <param name="name">Its name.</param>
    /// <param name="wavelengthsNm">Ascending.</param>
    /// <param name="powers">Power per wavelength, not photons, in any unit; none below 0, above 0 at 560 nm.</param>
    /// <exception cref="ArgumentException">Numbers differ in count, do not ascend, do not cover 300 to 780 nm or are not as stated.</exception>
    public static Illuminant FromSamples(string name, ReadOnlySpan<double> wavelengthsNm, ReadOnlySpan<double> powers)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(name);
        Guard.SameLength(wavelengthsNm.Length, powers.Length, nameof(powers));
        if (wavelengthsNm.Length < 2 || !(wavelengthsNm[0] <= LeastNm && wavelengthsNm[^1] >= LeastStopNm))
            throw new ArgumentException(FormattableString.Invariant($"Must reach from {LeastNm} to {LeastStopNm} nm."), nameof(wavelengthsNm));
        for (int i = 1; i < wavelengthsNm.Length; i++)
        {
            if (!(wavelengthsNm[i] > wavelengthsNm[i - 1]))
                throw new ArgumentException("Must ascend.", nameof(wavelengthsNm));
        }
        foreach (double power in powers)
            Guard.NotNegative(power, nameof(powers));
        double[] wavelengths = wavelengthsNm.ToArray(), relative = powers.ToArray();
        double scale = 100 / Guard.Positive(Between(wavelengths, relative, 560), nameof(powers));
        return new Illuminant(name, wavelengths, [.. relative.Select(power => scale * power)]);
    }

    /// <summary>The illuminant called <paramref name="name"/>, in any case; false when there is none.</summary>
    public static bool TryFind(string? name, [NotNullWhen(true)] out Illuminant? illuminant)
    {
        illuminant = All.FirstOrDefault(candidate => string.Equals(candidate.Name, name, StringComparison.OrdinalIgnoreCase));
        return illuminant is not null;
    }

    /// <summary>The power per wavelength, relative to 100 at 560 nm.</summary>
    /// <param name="wavelength">300 to 830 nm, the span of the daylight table; for a light of one's own the span it was measured over.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="wavelength"/> lies outside that span.</exception>
    public double RelativePower(Length wavelength)
        => _relativePower(Guard.Within(wavelength.Nanometres, _leastNm, _mostNm, nameof(wavelength)));

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

    private static double Between(double[] wavelengthsNm, double[] values, double wavelengthNm)
    {
        int found = Array.BinarySearch(wavelengthsNm, wavelengthNm);
        if (found >= 0)
            return values[found];
        int upper = ~found;
        return double.Lerp(values[upper - 1], values[upper], (wavelengthNm - wavelengthsNm[upper - 1]) / (wavelengthsNm[upper] - wavelengthsNm[upper - 1]));
    }

    private static double AtRow(int row, double m1, double m2)
    {
        ReadOnlySpan<double> s = DaylightComponents.Values.Slice(3 * row, 3);
        return s[0] + m1 * s[1] + m2 * s[2];
    }
}

using System.Numerics;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>A slab whose permittivity changes along x in steps and not with depth.</summary>
/// <param name="ThicknessNm">Thickness, in nm.</param>
/// <param name="Ends">Where each stretch ends, as shares of the period: ascending, the last 1; the first stretch begins at 0.</param>
/// <param name="Permittivities">Permittivity of each stretch.</param>
internal sealed record PlainSlice(double ThicknessNm, double[] Ends, Complex[] Permittivities)
{
    /// <summary>A film.</summary>
    public PlainSlice(double thicknessNm, Complex permittivity)
        : this(thicknessNm, [1], [permittivity])
    {
    }

    public bool IsHomogeneous => Permittivities.All(e => e == Permittivities[0]);

    /// <summary>What tells slices of different modes apart.</summary>
    public string Pattern => string.Join(';', Ends.Select(end => end.ToString("F12", null))) + "|" + string.Join(';', Permittivities);

    /// <summary>Fourier coefficient of order <paramref name="m"/> of <paramref name="function"/> of the permittivity.</summary>
    public Complex Fourier(int m, Func<Complex, Complex> function)
    {
        Complex sum = 0;
        double start = 0;
        for (int i = 0; i < Ends.Length; i++)
        {
            Complex integral = m == 0 ? Ends[i] - start : (Turn(-m * start) - Turn(-m * Ends[i])) / (2 * Math.PI * m * Complex.ImaginaryOne);
            sum += function(Permittivities[i]) * integral;
            start = Ends[i];
        }
        return sum;
    }

    private static Complex Turn(double turns) => Complex.Exp(2 * Math.PI * turns * Complex.ImaginaryOne);
}

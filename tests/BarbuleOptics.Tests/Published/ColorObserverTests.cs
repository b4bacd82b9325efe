using BarbuleOptics.Color;
using BarbuleOptics.Tests.Color;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>The observer tables, read out wavelength by wavelength as the response to light of that wavelength alone.</summary>
public sealed class ColorObserverTests
{
    private const int FirstNm = 360;
    private const int BeyondNm = 830;

    // Source: spec2cie of Argyll (Debian 2.3.1), which carries the 1 nm tables of ISO/CIE 11664-1. Six printed digits on either side
    // of the quotient allow 1e-5; the 5 nm rows must agree to that. The tail of the 1931 table, below 1e-5, has fewer digits: 2e-9.
    [Theory]
    [InlineData(StandardObserver.Cie1931TwoDegree, 555, 1.0)]
    [InlineData(StandardObserver.Cie1964TenDegree, 560, 0.997340)]
    public void Every_row_of_the_five_nanometre_table_matches_spec2cie(StandardObserver observer, int referenceNm, double referenceY)
    {
        using var outside = new Spec2cie();
        double ourUnit = Ours(observer, referenceNm)[1] / referenceY;
        double theirUnit = Theirs(outside, observer, referenceNm)[1] / referenceY;
        for (int wavelengthNm = FirstNm; wavelengthNm <= 780; wavelengthNm += 5)
        {
            double[] ours = Ours(observer, wavelengthNm), theirs = Theirs(outside, observer, wavelengthNm);
            for (int k = 0; k < 3; k++)
            {
                double expected = theirs[k] / theirUnit;
                Assert.True(Math.Abs(ours[k] / ourUnit - expected) <= 1e-5 * expected + 2e-9, $"{wavelengthNm} nm, column {k}: {ours[k] / ourUnit} against {expected}");
            }
        }
    }

    // The 1 nm values between the rows: measured differences 4.9e-4 (1931) and 3.4e-3 (1964), see ColorMatchingFunctions.
    [Theory]
    [InlineData(StandardObserver.Cie1931TwoDegree, 555, 1.0, 6e-4)]
    [InlineData(StandardObserver.Cie1964TenDegree, 560, 0.997340, 4e-3)]
    public void Interpolated_rows_stay_near_the_one_nanometre_table(StandardObserver observer, int referenceNm, double referenceY, double tolerance)
    {
        using var outside = new Spec2cie();
        double ourUnit = Ours(observer, referenceNm)[1] / referenceY;
        double theirUnit = Theirs(outside, observer, referenceNm)[1] / referenceY;
        for (int wavelengthNm = 361; wavelengthNm <= 700; wavelengthNm += 3)
        {
            double[] ours = Ours(observer, wavelengthNm), theirs = Theirs(outside, observer, wavelengthNm);
            for (int k = 0; k < 3; k++)
                Assert.Equal(theirs[k] / theirUnit, ours[k] / ourUnit, tolerance);
        }
    }

    // Source: CIE 015, chromaticities of the spectral locus, 1931 observer (from memory).
    [Theory]
    [InlineData(460, 0.1440, 0.0297)]
    [InlineData(520, 0.0743, 0.8338)]
    [InlineData(560, 0.3731, 0.6245)]
    [InlineData(600, 0.6270, 0.3725)]
    [InlineData(700, 0.7347, 0.2653)]
    public void Spectral_locus_has_its_published_chromaticities(int wavelengthNm, double x, double y)
    {
        Chromaticity point = SpectralLocus.Of(StandardObserver.Cie1931TwoDegree).Points[wavelengthNm - SpectralLocus.FirstNm];
        Assert.Equal(x, point.X, 0.6e-4);
        Assert.Equal(y, point.Y, 0.6e-4);
    }

    private static double[] Ours(StandardObserver observer, int wavelengthNm)
    {
        var grid = ColorSamples.Grid(FirstNm, BeyondNm, 1);
        Tristimulus color = new Colorimeter(grid, Illuminant.E, observer).MeasureTristimulus(Line(wavelengthNm));
        return [color.X, color.Y, color.Z];
    }

    private static double[] Theirs(Spec2cie outside, StandardObserver observer, int wavelengthNm)
        => outside.Measure(FirstNm, Line(wavelengthNm), "E", observer);

    private static double[] Line(int wavelengthNm)
    {
        var line = new double[BeyondNm - FirstNm + 1];
        line[wavelengthNm - FirstNm] = 10_000;
        return line;
    }
}

using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;
using BarbuleOptics.Tests.Spectra;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>Fringes of one free film in air, in closed form.</summary>
/// <remarks>
/// R = F sin^2(b) / (1 + F sin^2(b)), b = 2 pi n d cos(t) / lambda, F = 4 r / (1 - r)^2 with r the reflectance of one face, t the angle
/// inside. Source: Born and Wolf, Principles of Optics, section 7.6 on multiple-beam fringes (number of the section from memory).
/// Maxima where b is an odd multiple of a quarter turn: 2 n d cos(t) = (m + 1/2) lambda.
/// </remarks>
public class FringeTests
{
    // Largest error seen 0.0035 nm (the film of 2 um).
    [Theory]
    [InlineData(1.55, 640)]
    [InlineData(1.55, 2000)]
    [InlineData(2.3, 450)]
    public void Peaks_lie_where_the_fringes_of_a_free_film_do(double index, double thicknessNm)
    {
        SpectrumFeatures features = SpectrumFeatures.Of(Film(index, thicknessNm, 0));
        double[] expectedNm = [.. Enumerable.Range(0, 100).Select(m => 2 * index * thicknessNm / (m + 0.5)).Where(x => x is > 301 and < 779).Order()];
        double[] foundNm = [.. features.Peaks.Select(peak => peak.WavelengthNm).Order()];

        Assert.Equal(expectedNm, foundNm, (a, b) => Math.Abs(a - b) < 0.005);
    }

    // Height F/(1+F) = ((1-n^2)/(1+n^2))^2, .169906 for n = 1.55; zeros between fringes, so half height and half prominence agree:
    // sin^2(b) = 1/(2+F), that is lambda = 2 n d / (m + 1/2 -+ (1/2 - asin(1/sqrt(2+F))/pi)). Linear crossings at 1 nm: error below 0.001 nm.
    [Fact]
    public void A_fringe_has_its_height_and_width_in_closed_form()
    {
        double order = 3.5, path = 2 * 1.55 * 640;
        double faces = Math.Pow(0.55 / 2.55, 2), finesse = 4 * faces / Math.Pow(1 - faces, 2);
        double half = 0.5 - Math.Asin(1 / Math.Sqrt(2 + finesse)) / Math.PI;
        SpectralPeak peak = SpectrumFeatures.Of(Film(1.55, 640, 0)).Peaks.Single(p => Math.Abs(p.WavelengthNm - path / order) < 1);

        Assert.Equal(0.169906, peak.Reflectance, 1e-6);
        Assert.Equal(0.1699, peak.Prominence, 5e-5);
        Assert.Equal(path / (order - half) - path / (order + half), peak.HalfHeightWidthNm!.Value, 0.002);
        Assert.Equal(peak.HalfHeightWidthNm!.Value, peak.HalfProminenceWidthNm!.Value, 0.05);
    }

    [Theory]
    [InlineData(1.55, 640, 1.0)]
    [InlineData(1.8, 500, 1.0)]
    [InlineData(1.55, 900, 1.333)]
    public void The_shift_of_a_fringe_gives_the_index_of_the_film(double index, double thicknessNm, double surroundIndex)
    {
        (Angle, SpectrumFeatures)[] views =
            [.. Enumerable.Range(0, 13).Select(i => (Angle.FromDegrees(5 * i), SpectrumFeatures.Of(Film(index, thicknessNm, 5 * i, surroundIndex))))];
        // Views start where several fringes stand equally high; whichever is followed shows the same index.
        PeakTrack track = PeakTrack.Follow(views, surroundIndex);

        Assert.Equal(index, track.EffectiveIndex!.Value, 1e-3);
    }

    // s-polarization; the index is constant, so that F depends on the angle alone.
    private static Spectrum Film(double index, double thicknessNm, double angleDeg, double surroundIndex = 1)
    {
        double sine = surroundIndex * Math.Sin(double.DegreesToRadians(angleDeg));
        double outside = Math.Sqrt(surroundIndex * surroundIndex - sine * sine), inside = Math.Sqrt(index * index - sine * sine);
        double face = Math.Pow((outside - inside) / (outside + inside), 2);
        double finesse = 4 * face / Math.Pow(1 - face, 2);
        return Sampled.Over(300, 780, 1, x =>
        {
            double wave = finesse * Math.Pow(Math.Sin(2 * Math.PI * inside * thicknessNm / x), 2);
            return wave / (1 + wave);
        });
    }
}

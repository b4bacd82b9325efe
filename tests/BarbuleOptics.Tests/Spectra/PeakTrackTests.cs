using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;
using Xunit;

namespace BarbuleOptics.Tests.Spectra;

public class PeakTrackTests
{
    private static readonly double[] EveryFifteen = [0, 15, 30, 45, 60, 75];

    // Peaks placed by the law itself; what is left is the error of the peaks, below 0.001 nm here.
    [Theory]
    [InlineData(1.3, 1.0)]
    [InlineData(1.55, 1.0)]
    [InlineData(2.0, 1.0)]
    [InlineData(1.7, 1.333)]
    public void Peaks_that_move_by_the_law_give_its_index_back(double index, double surroundIndex)
    {
        PeakTrack track = PeakTrack.Follow(Views(EveryFifteen, (angle, x) => 0.5 * Sampled.Gaussian(x, Law(620, index, surroundIndex, angle), 15)), surroundIndex);

        Assert.All(track.Sightings, sighting => Assert.NotNull(sighting.Peak));
        Assert.Equal(index, track.EffectiveIndex!.Value, 1e-4);
        Assert.Equal(620, track.Shift!.NormalWavelengthNm, 0.01);
        Assert.InRange(track.Shift.ResidualNm, 0, 0.005);
    }

    // Two peaks of different order: the main one is followed even where the other has become the higher.
    [Fact]
    public void The_peak_that_was_main_at_first_is_followed_though_another_outgrows_it()
    {
        PeakTrack track = PeakTrack.Follow(Views(EveryFifteen, (angle, x) =>
            0.3 * Sampled.Gaussian(x, Law(640, 1.6, 1, angle), 14) + (0.2 + 0.004 * angle) * Sampled.Gaussian(x, Law(430, 1.6, 1, angle), 14)));

        Assert.Equal(EveryFifteen.Select(angle => Law(640, 1.6, 1, angle)), track.Sightings.Select(s => s.Peak!.WavelengthNm),
            (a, b) => Math.Abs(a - b) < 0.05);
    }

    [Fact]
    public void A_ripple_beside_the_peak_does_not_take_its_place()
    {
        PeakTrack track = PeakTrack.Follow(Views([0, 30], (angle, x) =>
            0.4 * Sampled.Gaussian(x, Law(600, 1.3, 1, angle), 3) + (angle > 0 ? 0.01 * Sampled.Gaussian(x, Law(600, 1.55, 1, angle), 2) : 0)));

        Assert.Equal(Law(600, 1.3, 1, 30), track.Sightings[1].Peak!.WavelengthNm, 0.1);
        Assert.True(track.Sightings[1].Peak!.Prominence > 0.3);
    }

    [Fact]
    public void A_peak_that_leaves_leaves_a_gap_and_is_found_again()
    {
        PeakTrack track = PeakTrack.Follow(Views(EveryFifteen, (angle, x) =>
            angle is 30 ? 0.2 * Sampled.Gaussian(x, 750, 5) : 0.5 * Sampled.Gaussian(x, Law(560, 1.5, 1, angle), 15)));

        Assert.Equal([false, false, true, false, false, false], track.Sightings.Select(s => s.Peak is null));
        Assert.Equal(30, track.Sightings[2].Incidence.Degrees);
        Assert.Equal(1.5, track.EffectiveIndex!.Value, 1e-3);
    }

    [Fact]
    public void Tracking_starts_at_the_first_angle_with_a_peak()
    {
        PeakTrack track = PeakTrack.Follow(Views(EveryFifteen, (angle, x) => angle is 0 ? 0.1 : Sampled.Gaussian(x, Law(560, 1.5, 1, angle), 15)));

        Assert.Null(track.Sightings[0].Peak);
        Assert.Equal(1.5, track.EffectiveIndex!.Value, 1e-3);
        Assert.Equal(560, track.Shift!.NormalWavelengthNm, 0.05);
    }

    // First views so close that their shift, 0.015 nm, drowns in the error of reading; the next step is 60 degrees.
    [Fact]
    public void Angles_close_together_do_not_mislead_the_next_step()
    {
        double[] centersNm = [560, 560.03, 559.98, Law(560, 1.6, 1, 60)];
        double[] anglesDeg = [0, 0.5, 0.7, 60];
        PeakTrack track = PeakTrack.Follow(Views(anglesDeg, (angle, x) => 0.5 * Sampled.Gaussian(x, centersNm[Array.IndexOf(anglesDeg, angle)], 6)));

        Assert.Equal(centersNm[3], track.Sightings[3].Peak!.WavelengthNm, 0.05);
    }

    [Theory]
    [InlineData(1.35)]
    [InlineData(2.2)]
    public void A_first_step_of_sixty_degrees_is_bridged(double index)
    {
        PeakTrack track = PeakTrack.Follow(Views([0, 60], (angle, x) => 0.5 * Sampled.Gaussian(x, Law(640, index, 1, angle), 15)));

        Assert.Equal(index, track.EffectiveIndex!.Value, 1e-3);
    }

    [Fact]
    public void Peaks_scattered_about_the_law_give_the_index_of_a_straight_line_by_the_normal_equations()
    {
        // Unweighted by construction: two angles only, where the line passes through both.
        // n^2 = (s2 y1 - s1 y2)/(y1 - y2), y = lambda^2, s = sin^2.
        double s1 = Math.Pow(Math.Sin(Math.PI / 9), 2), s2 = Math.Pow(Math.Sin(5 * Math.PI / 18), 2), y1 = 590.0 * 590, y2 = 540.0 * 540;
        PeakTrack track = PeakTrack.Follow(Views([20, 50], (angle, x) => Sampled.Gaussian(x, angle is 20 ? 590 : 540, 15)));

        Assert.Equal(Math.Sqrt((s2 * y1 - s1 * y2) / (y1 - y2)), track.EffectiveIndex!.Value, 1e-6);
        Assert.InRange(track.Shift!.ResidualNm, 0, 1e-6);
    }

    // The sum of squares in lambda, searched on a fine raster of (index, wavelength), independent of the weighted line.
    [Fact]
    public void Noisy_peaks_give_nearly_the_least_squares_in_wavelength()
    {
        double[] errors = [1.2, -0.8, 0.5, -1.5, 0.9, 0.3];
        double[] peaks = [.. EveryFifteen.Select((angle, i) => Law(600, 1.6, 1, angle) + errors[i])];
        (double Index, double Sum) best = (0, double.PositiveInfinity);
        for (double index = 1.55; index < 1.65; index += 0.0001)
        {
            double[] shape = [.. EveryFifteen.Select(angle => Law(1, index, 1, angle))];
            double normal = peaks.Zip(shape, (p, g) => p * g).Sum() / shape.Sum(g => g * g);
            double sum = peaks.Zip(shape, (p, g) => Math.Pow(p - normal * g, 2)).Sum();
            if (sum < best.Sum)
                best = (index, sum);
        }

        PeakTrack track = PeakTrack.Follow(Views(EveryFifteen, (angle, x) => Sampled.Gaussian(x, peaks[Array.IndexOf(EveryFifteen, angle)], 15)));

        Assert.Equal(best.Index, track.EffectiveIndex!.Value, 2e-4);
        Assert.Equal(Math.Sqrt(best.Sum / peaks.Length), track.Shift!.ResidualNm, 1e-3);
    }

    [Fact]
    public void No_shift_and_a_red_shift_have_no_index()
    {
        Assert.Null(PeakTrack.Follow(Views([0, 30], (_, x) => Sampled.Gaussian(x, 500, 15))).EffectiveIndex);
        Assert.Null(PeakTrack.Follow(Views([0, 30], (angle, x) => Sampled.Gaussian(x, 500 + angle / 10, 15))).EffectiveIndex);
    }

    [Fact]
    public void One_view_no_view_and_no_peak_have_no_index()
    {
        Assert.Null(PeakTrack.Follow(Views([30], (_, x) => Sampled.Gaussian(x, 500, 15))).Shift);
        Assert.Empty(PeakTrack.Follow([]).Sightings);
        PeakTrack dark = PeakTrack.Follow(Views(EveryFifteen, (_, _) => 0));
        Assert.All(dark.Sightings, sighting => Assert.Null(sighting.Peak));
        Assert.Null(dark.Shift);
    }

    [Fact]
    public void Angles_out_of_order_or_range_and_an_impossible_surround_are_refused()
    {
        static double Flat(double angle, double x) => 0.1;
        Assert.Throws<ArgumentException>(() => PeakTrack.Follow(Views([0, 30, 30], Flat)));
        Assert.Throws<ArgumentException>(() => PeakTrack.Follow(Views([30, 0], Flat)));
        Assert.Throws<ArgumentOutOfRangeException>(() => PeakTrack.Follow(Views([90], Flat)));
        Assert.Throws<ArgumentOutOfRangeException>(() => PeakTrack.Follow(Views([-1], Flat)));
        Assert.Throws<ArgumentOutOfRangeException>(() => PeakTrack.Follow(Views([0], Flat), 0));
        Assert.Throws<ArgumentNullException>(() => PeakTrack.Follow(null!));
    }

    private static double Law(double normalNm, double index, double surroundIndex, double angleDeg)
        => normalNm * Math.Sqrt(1 - Math.Pow(surroundIndex * Math.Sin(double.DegreesToRadians(angleDeg)) / index, 2));

    private static List<(Angle, SpectrumFeatures)> Views(double[] anglesDeg, Func<double, double, double> reflectance)
        => [.. anglesDeg.Select(angle => (Angle.FromDegrees(angle), SpectrumFeatures.Of(Sampled.Over(300, 780, 1, x => reflectance(angle, x)))))];
}

using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra.Instruments;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>What an instrument collects, against solid angles and bell curves in closed form.</summary>
public sealed class InstrumentTests
{
    // Solid angle of a cap, 2 pi (1 - cos a), and the mean of sin^2 over it, 1 - (1 + cos a + cos^2 a)/3. Source: elementary integrals.
    [Theory]
    [InlineData(1)]
    [InlineData(15)]
    [InlineData(60)]
    public void A_cap_has_its_solid_angle_and_its_mean_square_sine(double halfDegrees)
    {
        double half = double.DegreesToRadians(halfDegrees), cosine = Math.Cos(half);
        var overlap = new CapOverlap();
        Direction center = Direction.InPlane(0.4);
        overlap.Set(center, half, center, 1.2 * half);
        double solid = overlap.Samples.Sum(sample => sample.Weight);
        double mean = overlap.Samples.Sum(sample => sample.Weight * Math.Pow(Math.Sin(sample.At.AngleTo(center)), 2)) / solid;
        Assert.Equal(1, solid / (2 * Math.PI * (1 - cosine)), 1e-12);
        Assert.Equal(1, mean / (1 - (1 + cosine + cosine * cosine) / 3), 1e-10);
    }

    // The area that two circles share, a^2 acos(..) + b^2 acos(..) - ..., which small caps approach. Source: Weisstein, "Circle-Circle Intersection", MathWorld,
    // equation 14 (number from memory). Caps of 1 mrad differ from it by 1e-6 of themselves; the rule by 1e-6, too (measured).
    [Theory]
    [InlineData(1, 1, 0.5)]
    [InlineData(1, 1, 1.9)]
    [InlineData(1, 0.7, 0.9)]
    [InlineData(0.4, 1, 0.61)]
    [InlineData(0.4, 1, 0.59)]
    public void Small_caps_share_what_circles_share(double first, double second, double distance)
    {
        const double Scale = 1e-3;
        var overlap = new CapOverlap();
        overlap.Set(Direction.InPlane(0.3), Scale * first, Direction.InPlane(0.3 + Scale * distance), Scale * second);
        Assert.Equal(1, overlap.Samples.Sum(sample => sample.Weight) / (Scale * Scale * CommonArea(first, second, distance)), 2e-5);
    }

    // Light of one direction on facets of normally distributed tilt, at normal incidence: a facet tilted by t sends it 2 t away, so that a cone of half angle b
    // gets 1 - exp(-b^2/(8 sd^2)), the Rayleigh distribution. Source: Johnson, Kotz and Balakrishnan, Continuous Univariate Distributions 1, chapter 18
    // (from memory). Flat angles: right to the square of the angles, 1e-3 here.
    [Theory]
    [InlineData(2, 1)]
    [InlineData(4, 1)]
    [InlineData(1, 2)]
    public void A_cone_collects_the_Rayleigh_share_of_tilted_facets(double coneDegrees, double deviationDegrees)
    {
        var instrument = new Instrument
        {
            Collection = Angle.FromDegrees(coneDegrees),
            Tilt = FacetTilt.Normal(Angle.FromDegrees(deviationDegrees)),
        };
        double expected = 1 - Math.Exp(-coneDegrees * coneDegrees / (8 * deviationDegrees * deviationDegrees));
        Assert.Equal(expected, Share(instrument, 0), 2e-3 * expected);
    }

    // The same at incidence a: a tilt out of the plane of incidence turns the beam by 2 t cos a only, a tilt in it by 2 t; a small cone then gets
    // the density at its center, b^2/(8 sd^2 cos a). Flat angles, first term: right to b^2/(16 sd^2 cos^2 a) = 0.4 %.
    [Theory]
    [InlineData(30)]
    [InlineData(60)]
    public void A_small_cone_collects_the_density_of_facets_that_face_it(double angleDegrees)
    {
        var instrument = new Instrument { Collection = Angle.FromDegrees(0.25), Tilt = FacetTilt.Normal(Angle.FromDegrees(2)) };
        double expected = 0.25 * 0.25 / (8 * 4 * Math.Cos(double.DegreesToRadians(angleDegrees)));
        Assert.Equal(1, Share(instrument, angleDegrees) / expected, 6e-3);
    }

    // An even arc to +-A across the rods, seen by a cone of half angle b < 2 A from one direction of light: b/(2 A). By hand: facets tilted up to b/2 count.
    [Theory]
    [InlineData(4, 10)]
    [InlineData(15, 20)]
    public void A_cone_collects_its_part_of_an_arc(double coneDegrees, double arcDegrees)
    {
        var instrument = new Instrument { Collection = Angle.FromDegrees(coneDegrees), Tilt = FacetTilt.Arc(Angle.FromDegrees(arcDegrees)) };
        Assert.Equal(coneDegrees / (2 * arcDegrees), Share(instrument, 0), 1e-6);
    }

    // A flat mirror in equal cones gives all, whichever angle; a mirror turned by t from cones of half angle a the share that two circles at distance 2 t share.
    [Fact]
    public void Flat_facets_give_the_signal_of_a_mirror()
    {
        var instrument = new Instrument { Light = Angle.FromDegrees(5), Collection = Angle.FromDegrees(5) };
        Assert.Equal(1, Share(instrument, 0), 1e-12);
        Assert.Equal(1, Share(instrument, 50), 1e-12);
        var oneLine = instrument with { Light = Angle.FromDegrees(1), Collection = Angle.FromDegrees(1), Arms = ArmGeometry.OneLine };
        Assert.Equal(CommonArea(1, 1, 1) / Math.PI, Share(oneLine, 0.5), 1e-4);
        Assert.Equal(0, Share(oneLine, 1.01), 0);
    }

    // A mirror sends all light of the smaller cone; a perfect matt white sends W_collection cos/pi of what falls into the larger: at normal incidence with
    // one direction of light and a cone of half angle b this is 1/sin^2 b. Source: Lambert's law, as in Wyszecki and Stiles, Color Science, 4.2 (from memory).
    [Theory]
    [InlineData(5)]
    [InlineData(30)]
    public void White_standard_stands_to_the_mirror_as_Lambert_says(double coneDegrees)
    {
        var instrument = new Instrument { Collection = Angle.FromDegrees(coneDegrees) };
        Assert.Equal(1, instrument.WhiteFactor(Angle.FromDegrees(0)) * Math.Pow(Math.Sin(double.DegreesToRadians(coneDegrees)), 2), 1e-9);
    }

    // Mean 0, variance sd^2, fourth moment 3 sd^4, sixth 15 sd^6 of the normal distribution. Source: Abramowitz and Stegun 26.2.6 (from memory).
    [Fact]
    public void Turns_of_rods_have_the_moments_of_the_normal_distribution()
    {
        const double Deviation = 0.2;
        (double Turn, double Share)[] turns = RodTurns.Of(Deviation);
        Assert.Equal(1, Moment(0), 1e-14);
        Assert.Equal(0, Moment(1), 1e-15);
        Assert.Equal(1, Moment(2), 1e-13);
        Assert.Equal(3, Moment(4), 1e-12);
        Assert.Equal(15, Moment(6), 1e-11);

        double Moment(int power) => turns.Sum(turn => turn.Share * Math.Pow(turn.Turn / Deviation, power));
    }

    // asin(NA/n). Source: definition of the numerical aperture, Born and Wolf 4.8 (from memory).
    [Fact]
    public void Numerical_aperture_is_the_index_times_the_sine_of_the_half_angle()
    {
        Assert.Equal(30, Instrument.FromAperture(0.5).Degrees, 1e-12);
        Assert.Equal(30, Instrument.FromAperture(0.75, 1.5).Degrees, 1e-12);
    }

    private static double Share(Instrument instrument, double angleDegrees)
        => new LocalDirections(instrument, Angle.FromDegrees(angleDegrees), Angle.FromDegrees(0)).Share;

    private static double CommonArea(double a, double b, double d)
    {
        if (d <= Math.Abs(a - b))
            return Math.PI * Math.Min(a, b) * Math.Min(a, b);
        double first = Math.Acos((d * d + a * a - b * b) / (2 * d * a)), second = Math.Acos((d * d + b * b - a * a) / (2 * d * b));
        return a * a * first + b * b * second - 0.5 * Math.Sqrt((-d + a + b) * (d + a - b) * (d - a + b) * (d + a + b));
    }
}

using BarbuleOptics.Vision;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>Sensitivities of cones, tetrahedral coordinates and contrasts against what was published or done by hand from published formulas.</summary>
public sealed class BirdVisionTests
{
    // Computed twice by independent methods (another language, the formulas of Govardovskii et al. 2000, Vis. Neurosci. 17:509, from memory); six digits.
    [Theory]
    [InlineData(500, 450, 0.568031)]
    [InlineData(500, 500, 1.001010)]
    [InlineData(500, 550, 0.433568)]
    [InlineData(567, 517, 0.636229)]
    [InlineData(567, 567, 1.000930)]
    [InlineData(567, 617, 0.528917)]
    public void The_pigment_template_has_the_values_of_its_formula(double peakNm, double wavelengthNm, double absorbance)
        => Assert.Equal(absorbance, PigmentTemplate.Absorbance(peakNm, wavelengthNm), 6e-7);

    // Govardovskii et al. 2000 (from memory): the alpha band peaks at 1 where it says it does, and the beta band of a pigment of 500 nm
    // has 0.26 of its height, at 189 + 0.315 x 500 = 346.5 nm.
    [Fact]
    public void The_bands_of_the_template_peak_where_the_paper_says()
    {
        Assert.Equal(0.26, PigmentTemplate.Beta(500, 346.5), 1e-12);
        foreach (double peakNm in (double[])[357, 425, 500, 567, 620])
        {
            double best = Enumerable.Range(0, 4001).Select(i => 300 + 0.1 * i).MaxBy(nm => PigmentTemplate.Alpha(peakNm, nm));
            Assert.Equal(peakNm, best, 0.5);
            Assert.Equal(1, PigmentTemplate.Alpha(peakNm, best), 0.002);
        }
    }

    // The constants of Hart and Vorobyev 2005, J. Comp. Physiol. A 191:381 (from memory), by hand: at the cut-off T = exp(-e^1.08) = exp(-2.944680) = 0.052619;
    // at the middle T = exp(-e^(1.08 - 1.445)) = exp(-0.694197) = 0.499476, the half that the middle is named for.
    [Fact]
    public void An_oil_droplet_passes_a_twentieth_at_the_cut_off_and_half_at_the_middle()
    {
        var droplet = new OilDroplet(511, 525);
        Assert.Equal(0.052619, droplet.Transmittance(511), 1e-6);
        Assert.Equal(0.499476, droplet.Transmittance(525), 1e-6);
        Assert.Equal(0, droplet.Transmittance(420), 1e-12);
        Assert.Equal(1, droplet.Transmittance(650), 1e-5);
    }

    // Source: mallard, Hart and Hunt 2007, Am. Nat. 169:S7, 10.1086/510141, as quoted with effective peaks 472, 534, 601 nm. No number here is fitted: pigments,
    // cut-offs and middles are the published ones. Largest difference measured 2 nm.
    [Theory]
    [InlineData(449, 445, 461, 472)]
    [InlineData(501, 506, 524, 534)]
    [InlineData(570, 561, 588, 601)]
    public void Cones_of_the_mallard_peak_where_they_were_found_to(double pigmentNm, double cutNm, double midNm, double peakNm)
        => Assert.Equal(peakNm, new Cone(pigmentNm, new OilDroplet(cutNm, midNm)).PeakNm(new OcularMedia(300, 1)), 3.0);

    // Source: Hart 2002, J. Exp. Biol. 205:3925, 10.1242/jeb.205.24.3925 (abstract): 432, 477, 537, 605 nm. Ours: 429.2, 478.6, 537.1, 604.7. The slopes of the peafowl's droplets and the edge of its
    // media were chosen with these peaks in view, so that this holds the end-to-end sum, not each number; the mallard above holds the formulas.
    [Fact]
    public void Cones_of_the_peafowl_peak_where_they_were_found_to()
    {
        double[] published = [432, 477, 537, 605];
        for (int cone = 0; cone < published.Length; cone++)
            Assert.Equal(published[cone], VisualSystems.Peafowl.SingleCones[cone].PeakNm(VisualSystems.Peafowl.Media), 3.0);
    }

    // Source: Endler and Mielke 2005, Biol. J. Linn. Soc. 86:405, effective peaks of average eyes (from memory). Theirs are means of other species than ours:
    // measured differences up to 2 nm (ultraviolet) and 6 nm (violet).
    [Fact]
    public void Average_eyes_peak_near_those_of_others()
    {
        Check(VisualSystems.Ultraviolet, [372, 456, 544, 609], 3);
        Check(VisualSystems.Violet, [416, 478, 542, 607], 7);

        static void Check(VisualSystem system, double[] publishedNm, double toleranceNm)
        {
            for (int cone = 0; cone < publishedNm.Length; cone++)
                Assert.Equal(publishedNm[cone], system.SingleCones[cone].PeakNm(system.Media), toleranceNm);
        }
    }

    // Ranges of pigments: Church et al. 2001, J. Exp. Biol. 204:2491, introduction. Half transmission of the media, 323 and 358 nm: Lind et al. 2014,
    // 10.1098/rspb.2013.2209 (abstract); 310-398 nm over species: J. Exp. Biol. 224:jeb243129 (abstract).
    [Fact]
    public void Every_eye_lies_within_what_was_found_in_birds()
    {
        foreach (VisualSystem system in VisualSystems.All)
        {
            (double, double) shortest = system.ShortestName == "ultraviolet" ? (355, 376) : (402, 426);
            (double Least, double Most)[] ranges = [shortest, (430, 463), (497, 509), (543, 571)];
            for (int cone = 0; cone < ranges.Length; cone++)
                Assert.InRange(system.SingleCones[cone].PigmentNm, ranges[cone].Least, ranges[cone].Most);
            Assert.InRange(system.Media.HalfNm, 310, 398);
            Assert.Equal(0.5, system.Media.Transmittance(system.Media.HalfNm), 1e-15);
        }
        Assert.Equal((323, 358), (VisualSystems.Ultraviolet.Media.HalfNm, VisualSystems.Violet.Media.HalfNm));
    }

    // Endler and Mielke 2005 (from memory), by hand. Corners: unit catches in one cone. u = 0.1, s = 0.4, m = 0.3, l = 0.2:
    // x = (1 - 0.8 - 0.3 - 0.1)/2 sqrt 1.5 = -0.1 x 1.2247449 = -0.1224745; y = (-1 + 0.9 + 0.1)/(2 sqrt 2) = 0; z = 0.1 - 0.25 = -0.15.
    // Chroma = sqrt(0.015 + 0 + 0.0225) = 0.1936492; azimuth 180, elevation asin(-0.15/0.1936492) = -50.7684795 degrees.
    // Largest chroma: from gray the ray leaves the tetrahedron where u, the least, falls to 0, at 0.25/0.15 times the way: share 0.6.
    [Fact]
    public void A_color_has_the_tetrahedral_coordinates_found_by_hand()
    {
        var color = new TetrahedralColor([0.1, 0.4, 0.3, 0.2]);
        Assert.Equal(-0.1224744871, color.X, 1e-9);
        Assert.Equal(0, color.Y, 1e-15);
        Assert.Equal(-0.15, color.Z, 1e-15);
        Assert.Equal(0.1936491673, color.Chroma, 1e-9);
        Assert.Equal(180, color.AzimuthDegrees, 1e-9);
        Assert.Equal(-50.7684795, color.ElevationDegrees, 1e-6);
        Assert.Equal(0.6, color.ChromaShare, 1e-12);
    }

    // A regular tetrahedron: corners 3/4 from the center and sqrt(8/3) x 3/4 = 1.2247449 from one another (closed form), azimuths as documented.
    [Fact]
    public void The_corners_are_those_of_a_regular_tetrahedron()
    {
        TetrahedralColor[] corners = [new([1, 0, 0, 0]), new([0, 1, 0, 0]), new([0, 0, 1, 0]), new([0, 0, 0, 1])];
        Assert.All(corners, corner => Assert.Equal((0.75, 1), (corner.Chroma, corner.ChromaShare), Near));
        for (int i = 0; i < corners.Length; i++)
        {
            for (int j = 0; j < i; j++)
            {
                (double dx, double dy, double dz) = (corners[i].X - corners[j].X, corners[i].Y - corners[j].Y, corners[i].Z - corners[j].Z);
                Assert.Equal(Math.Sqrt(1.5), Math.Sqrt(dx * dx + dy * dy + dz * dz), 1e-12);
            }
        }
        Assert.Equal(90, corners[0].ElevationDegrees, 1e-6);
        Assert.Equal([210, 90, 330], corners[1..].Select(corner => Math.Round(corner.AzimuthDegrees, 9)));

        static bool Near((double, double) one, (double, double) other) => Math.Abs(one.Item1 - other.Item1) < 1e-12 && Math.Abs(one.Item2 - other.Item2) < 1e-12;
    }

    // Vorobyev and Osorio 1998, Proc. R. Soc. B 265:351, by hand; catch ratios 1.2 1.1 0.9 0.95, Weber fraction 0.1 of the long cone. Worked for 1:2:2:4:
    // df = ln q = 0.182322 0.095310 -0.105361 -0.051293; e = 0.1 sqrt(4/n) = 0.2 0.141421 0.141421 0.1; e^2 = 0.04 0.02 0.02 0.01.
    // Numerator, sum of (e_k e_l)^2 (df_i - df_j)^2: us .0002 x .00757092 + um .0002 x .08276151 + ul .0004 x .05457570 + sm .0004 x .04026859
    //   + sl .0008 x .02149257 + ml .0008 x .00292325 = 7.5536e-5 within the digits shown.
    // Denominator, sum of (e e e)^2: 4e-6 + 8e-6 + 8e-6 + 16e-6 = 3.6e-5. Quotient 2.098248, dS 1.448533.
    [Theory]
    [InlineData(1.448533, 1, 2, 2, 4)]
    [InlineData(1.796596, 1, 1.9, 2.7, 2.7)]
    public void Contrast_is_what_the_formula_gives_by_hand(double expected, double first, double second, double third, double fourth)
    {
        VisualSystem system = VisualSystems.Ultraviolet with
        {
            SingleCones = [.. VisualSystems.Ultraviolet.SingleCones.Zip([first, second, third, fourth], (cone, number) => new Cone(cone.PigmentNm, cone.Droplet, number))],
            WeberFraction = 0.1,
        };
        Assert.Equal(expected, new ReceptorNoise(system).Chromatic([1.2, 1.1, 0.9, 0.95], [1, 1, 1, 1])!.Value, 6e-7);
    }

    // |ln(0.5)|/0.18 = 3.850818 by hand; Weber fraction 0.18: Lind, Karlsson and Kelber 2013, 10.1371/journal.pone.0054650 (abstract).
    [Fact]
    public void Achromatic_contrast_is_the_logarithm_over_the_weber_fraction()
        => Assert.Equal(3.850818, new ReceptorNoise(VisualSystems.Violet).Achromatic(0.5, 1)!.Value, 1e-6);
}

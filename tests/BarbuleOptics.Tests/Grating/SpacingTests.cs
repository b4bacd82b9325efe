using BarbuleOptics.Files;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Layers of different spacing.</summary>
public class SpacingTests
{
    private static string Two(double upperNm, double lowerNm, double gapNm) => FormattableString.Invariant($$"""
        [cortex]
        thickness = 130
        [[layer]]
        form = "rod"
        diameter = 120
        spacing = {{upperNm}}
        rows = 2
        pitch = 150
        gap = {{gapNm}}
        [[layer]]
        form = "rod"
        diameter = 110
        lumen = 50
        spacing = {{lowerNm}}
        rows = 2
        pitch = 140
        """);

    // Where the zeroth order alone passes between the layers, the whole common period says the same within the estimates.
    [Theory]
    [InlineData(0.0, 120)]
    [InlineData(30.0, 120)]
    [InlineData(0.0, 20)]
    public void Joining_by_the_zeroth_order_is_as_good_as_it_says(double degrees, double gapNm)
    {
        GratingCase section = GratingCase.Of(Two(150, 225, gapNm));
        foreach (double wavelengthNm in (double[])[560, 640, 740])
        {
            foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P])
            {
                GratingAnswer joined = section.Solve(wavelengthNm, degrees, polarization, 5e-3), common = section.Solve(wavelengthNm, degrees, polarization, 1e-9);
                double join = JoinError(section.Section, wavelengthNm, degrees);
                // The first run joins, the second does not, and each says so.
                Assert.InRange(join, SpacingJoin.ShareOfAccuracy * 1e-9, SpacingJoin.ShareOfAccuracy * 5e-3);
                Assert.True(joined.Error >= join && common.Error < join);
                Assert.True(joined.Difference(common) <= joined.Error, FormattableString.Invariant($"{joined} not {common}"));
                Assert.True(joined.Gap < 1e-10 && common.Gap < 1e-10);
            }
        }
    }

    [Fact]
    public void Spacings_without_a_common_period_are_solved()
    {
        GratingCase section = GratingCase.Of(Two(160.3, 171.9, 60));
        SpacingPlan plan = SpacingPlan.Of(section.Section);
        Assert.Equal(2, plan.Moves.Count);
        Assert.NotNull(plan.Neighbor);
        Assert.NotNull(plan.Nearest.PeriodNm);
        // One cell of each is nearest: both move to the geometric mean.
        Assert.Equal(Math.Sqrt(160.3 * 171.9), plan.PeriodNm!.Value, 1e-9);
        foreach (double wavelengthNm in (double[])[320, 450, 700])
        {
            GratingAnswer answer = section.Solve(wavelengthNm, 20, Polarizations.P, 1e-4);
            Assert.True(answer.Gap < 1e-10);
        }
        // Far above the orders of the matrix the zeroth order joins the layers, and the estimate has what that costs.
        double join = JoinError(section.Section, 700, 0);
        Assert.InRange(section.Solve(700, 0, Polarizations.S, 1e-4).Error, join, join + 1e-4);
    }

    private static double JoinError(Section section, double wavelengthNm, double degrees)
    {
        var structure = new SectionPermittivities(section, EmbeddedMaterials.Catalog, [wavelengthNm]);
        (double across, double along) = IncidentDirection.Of(section, Angle.FromDegrees(degrees));
        var light = new PointLight(wavelengthNm, structure.SurroundIndex[0], across, along, Math.Cos(double.DegreesToRadians(degrees)));
        return SpacingJoin.Error(StackPlan.Of(section), light, structure.Inside(0));
    }

    [Fact]
    public void Orders_are_counted_by_the_common_period()
    {
        GratingCase section = GratingCase.Of(Two(300, 450, 200));
        GratingAnswer answer = section.Solve(320, 50, Polarizations.S, 1e-5);
        Assert.Equal(answer.Reflected, answer.ReflectedOrders[GratingCase.MostOrder], 1e-14);
        Assert.Equal(answer.Reflected + answer.Diffracted, answer.ReflectedOrders.Sum(), 1e-14);
        Assert.Equal(answer.Transmitted, answer.TransmittedOrders.Sum(), 1e-14);
        Assert.True(answer.Diffracted > 1e-6);
    }
}

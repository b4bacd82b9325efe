using System.Numerics;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Prediction;

/// <summary>Which orders are listed: the grating equation by hand.</summary>
public sealed class OrderFanTests
{
    // Order n has the transverse wave vector across + n l/P in units of k0 and leaves below the medium's index.
    // l/P = 0.5 at 300 nm and 1 at 600 nm for P = 600 nm.
    [Theory]
    // Normal incidence, n = 1: at 300 nm order 2 would graze, at 600 nm order 1 does.
    [InlineData(1, 0, 0, 300, "-1 0 1")]
    [InlineData(1, 0, 0, 600, "0")]
    [InlineData(1.5, 0, 0, 300, "-2 -1 0 1 2")]
    // 30 degrees in air, rods across: 0.5 + n/2 between -1 and 1, and 0.5 + n.
    [InlineData(1, 0.5, 0, 300, "-2 -1 0")]
    [InlineData(1, 0.5, 0, 600, "-1 0")]
    // Along: n/2 below sqrt(1 - 0.25) = 0.87.
    [InlineData(1, 0, 0.5, 300, "-1 0 1")]
    [InlineData(1, 0, 0.9, 300, "0")]
    // Total reflection: not even the zeroth goes into a medium of index 0.4.
    [InlineData(0.4, 0.5, 0, 600, "")]
    public void Orders_follow_the_grating_equation(double index, double across, double along, double wavelengthNm, string orders)
    {
        var grid = WavelengthGrid.FromRange(Length.FromNanometres(wavelengthNm), Length.FromNanometres(wavelengthNm), Length.FromNanometres(1));
        var fan = new OrderFan(OrderSide.Reflected, 600, grid, [(across, along)], [new Complex(index * index, 0)]);
        string found = string.Join(' ', Enumerable.Range(-fan.Most, fan.Count).Where(order => fan.Propagates(order)[0]));
        Assert.Equal(orders, found);
    }

    [Fact]
    public void Without_rows_there_is_one()
    {
        var grid = WavelengthGrid.FromRange(Length.FromNanometres(500), Length.FromNanometres(500), Length.FromNanometres(1));
        var fan = new OrderFan(OrderSide.Transmitted, 0, grid, [(0.3, 0)], [new Complex(2.25, 0.1)]);
        Assert.Equal((0, 1, true), (fan.Most, fan.Count, fan.Propagates(0)[0]));
    }
}

using BarbuleOptics.Grating;
using BarbuleOptics.Tests.Grating;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>One row of circular rods, power of all orders.</summary>
public class RodRowTests
{
    // Index 2, radius 0.3, period 1, wavelength 1.7, in vacuum. Computed twice by independent programs; all digits given.
    [Theory]
    [InlineData(nameof(RodField.Electric), 0, 0.0001069615, 5e-11)]
    [InlineData(nameof(RodField.Electric), 30, 0.1124952, 5e-8)]
    [InlineData(nameof(RodField.Magnetic), 0, 0.01200094, 5e-9)]
    [InlineData(nameof(RodField.Magnetic), 30, 0.5488832, 5e-8)]
    public void Row_of_glass_rods_reflects_tabulated_power(string fieldName, double degrees, double reflected, double tolerance)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        var row = new TestRow(0.3, 1, 1, 4) { WavelengthNm = 1.7, Across = Math.Sin(degrees * Math.PI / 180), Multipoles = 14, Field = field };
        Assert.Equal(reflected, row.Shares().Reflected, tolerance);
        Assert.Equal(1, row.Shares().Reflected + row.Shares().Transmitted, 1e-13);
    }

    // Melanin 1.75 + 0.1 i, radius 60, period 140, in 1.55, wavelength 500, normal incidence. Computed with mpmath 1.3 at 25 digits (multipoles up to 12,
    // lattice sums by steepest descent), and by an independent program with fewer multipoles, which gave R 0.006154916, T 0.8254788 for the magnetic field.
    [Theory]
    [InlineData(nameof(RodField.Electric), 0.00660007714188, 0.809124400344)]
    [InlineData(nameof(RodField.Magnetic), 0.00615491229475, 0.825478692967)]
    public void Row_of_melanin_rods_reflects_and_transmits_tabulated_power(string fieldName, double reflected, double transmitted)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        var row = new TestRow(60, 140, TestRow.Index(1.55), TestRow.Index(1.75, 0.1)) { WavelengthNm = 500, Multipoles = 12, Field = field };
        (double foundReflected, double foundTransmitted, double foundLost) = row.Shares();
        Assert.Equal(reflected, foundReflected, 1e-14);
        Assert.Equal(transmitted, foundTransmitted, 1e-12);
        Assert.Equal(1, foundReflected + foundTransmitted + foundLost, 1e-13);
    }

    // Index 2, radius 0.3, period 1, in vacuum, normal incidence, beside the wavelength where the first orders open: power of order 0.
    // Computed with mpmath 1.3 at 25 digits (multipoles up to 12, lattice sums by steepest descent).
    [Theory]
    [InlineData(nameof(RodField.Electric), 0.99999999, 0.6404626784647091, 0.3589732222855587)]
    [InlineData(nameof(RodField.Magnetic), 0.99999999, 0.9989962741322589, 1.817206398995335e-6)]
    [InlineData(nameof(RodField.Electric), 1.0000001, 0.6402345590242778, 0.3597654409757222)]
    [InlineData(nameof(RodField.Magnetic), 1.0000001, 0.9999997138906042, 2.861093957796055e-7)]
    public void Row_beside_an_opening_order_loses_no_digits(string fieldName, double wavelength, double reflected, double transmitted)
    {
        var row = new TestRow(0.3, 1, 1, 4) { WavelengthNm = wavelength, Multipoles = 12, Field = Enum.Parse<RodField>(fieldName) };
        ScatteringBlock block = row.Scatter();
        Assert.Equal(reflected, Square(block.ReflectTop[2, 2].Magnitude), 1e-11);
        Assert.Equal(transmitted, Square(block.TransmitDown[2, 2].Magnitude), 1e-11);

        static double Square(double x) => x * x;
    }
}

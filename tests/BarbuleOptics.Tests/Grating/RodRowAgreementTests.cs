using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Multipoles;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Rows of round rods against the method of fundamental solutions, which shares nothing with the multipole expansion.</summary>
public class RodRowAgreementTests
{
    private static readonly Complex Matrix = new(2.4, 0.9);
    private static readonly Complex Rod = new(3.1, 0.35);

    // Largest difference measured: 2e-10, from an evanescent incident wave, which the second
    // method meets with a misfit of 2e-6.
    [Theory]
    [InlineData(nameof(RodField.Electric), 0)]
    [InlineData(nameof(RodField.Electric), 20)]
    [InlineData(nameof(RodField.Electric), 45)]
    [InlineData(nameof(RodField.Magnetic), 0)]
    [InlineData(nameof(RodField.Magnetic), 20)]
    [InlineData(nameof(RodField.Magnetic), 45)]
    [InlineData(nameof(RodField.Both), 0)]
    [InlineData(nameof(RodField.Both), 20)]
    [InlineData(nameof(RodField.Both), 45)]
    public void One_row_matches_fundamental_solutions(string fieldName, double coreRadiusNm)
    {
        RodField field = Enum.Parse<RodField>(fieldName);
        const double tolerance = 1e-9;
        var row = new TestRow(60, 170, Matrix, Rod)
        {
            CoreRadiusNm = coreRadiusNm, WavelengthNm = 500, Across = 0.24, Along = field == RodField.Both ? 0.5 : 0,
            XNm = 13, TopNm = 55, BottomNm = 50, Multipoles = 14, Field = field,
        };
        GratingWaves waves = row.Waves();
        ScatteringBlock block = row.Scatter();
        var second = new FundamentalSolutions(waves, [new(13, 0, 60, 60, coreRadiusNm, coreRadiusNm, 1, 2)], 30, 0.7);
        foreach (int channel in field == RodField.Both ? [2, 6] : new[] { 2, 3 })
        {
            (Complex[] above, Complex[] below) = second.Solve(channel);
            Complex entrance = Phase(waves, channel, 55);
            for (int c = 0; c < waves.ChannelCount; c++)
            {
                Complex direct = c == channel ? 1 : 0;
                Near(above[c] * Phase(waves, c, 55) * entrance, block.ReflectTop[c, channel], tolerance);
                Near((below[c] + direct) * Phase(waves, c, 50) * entrance, block.TransmitDown[c, channel], tolerance);
            }
        }
    }

    private static Complex Phase(GratingWaves waves, int channel, double distanceNm)
        => Complex.Exp(Complex.ImaginaryOne * waves.Kz[channel % waves.OrderCount] * distanceNm);

    private static void Near(Complex expected, Complex found, double tolerance)
        => Assert.True((expected - found).Magnitude < tolerance, $"{expected} against {found}, {(expected - found).Magnitude:e1}");
}

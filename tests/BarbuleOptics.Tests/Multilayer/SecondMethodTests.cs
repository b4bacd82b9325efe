using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>The solver against <see cref="MaxwellMatrix"/>, on stacks of one to six films whose three permittivities differ.</summary>
public class SecondMethodTests
{
    // Largest difference found: 1.5e-12, from the squarings of the matrix exponential.
    private const double Tolerance = 5e-11;

    [Fact]
    public void Random_anisotropic_stacks_match_the_matrix_exponential()
    {
        var random = new Random(20240611);
        for (int i = 0; i < 1500; i++)
        {
            TestStack stack = Next(random);
            double degrees = i % 5 == 0 ? 0 : 88 * random.NextDouble();
            var second = new MaxwellMatrix(stack, degrees);
            AssertSame(second.Solve(isP: false), stack.Solve(degrees, Polarizations.S));
            AssertSame(second.Solve(isP: true), stack.Solve(degrees, Polarizations.P));
        }
    }

    private static TestStack Next(Random random)
    {
        var films = new Film[1 + random.Next(6)];
        for (int i = 0; i < films.Length; i++)
        {
            var permittivity = new DiagonalPermittivity(Component(random), Component(random), Component(random));
            films[i] = new Film(permittivity, 150 * random.NextDouble());
        }
        return new TestStack(1 + 0.6 * random.NextDouble(), films, Component(random)) { WavelengthNm = 300 + 480 * random.NextDouble() };
    }

    private static Complex Component(Random random) => random.Next(4) switch
    {
        0 => new Complex(-3 * random.NextDouble() - .2, random.NextDouble()),
        1 => 1 + 3 * random.NextDouble(),
        _ => new Complex(.3 + 3 * random.NextDouble(), random.NextDouble()),
    };

    private static void AssertSame(Powers expected, Powers found)
    {
        Assert.Equal(expected.Reflected, found.Reflected, Tolerance);
        Assert.Equal(expected.Transmitted, found.Transmitted, Tolerance);
        Assert.Equal(expected.Absorbed, found.Absorbed, Tolerance);
        for (int film = 0; film < expected.Films.Length; film++)
            Assert.Equal(expected.Films[film], found.Films[film], Tolerance);
    }
}

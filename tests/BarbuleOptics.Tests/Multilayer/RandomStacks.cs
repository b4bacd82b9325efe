using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>Seeded stacks of every kind a solver may meet.</summary>
internal sealed class RandomStacks(int seed)
{
    private readonly Random _random = new(seed);

    public (TestStack Stack, double Degrees) Next()
    {
        double surround = _random.Next(3) == 0 ? 1 : 1 + 0.6 * _random.NextDouble();
        var films = new Film[1 + _random.Next(8)];
        for (int i = 0; i < films.Length; i++)
            films[i] = i > 1 && _random.Next(4) == 0 ? films[i - 2] : new Film(Permittivity(surround), Thickness());
        var stack = new TestStack(surround, films, Component(surround)) { WavelengthNm = 300 + 480 * _random.NextDouble() };
        return (stack, Degrees());
    }

    /// <summary>As <see cref="Next"/>, with an incoherent back.</summary>
    public (TestStack Stack, double Degrees) NextOnSlab()
    {
        (TestStack stack, double degrees) = Next();
        return (stack with { SlabThicknessNm = Thickness(), Behind = Component(stack.SurroundIndex) }, degrees);
    }

    private DiagonalPermittivity Permittivity(double surround)
    {
        if (_random.Next(3) == 0)
            return DiagonalPermittivity.Isotropic(Component(surround));
        return new DiagonalPermittivity(Component(surround), Component(surround), Component(surround));
    }

    private Complex Component(double surround) => _random.Next(10) switch
    {
        0 => surround * surround,
        1 => -LogUniform(1e-2, 50), // a lossless metal
        2 => new Complex(-LogUniform(1e-2, 50), LogUniform(1e-6, 10)),
        3 => Square(new Complex(LogUniform(0.05, 4), 10 * _random.NextDouble())),
        4 or 5 => Square(new Complex(1 + 1.5 * _random.NextDouble(), LogUniform(1e-12, 1))),
        6 => LogUniform(1e-3, 1), // below the surround: total reflection
        _ => Square(1 + 1.5 * _random.NextDouble()),
    };

    private double Thickness() => _random.Next(10) switch
    {
        0 => 0,
        1 or 2 => LogUniform(1e-6, 1e5),
        _ => LogUniform(1, 1e3),
    };

    private double Degrees() => _random.Next(8) switch
    {
        0 => 0,
        1 => 89.9 - LogUniform(1e-6, 1),
        2 => 89.9,
        _ => 89.9 * _random.NextDouble(),
    };

    private double LogUniform(double least, double most) => least * Math.Pow(most / least, _random.NextDouble());

    private static Complex Square(Complex index) => index * index;
}

using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Multipoles;

namespace BarbuleOptics.Tests.Grating;

/// <summary>One row of round rods in the words of a test: lengths, permittivities of matrix, rod and core, direction in the matrix.</summary>
internal sealed record TestRow(double RadiusNm, double PeriodNm, Complex Matrix, Complex Rod)
{
    public double CoreRadiusNm { get; init; }

    public Complex Core { get; init; } = Complex.One;

    /// <summary>Half heights of an elliptical body and core, whose radii are then half widths; null for round rods.</summary>
    public (double Body, double Core)? HalfHeightsNm { get; init; }

    public double WavelengthNm { get; init; }

    /// <summary>kx0/k0.</summary>
    public double Across { get; init; }

    /// <summary>ky/k0.</summary>
    public double Along { get; init; }

    public double XNm { get; init; }

    public double? TopNm { get; init; }

    public double? BottomNm { get; init; }

    public int Multipoles { get; init; } = 10;

    public int Orders { get; init; } = 2;

    public RodField Field { get; init; }

    public static Complex Index(double n, double k = 0) => new Complex(n, k) * new Complex(n, k);

    public Resolution Resolution => new(Orders, Multipoles, 0, 0);

    public GratingWaves Waves()
    {
        var waves = new GratingWaves();
        double k0 = 2 * Math.PI / WavelengthNm;
        waves.Set(WavelengthNm, k0 * Across, k0 * Along, PeriodNm, [Matrix, Rod, Core], Orders, Field);
        return waves;
    }

    public RodRow Element(LatticeSums? sums = null)
    {
        sums ??= new LatticeSums();
        if (HalfHeightsNm is not (double bodyNm, double coreNm))
            return new RodRow(RadiusNm, CoreRadiusNm, 1, 2, XNm, TopNm ?? RadiusNm, BottomNm ?? RadiusNm, sums);
        var body = new EllipseScatterer(new EllipseOutline(RadiusNm, bodyNm), new EllipseOutline(CoreRadiusNm, coreNm), 1, 2);
        return new RodRow(body, CoreRadiusNm > 0, 1, 2, XNm, TopNm ?? bodyNm, BottomNm ?? bodyNm, sums);
    }

    public ScatteringBlock Scatter()
    {
        GratingWaves waves = Waves();
        var block = new ScatteringBlock(waves.ChannelCount);
        if (!Element().TryScatter(waves, Resolution, block))
            throw new InvalidOperationException("No finite solution.");
        return block;
    }

    /// <summary>Power that one incident order reflects, transmits and loses, as shares of its own; a lossless matrix.</summary>
    public (double Reflected, double Transmitted, double Lost) Shares()
    {
        GratingWaves waves = Waves();
        var block = new ScatteringBlock(waves.ChannelCount);
        RodRow element = Element();
        if (!element.TryScatter(waves, Resolution, block))
            throw new InvalidOperationException("No finite solution.");
        int incident = Orders;
        double reflected = 0, transmitted = 0;
        for (int i = 0; i < waves.OrderCount; i++)
        {
            double share = waves.Kz[i].Real / waves.Kz[incident].Real;
            reflected += share * Square(block.ReflectTop[i, incident]);
            transmitted += share * Square(block.TransmitDown[i, incident]);
        }
        var down = new Complex[waves.ChannelCount];
        down[incident] = 1;
        var lost = new double[3];
        element.AddLoss(waves, Resolution, down, new Complex[waves.ChannelCount], lost);
        double weight = Field == RodField.Magnetic ? 1 / Matrix.Real : 1;
        return (reflected, transmitted, lost.Sum() / (weight * waves.Kz[incident].Real));
    }

    private static double Square(Complex z) => z.Real * z.Real + z.Imaginary * z.Imaginary;
}

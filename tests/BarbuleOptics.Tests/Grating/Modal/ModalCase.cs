using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Modal;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Grating.Modal;

/// <summary>Short ways to set slabs up, solve them, and join them to half-spaces.</summary>
internal static class ModalCase
{
    public static readonly Complex[] Lossless = [2.4, 3.2, 1.0];
    public static readonly Complex[] Absorbing = [2.4, new(3, 0.5), new(1.5, 0.2)];

    public static CellBody Ellipse(double width, double height, int material = 1)
        => new(new Outline(OutlineShape.Ellipse, width / 2, height / 2), null, material, material, 0, 0);

    public static CellBody HollowEllipse(double width, double height, double coreWidth, double coreHeight)
        => new(new Outline(OutlineShape.Ellipse, width / 2, height / 2), new Outline(OutlineShape.Ellipse, coreWidth / 2, coreHeight / 2), 1, 2, 0, 0);

    public static CellBody Rectangle(double width, double height, int material = 1)
        => new(new Outline(OutlineShape.Rectangle, width / 2, height / 2), null, material, material, 0, 0);

    public static CellBody Walled(double width, double height, double wall)
        => new(new Outline(OutlineShape.Rectangle, width / 2, height / 2), new Outline(OutlineShape.Rectangle, width / 2 - wall, height / 2 - wall), 1, 2, 0, 0);

    public static PlacedOutline At(this CellBody body, double xNm, double zNm) => new(body, xNm, zNm);

    public static GratingWaves Waves(
        RodField field, double kx0Share, double kyShare, Complex[] permittivities, int mostOrder = 2, double wavelengthNm = 430, double periodNm = 170)
    {
        var waves = new GratingWaves();
        double k0 = 2 * Math.PI / wavelengthNm;
        waves.Set(wavelengthNm, kx0Share * k0, kyShare * k0, periodNm, permittivities, mostOrder, field);
        return waves;
    }

    public static ScatteringBlock Solve(
        IReadOnlyList<PlacedOutline> bodies, GratingWaves waves, int harmonics, int depth = 1, double heightNm = 100, bool useMirrors = true)
        => Solve(new ModalSlab(bodies, heightNm, waves.PeriodNm) { UseMirrors = useMirrors }, waves, harmonics, depth);

    public static ScatteringBlock Solve(ModalSlab slab, GratingWaves waves, int harmonics, int depth = 1)
    {
        var block = new ScatteringBlock(waves.ChannelCount);
        Assert.True(slab.TryScatter(waves, new Resolution(waves.MostOrder, 0, harmonics, depth), block));
        return block;
    }

    public static double Largest(ScatteringBlock first, ScatteringBlock second)
    {
        double most = 0;
        foreach ((ComplexMatrix one, ComplexMatrix other) in Pairs(first, second))
        {
            for (int i = 0; i < one.Elements.Length; i++)
                most = Math.Max(most, (one.Elements[i] - other.Elements[i]).Magnitude);
        }
        return most;
    }

    /// <summary>The interface of two media for one field, in waves of the upper and the lower medium.</summary>
    public static ScatteringBlock Interface(GratingWaves waves, Complex above, Complex below)
    {
        var block = new ScatteringBlock(waves.ChannelCount);
        for (int i = 0; i < waves.ChannelCount; i++)
        {
            Complex upper = Admittance(waves, above, i), lower = Admittance(waves, below, i), reflected = (upper - lower) / (upper + lower);
            block.ReflectTop[i, i] = reflected;
            block.TransmitDown[i, i] = 1 + reflected;
            block.ReflectBottom[i, i] = -reflected;
            block.TransmitUp[i, i] = 1 - reflected;
        }
        return block;
    }

    public static Complex Admittance(GratingWaves waves, Complex permittivity, int channel)
        => waves.KzIn(permittivity, channel - waves.MostOrder) / (waves.Field == RodField.Magnetic ? permittivity : 1);

    /// <summary>Redheffer's star product, written out with inverses.</summary>
    public static ScatteringBlock Join(ScatteringBlock upper, ScatteringBlock lower)
    {
        var joined = new ScatteringBlock(upper.Channels);
        ComplexMatrix down = Product(Bounces(upper.ReflectBottom, lower.ReflectTop), upper.TransmitDown);
        ComplexMatrix up = Product(Bounces(lower.ReflectTop, upper.ReflectBottom), lower.TransmitUp);
        joined.ReflectTop.CopyFrom(upper.ReflectTop);
        joined.ReflectTop.AddProduct(upper.TransmitUp, Product(lower.ReflectTop, down));
        joined.TransmitDown.SetProduct(lower.TransmitDown, down);
        joined.TransmitUp.SetProduct(upper.TransmitUp, up);
        joined.ReflectBottom.CopyFrom(lower.ReflectBottom);
        joined.ReflectBottom.AddProduct(lower.TransmitDown, Product(upper.ReflectBottom, up));
        return joined;
    }

    /// <summary>(1 - first second)^-1.</summary>
    public static ComplexMatrix Bounces(ComplexMatrix first, ComplexMatrix second)
    {
        var system = new ComplexMatrix(first.Rows, first.Rows);
        system.SetIdentity();
        system.Subtract(Product(first, second));
        var solver = new LinearSolver(first.Rows);
        Assert.True(solver.TryFactor(system));
        var inverse = new ComplexMatrix(first.Rows, first.Rows);
        inverse.SetIdentity();
        solver.Solve(inverse);
        return inverse;
    }

    public static ComplexMatrix Product(ComplexMatrix left, ComplexMatrix right)
    {
        var product = new ComplexMatrix(left.Rows, right.Columns);
        product.SetProduct(left, right);
        return product;
    }

    public static IEnumerable<(ComplexMatrix One, ComplexMatrix Other)> Pairs(ScatteringBlock first, ScatteringBlock second)
    {
        yield return (first.ReflectTop, second.ReflectTop);
        yield return (first.TransmitDown, second.TransmitDown);
        yield return (first.TransmitUp, second.TransmitUp);
        yield return (first.ReflectBottom, second.ReflectBottom);
    }
}

using BarbuleOptics.Ensembles.Sensitivity;
using BarbuleOptics.Ensembles.Sequences;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>Variance shares of Ishigami's function against their closed form.</summary>
public sealed class IshigamiTests
{
    // f = sin x1 + 7 sin^2 x2 + 0.1 x3^4 sin x1, x uniform over -pi to pi. Ishigami and Homma 1990, Proc. ISUMA '90, 398; closed form: V = a^2/8 + b pi^4/5 + b^2 pi^8/18 + 1/2.
    // At 4,096 points the largest error measured is 0.004 in a share.
    private const double Variance = 13.8445879;

    private static readonly double[] First = [0.313905, 0.442411, 0], Total = [0.557589, 0.442411, 0.243684];

    [Fact]
    public void Shares_of_the_function_are_those_of_its_closed_form()
    {
        VarianceShares shares = Shares(4096, seed: 1);
        Assert.Equal(Variance, shares.Variance, 0.05);
        for (int input = 0; input < 3; input++)
        {
            Assert.Equal(First[input], shares.First(input), 0.01);
            Assert.Equal(Total[input], shares.Total(input), 0.01);
        }
    }

    // The scatter of independent scramblings is the error: of 24 scramblings' means none is off by over 4 standard errors.
    [Fact]
    public void Estimates_have_no_bias()
    {
        VarianceShares[] runs = [.. Enumerable.Range(0, 24).Select(seed => Shares(256, (ulong)seed))];
        for (int input = 0; input < 3; input++)
        {
            int i = input;
            Near(First[i], [.. runs.Select(run => run.First(i))]);
            Near(Total[i], [.. runs.Select(run => run.Total(i))]);
        }

        static void Near(double expected, double[] found)
        {
            double mean = found.Average(), error = Math.Sqrt(found.Sum(value => Math.Pow(value - mean, 2)) / (found.Length - 1) / found.Length);
            Assert.Equal(expected, mean, 4 * error);
        }
    }

    // An outcome of two components adds both: f beside a constant has the shares of f, and so has f beside itself.
    [Fact]
    public void Components_add_up()
    {
        VarianceShares single = Shares(512, 5), beside = Shares(512, 5, f => [f, 3]), twice = Shares(512, 5, f => [f, f]);
        for (int input = 0; input < 3; input++)
        {
            Assert.Equal(single.First(input), beside.First(input), 1e-12);
            Assert.Equal(single.Total(input), twice.Total(input), 1e-12);
        }
    }

    private static VarianceShares Shares(int points, ulong seed, Func<double, double[]>? components = null)
    {
        components ??= f => [f];
        var net = new ScrambledNet(6, points, seed);
        var shares = new VarianceShares(3, components(0).Length);
        var both = new double[6];
        for (int point = 0; point < points; point++)
        {
            net.Point(point, both);
            var values = new List<double>();
            values.AddRange(components(Ishigami(both[0], both[1], both[2])));
            values.AddRange(components(Ishigami(both[3], both[4], both[5])));
            values.AddRange(components(Ishigami(both[3], both[1], both[2])));
            values.AddRange(components(Ishigami(both[0], both[4], both[2])));
            values.AddRange(components(Ishigami(both[0], both[1], both[5])));
            shares.Add([.. values]);
        }
        return shares.Close();
    }

    private static double Ishigami(double u1, double u2, double u3)
    {
        (double x1, double x2, double x3) = (Math.PI * (2 * u1 - 1), Math.PI * (2 * u2 - 1), Math.PI * (2 * u3 - 1));
        return Math.Sin(x1) * (1 + 0.1 * Math.Pow(x3, 4)) + 7 * Math.Sin(x2) * Math.Sin(x2);
    }
}

namespace BarbuleOptics.Grating.Modal;

/// <summary>How one element in depth is integrated: depths, weights, and the element's polynomials there.</summary>
/// <remarks>The polynomials are those of the Gauss-Lobatto nodes. Inside, the nodes serve for the integration too. Next to a tip,
/// where chords and with them all operators change like a square root of the distance s^2 h, Gauss-Legendre nodes in s serve.</remarks>
internal sealed class ElementRule
{
    private static readonly (ElementRule Inside, ElementRule TopTip, ElementRule BottomTip)[] Rules =
        [.. Enumerable.Range(0, DepthMesh.MostOrder + 1).Select(order => (Inside(Math.Max(1, order)), AtTip(Math.Max(1, order), true), AtTip(Math.Max(1, order), false)))];

    private ElementRule(LobattoRule nodes, double[] places, double[] weights, bool sharesEnds)
    {
        Order = nodes.Order;
        Places = places;
        Weights = weights;
        SharesEnds = sharesEnds;
        Values = new double[places.Length, Order + 1];
        Slopes = new double[places.Length, Order + 1];
        for (int q = 0; q < places.Length; q++)
        {
            for (int i = 0; i <= Order; i++)
                (Values[q, i], Slopes[q, i]) = Lagrange(nodes.Nodes, i, places[q]);
        }
    }

    /// <summary>Order of the polynomials.</summary>
    public int Order { get; }

    /// <summary>Depths on [-1, 1] from the element's top to its bottom.</summary>
    public double[] Places { get; }

    /// <summary>Weights; they add up to 2.</summary>
    public double[] Weights { get; }

    /// <summary>Whether first and last depth are the ends of the element, so that neighbors share them.</summary>
    public bool SharesEnds { get; }

    /// <summary>Value of polynomial i at depth q, as [q, i].</summary>
    public double[,] Values { get; }

    /// <summary>Slope of polynomial i at depth q, as [q, i].</summary>
    public double[,] Slopes { get; }

    /// <summary>The rule of an element away from tips: exact for polynomials of degree 2 p - 1.</summary>
    private static ElementRule Inside(int order)
    {
        var nodes = new LobattoRule(order);
        return new ElementRule(nodes, nodes.Nodes, nodes.Weights, true);
    }

    /// <summary>The rule of an element that ends in a tip.</summary>
    private static ElementRule AtTip(int order, bool tipAtTop)
    {
        int points = order + 1;
        var nodes = new LobattoRule(order);
        (double[] gauss, double[] gaussWeights) = GaussLegendre(points);
        var places = new double[points];
        var weights = new double[points];
        for (int q = 0; q < points; q++)
        {
            // z = s^2 on [0, 1], dz = 2 s ds.
            double s = (1 + gauss[q]) / 2, z = 2 * s * s - 1, weight = 2 * s * gaussWeights[q];
            int place = tipAtTop ? q : points - 1 - q;
            places[place] = tipAtTop ? z : -z;
            weights[place] = weight;
        }
        return new ElementRule(nodes, places, weights, false);
    }

    /// <summary>The three rules of an order: inside, next to a tip at the top, next to one at the bottom.</summary>
    public static (ElementRule Inside, ElementRule TopTip, ElementRule BottomTip) Of(int order)
        => Rules[order];

    private static (double Value, double Slope) Lagrange(double[] nodes, int i, double x)
    {
        double value = 1, slope = 0;
        for (int k = 0; k < nodes.Length; k++)
        {
            if (k == i)
                continue;
            double step = nodes[i] - nodes[k];
            slope = slope * ((x - nodes[k]) / step) + value / step;
            value *= (x - nodes[k]) / step;
        }
        return (value, slope);
    }

    /// <summary>Nodes and weights on [-1, 1].</summary>
    internal static (double[] Nodes, double[] Weights) GaussLegendre(int count)
    {
        var nodes = new double[count];
        var weights = new double[count];
        for (int i = 0; i < count; i++)
        {
            double x = -Math.Cos(Math.PI * (i + 0.75) / (count + 0.5)), slope = 0;
            for (int step = 0; step < 50; step++)
            {
                double before = 1, value = x;
                for (int n = 1; n < count; n++)
                    (before, value) = (value, ((2 * n + 1) * x * value - n * before) / (n + 1));
                slope = count * (before - x * value) / (1 - x * x);
                x -= value / slope;
                if (Math.Abs(value / slope) < 1e-16)
                    break;
            }
            nodes[i] = x;
            weights[i] = 2 / ((1 - x * x) * slope * slope);
        }
        return (nodes, weights);
    }
}

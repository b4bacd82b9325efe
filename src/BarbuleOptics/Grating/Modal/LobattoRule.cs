namespace BarbuleOptics.Grating.Modal;

/// <summary>Gauss-Lobatto nodes and weights on [-1, 1].</summary>
/// <remarks>Nodes are the ends and the zeros of P_p'; weights 2 / (p (p + 1) P_p(x)^2)
/// (Abramowitz and Stegun 25.4.32; the number from memory).</remarks>
internal sealed class LobattoRule
{
    /// <summary>The rule of an element of order <paramref name="order"/>, 1 or above: exact for polynomials of degree 2 p - 1.</summary>
    public LobattoRule(int order)
    {
        Order = order;
        Nodes = new double[order + 1];
        Weights = new double[order + 1];
        var values = new double[order + 1];
        for (int i = 0; i <= order; i++)
        {
            Nodes[i] = Node(order, i);
            values[i] = Legendre(order, Nodes[i]).Value;
            Weights[i] = 2 / (order * (order + 1) * values[i] * values[i]);
        }
    }

    /// <summary>The order p; there are p + 1 nodes.</summary>
    public int Order { get; }

    /// <summary>Nodes from -1 to 1.</summary>
    public double[] Nodes { get; }

    /// <summary>Weights; they add up to 2.</summary>
    public double[] Weights { get; }

    private static double Node(int order, int i)
    {
        if (i == 0 || i == order)
            return i == 0 ? -1 : 1;
        double x = -Math.Cos(Math.PI * i / order);
        for (int step = 0; step < 50; step++)
        {
            // Newton for (1 - x^2) P_p' = 0, whose derivative is -p (p + 1) P_p.
            (double value, double before) = Legendre(order, x);
            double change = order * (before - x * value) / (order * (order + 1) * value);
            x += change;
            if (Math.Abs(change) < 1e-16)
                break;
        }
        return x;
    }

    private static (double Value, double Before) Legendre(int order, double x)
    {
        double before = 1, value = x;
        for (int n = 1; n < order; n++)
            (before, value) = (value, ((2 * n + 1) * x * value - n * before) / (n + 1));
        return (value, before);
    }
}

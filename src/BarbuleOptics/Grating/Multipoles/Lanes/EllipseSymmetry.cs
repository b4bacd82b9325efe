namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>Waves of one behavior under both mirrors of an ellipse: cosines or sines of even or of odd order, numbered from the least order on.</summary>
internal readonly struct EllipseSymmetry
{
    /// <summary>One of four.</summary>
    /// <param name="number">0 to 3.</param>
    /// <param name="top">Largest order.</param>
    public EllipseSymmetry(int number, int top)
    {
        IsSine = number >= 2;
        // A sine of order 0 does not exist.
        Least = number % 2 == 1 ? 1 : IsSine ? 2 : 0;
        Count = Math.Max(0, (top - Least) / 2 + 1);
    }

    /// <summary>Whether they are sines.</summary>
    public bool IsSine { get; }

    /// <summary>The least order.</summary>
    public int Least { get; }

    /// <summary>Number of orders.</summary>
    public int Count { get; }

    /// <summary>The order of a number.</summary>
    public int Order(int number) => Least + 2 * number;
}

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>What a slab of upright walls is between functions of one kind: all of them, the even or the odd ones about its mirror axis.</summary>
/// <remarks>All numbers are real and hold for any light. Matrices lie row by row.</remarks>
/// <param name="Count">Number of functions, n.</param>
/// <param name="Waves">Their wave numbers across the rods at kx0 = 0, in 1/nm.</param>
/// <param name="Shares">For each interval of the upper half, for each material in it, the matrix of what is 1 within it and 0 elsewhere; over
/// the materials they add up to the unit matrix.</param>
/// <param name="Orders">Orders of plane waves beyond the planes.</param>
/// <param name="Ports">A row for each of them: its part in every function.</param>
/// <param name="Size">Sum over all orders besides the zeroth of 2 pi |n|/P times the square of their rows.</param>
/// <param name="Sign">The same of the sign of n.</param>
/// <param name="Inverse">The same of P/(2 pi |n|).</param>
internal sealed record UprightSector(
    int Count, double[] Waves, (int Material, double[] Matrix)[][] Shares, int[] Orders, double[] Ports, double[] Size, double[] Sign, double[] Inverse)
{
    /// <summary>Largest wave number of a function, in 1/nm.</summary>
    public double MostWave { get; } = Waves.Length == 0 ? 0 : Waves.Max(Math.Abs);

    /// <summary>The rows, side by side, of the orders up to <paramref name="mostOrder"/>.</summary>
    public (int First, int Count) PortsUpTo(int mostOrder)
    {
        int first = 0, count = 0;
        foreach (int order in Orders)
        {
            if (order < -mostOrder)
                first++;
            else if (order <= mostOrder)
                count++;
        }
        return (first, count);
    }
}

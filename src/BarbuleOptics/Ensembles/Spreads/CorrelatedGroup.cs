namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>Lengths that were measured on the same units, so that their spreads go together.</summary>
/// <remarks>Normal scores that are independent become correlated by the lower triangle T of the correlations, R = T T' (Cholesky). The sample correlations of
/// few units have no full rank; a pivot that vanishes leaves its column empty.</remarks>
internal sealed class CorrelatedGroup
{
    private const double LeastPivot = 1e-10;

    private readonly double[][] _triangle;

    /// <param name="slots">Places of the lengths.</param>
    /// <param name="units">For each length its value on each unit.</param>
    public CorrelatedGroup(int[] slots, double[][] units)
    {
        Slots = slots;
        Units = units[0].Length;
        _triangle = TriangleOf(Correlations(units));
    }

    /// <summary>Places of the lengths.</summary>
    public IReadOnlyList<int> Slots { get; }

    /// <summary>Number of units.</summary>
    public int Units { get; }

    /// <summary>The correlated score of length <paramref name="member"/> from the independent scores of all.</summary>
    public double Score(int member, ReadOnlySpan<double> independent)
    {
        double score = 0;
        for (int i = 0; i <= member; i++)
            score += _triangle[member][i] * independent[Slots[i]];
        return score;
    }

    /// <summary>The variance of the sum of lengths with standard deviations <paramref name="deviations"/>, signs included.</summary>
    public double VarianceOfSum(ReadOnlySpan<double> deviations)
    {
        double variance = 0;
        for (int column = 0; column < Slots.Count; column++)
        {
            double sum = 0;
            for (int row = column; row < Slots.Count; row++)
                sum += _triangle[row][column] * deviations[row];
            variance += sum * sum;
        }
        return variance;
    }

    private static double[][] Correlations(double[][] units)
    {
        double[][] centered = [.. units.Select(values => values.Select(value => value - values.Average()).ToArray())];
        double[] lengths = [.. centered.Select(values => Math.Sqrt(values.Sum(value => value * value)))];
        return [.. centered.Select((one, i) => centered.Select((other, j) => i == j ? 1 : one.Zip(other, (x, y) => x * y).Sum() / (lengths[i] * lengths[j])).ToArray())];
    }

    private static double[][] TriangleOf(double[][] matrix)
    {
        int count = matrix.Length;
        double[][] triangle = [.. Enumerable.Range(0, count).Select(row => new double[row + 1])];
        for (int column = 0; column < count; column++)
        {
            double pivot = matrix[column][column];
            for (int k = 0; k < column; k++)
                pivot -= triangle[column][k] * triangle[column][k];
            if (pivot < LeastPivot)
                continue;
            triangle[column][column] = Math.Sqrt(pivot);
            for (int row = column + 1; row < count; row++)
            {
                double sum = matrix[row][column];
                for (int k = 0; k < column; k++)
                    sum -= triangle[row][k] * triangle[column][k];
                triangle[row][column] = sum / triangle[column][column];
            }
        }
        return triangle;
    }
}

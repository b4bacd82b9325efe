using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>Sprague's fifth-order interpolation between equally spaced samples, which CIE 167:2005 recommends for spectra.</summary>
/// <remarks>
/// The polynomial through six neighbors whose first and second derivative are continuous at the samples. The interpolant is linear in
/// the samples, so that it is given here as the weights of the samples. Beyond either end the two samples it lacks are the linear
/// combinations of the six nearest ones that CIE 167:2005 prints. Exact for polynomials up to the fourth degree, in the last two steps
/// before an end for straight lines only, since the end formulas reflect the curve through its end point.
/// Coefficients from memory; polynomials in the tests decide whether they are right.
/// </remarks>
internal static class SpragueInterpolation
{
    /// <summary>Fewest samples that the formulas for the ends need.</summary>
    public const int LeastCount = 6;

    // CIE 167:2005: the sample one step, and two steps, outside the end; all over 209; nearest sample first.
    private static ReadOnlySpan<double> OneOutside => [508, -540, 488, -367, 144, -24];
    private static ReadOnlySpan<double> TwoOutside => [884, -1960, 3033, -2648, 1080, -180];
    private const double OutsideDivisor = 209;

    /// <summary>Adds to <paramref name="weights"/> what each sample contributes to <paramref name="share"/> times the value at a position.</summary>
    /// <param name="position">Where, in steps from the first sample: 0 to the number of samples less 1.</param>
    /// <param name="share">Factor on all contributions.</param>
    /// <param name="weights">One element a sample, at least six; added to.</param>
    public static void AddWeights(double position, double share, Span<double> weights)
    {
        Guard.Within(weights.Length, LeastCount, int.MaxValue, nameof(weights));
        Guard.Within(position, 0, weights.Length - 1);
        int left = Math.Min((int)position, weights.Length - 2);
        Span<double> basis = stackalloc double[6];
        Basis(position - left, basis);
        for (int j = 0; j < basis.Length; j++)
            AddSample(left - 2 + j, share * basis[j], weights);
    }

    /// <summary>Weights of the samples -2, -1, 0, 1, 2, 3 steps from the left neighbor, at <paramref name="x"/> steps from it, 0 to 1.</summary>
    private static void Basis(double x, Span<double> basis)
    {
        double x2 = x * x, x3 = x2 * x, x4 = x3 * x, x5 = x4 * x;
        basis[0] = (2 * x - x2 - 9 * x3 + 13 * x4 - 5 * x5) / 24;
        basis[1] = (-16 * x + 16 * x2 + 39 * x3 - 64 * x4 + 25 * x5) / 24;
        basis[2] = 1 + (-30 * x2 - 70 * x3 + 126 * x4 - 50 * x5) / 24;
        basis[3] = (16 * x + 16 * x2 + 66 * x3 - 124 * x4 + 50 * x5) / 24;
        basis[4] = (-2 * x - x2 - 33 * x3 + 61 * x4 - 25 * x5) / 24;
        basis[5] = (7 * x3 - 12 * x4 + 5 * x5) / 24;
    }

    private static void AddSample(int index, double weight, Span<double> weights)
    {
        int last = weights.Length - 1;
        if (index >= 0 && index <= last)
        {
            weights[index] += weight;
            return;
        }

        int stepsOutside = index < 0 ? -index : index - last;
        ReadOnlySpan<double> combination = stepsOutside == 1 ? OneOutside : TwoOutside;
        for (int i = 0; i < combination.Length; i++)
            weights[index < 0 ? i : last - i] += weight * combination[i] / OutsideDivisor;
    }
}

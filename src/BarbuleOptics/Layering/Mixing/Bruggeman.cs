using System.Numerics;

namespace BarbuleOptics.Layering.Mixing;

/// <summary>Two-dimensional Bruggeman, sum f (ei - e)/(ei + e) = 0, any number of materials; along the rods sum f e.</summary>
/// <remarks>
/// With s(e) = sum f / (ei + e) the condition reads e = 1 / (2 s(e)), a map of the upper half-plane into itself, so by the theorem
/// of Denjoy and Wolff it has exactly one fixed point there and iteration from any passive start finds it; Newton steps that stay
/// passive finish the work. For two materials the condition is a quadratic. Source: Bruggeman 1935, Ann. Phys. 416:636.
/// </remarks>
public sealed class Bruggeman : IMixingRule
{
    private const int MostSteps = 400;
    private const int PlainSteps = 2;
    private const double Tolerance = 2e-15;

    /// <inheritdoc/>
    public string Name => "bruggeman";

    /// <inheritdoc/>
    public string Description => "two-dimensional Bruggeman, all materials alike; along the rods the mean permittivity";

    /// <inheritdoc/>
    public DiagonalPermittivity Mix(SectionCut cut, ReadOnlySpan<Complex> permittivities, double wavelengthNm)
    {
        Complex mean = Averages.Permittivity(cut, permittivities);
        Complex inPlane = Solve(cut.Fractions, permittivities, mean);
        return new(inPlane, mean, inPlane);
    }

    /// <summary>The passive solution for shares that add up to 1.</summary>
    internal static Complex Solve(ReadOnlySpan<double> fractions, ReadOnlySpan<Complex> permittivities, Complex mean)
    {
        int first = -1, second = -1, present = 0;
        for (int m = 0; m < fractions.Length; m++)
        {
            if (fractions[m] <= 0)
                continue;
            present++;
            if (first < 0)
                first = m;
            else
                second = m;
        }
        return present switch
        {
            1 => permittivities[first],
            2 => SolveTwo(fractions[first], permittivities[first], fractions[second], permittivities[second]),
            _ => SolveMany(fractions, permittivities, mean),
        };
    }

    private static Complex SolveTwo(double f1, Complex e1, double f2, Complex e2)
        => PassiveRoot.OfQuadratic((f1 - f2) / (f1 + f2) * (e1 - e2) / 2, e1 * e2);

    private static Complex SolveMany(ReadOnlySpan<double> fractions, ReadOnlySpan<Complex> permittivities, Complex start)
    {
        // Real permittivities of both signs have a complex solution, which no real start reaches.
        Complex e = new(start.Real, Math.Max(start.Imaginary, 1e-12 * start.Magnitude));
        double before = double.PositiveInfinity;
        int plainSteps = PlainSteps;
        for (int step = 0; step < MostSteps; step++)
        {
            Complex s = Complex.Zero, slope = Complex.Zero;
            for (int m = 0; m < fractions.Length; m++)
            {
                if (fractions[m] <= 0)
                    continue;
                Complex inverse = Complex.Reciprocal(permittivities[m] + e);
                s += fractions[m] * inverse;
                slope += fractions[m] * inverse * inverse;
            }
            Complex mapped = Complex.Reciprocal(2 * s);
            double change = Distance(mapped, e);
            if (change <= Tolerance * Distance(e, Complex.Zero))
                break;
            // A Newton step that went away from the solution is followed by steps that cannot.
            if (change > before)
                plainSteps = step + PlainSteps;
            before = change;
            Complex newton = e + (mapped - e) / (1 - slope / (2 * s * s));
            e = step >= plainSteps && newton.Imaginary >= 0 ? newton : mapped;
        }
        // A lossless mixture came through the upper half-plane; what is left of the start's loss is rounding.
        return e.Imaginary > 1e-15 * e.Magnitude ? e : new Complex(e.Real, 0);
    }

    private static double Distance(Complex a, Complex b) => Math.Abs(a.Real - b.Real) + Math.Abs(a.Imaginary - b.Imaginary);
}

using System.Numerics;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Whether rows of different spacing may be joined by the zeroth order alone.</summary>
internal static class SpacingJoin
{
    /// <summary>Share of the accuracy asked for that the join may take where there is another way.</summary>
    public const double ShareOfAccuracy = 0.3;

    /// <summary>Above this error spacings are rather moved to a common period.</summary>
    public const double MostError = 0.01;

    /// <summary>What a wave that fades on its way to the other rows and back may change, at no distance: it is made by one row, returned by
    /// another and brought back by the first, each with a small amplitude. Against whole common periods (melanin in keratin, solid and hollow, gaps
    /// of 20 to 120 nm) at most 2e-4 was needed.</summary>
    private const double Strength = 0.01;

    /// <summary>Estimate of the error of R and T: the first orders fade to the other rows and back, exp(-2 kappa d).</summary>
    public static double Error(StackPlan plan, in PointLight light, Complex matrix)
    {
        double error = 0;
        foreach (PlanJoint joint in plan.Joints)
        {
            error += Strength * Fading(LeastDecay(plan.Groups[joint.Upper].PeriodNm, light, matrix), joint.ClearAboveNm);
            error += Strength * Fading(LeastDecay(plan.Groups[joint.Upper + 1].PeriodNm, light, matrix), joint.ClearBelowNm);
        }
        return error;
    }

    private static double Fading(double decay, double distanceNm) => decay < 0 ? double.PositiveInfinity : Math.Exp(-2 * decay * distanceNm);

    // Im kz of the order besides the zeroth that fades most slowly; with one that travels there is no joining, and the error is infinite.
    private static double LeastDecay(double periodNm, in PointLight light, Complex matrix)
    {
        double least = double.PositiveInfinity, k0 = light.K0;
        Complex across = k0 * k0 * matrix - light.Ky * light.Ky;
        foreach (int order in (ReadOnlySpan<int>)[-3, -2, -1, 1, 2, 3])
        {
            double kx = light.Kx0 + 2 * Math.PI * order / periodNm;
            Complex squared = across - kx * kx;
            if (squared.Real > 0)
                return double.NegativeInfinity;
            least = Math.Min(least, Multilayer.StableFunctions.UpperSqrt(squared.Real, Math.Max(0, squared.Imaginary)).Imaginary);
        }
        return least;
    }
}

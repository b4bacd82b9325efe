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
    /// another and brought back by the first, each with a small amplitude; those of making and returning it grow like 1/kappa toward its onset.
    /// Against whole common periods at most a third of this was needed for melanin in keratin, solid and hollow, gaps of 0 to 40 nm, 360 to 740 nm,
    /// and a thirtieth for an index of 2.5.</summary>
    private const double Strength = 1e-3;

    /// <summary>Largest difference of permittivities among those, of air and keratin.</summary>
    private const double MeasuredContrast = 1.45;

    /// <summary>Estimate of the error of R and T: the first orders fade to the other rows and back, exp(-2 kappa d).</summary>
    /// <param name="plan">The pieces.</param>
    /// <param name="light">The incident light.</param>
    /// <param name="materials">Permittivities of the section's materials.</param>
    public static double Error(StackPlan plan, in PointLight light, ReadOnlySpan<Complex> materials)
    {
        Complex matrix = materials[Layering.Section.Matrix];
        double error = 0, strength = StrengthOf(materials, matrix);
        foreach (PlanJoint joint in plan.Joints)
        {
            error += strength * Fading(plan.Groups[joint.Upper].PeriodNm, light, matrix, joint.ClearAboveNm);
            error += strength * Fading(plan.Groups[joint.Upper + 1].PeriodNm, light, matrix, joint.ClearBelowNm);
        }
        return error;
    }

    // Each of the three amplitudes grows with the difference of permittivities.
    private static double StrengthOf(ReadOnlySpan<Complex> materials, Complex matrix)
    {
        double contrast = MeasuredContrast;
        foreach (Complex material in materials)
            contrast = Math.Max(contrast, Complex.Abs(material - matrix));
        return Strength * Math.Pow(contrast / MeasuredContrast, 3);
    }

    // (2 pi/(period kappa))^2 exp(-2 kappa d).
    private static double Fading(double periodNm, in PointLight light, Complex matrix, double distanceNm)
    {
        double decay = LeastDecay(periodNm, light, matrix), slow = 2 * Math.PI / (periodNm * decay);
        return decay <= 0 ? double.PositiveInfinity : Math.Max(1, slow * slow) * Math.Exp(-2 * decay * distanceNm);
    }

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

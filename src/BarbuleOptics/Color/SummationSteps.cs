namespace BarbuleOptics.Color;

/// <summary>The steps of summation as numbers.</summary>
public static class SummationSteps
{
    /// <summary>The step in nanometres: 1 or 5.</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="step"/> is no member of the enumeration.</exception>
    public static int NanometresOf(SummationStep step) => step switch
    {
        SummationStep.OneNanometre => 1,
        SummationStep.FiveNanometres => 5,
        _ => throw new ArgumentOutOfRangeException(nameof(step), step, "Must be a member of SummationStep."),
    };
}

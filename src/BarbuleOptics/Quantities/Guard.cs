using System.Runtime.CompilerServices;

namespace BarbuleOptics.Quantities;

/// <summary>Argument checks at the public edge: each returns its value or throws with what was found and what is allowed.</summary>
internal static class Guard
{
    public static double Finite(double value, [CallerArgumentExpression(nameof(value))] string name = "")
        => double.IsFinite(value) ? value : throw new ArgumentOutOfRangeException(name, value, "Must be a finite number.");

    public static double Positive(double value, [CallerArgumentExpression(nameof(value))] string name = "")
        => double.IsFinite(value) && value > 0
            ? value : throw new ArgumentOutOfRangeException(name, value, "Must be a finite number above 0.");

    public static double NotNegative(double value, [CallerArgumentExpression(nameof(value))] string name = "")
        => double.IsFinite(value) && value >= 0
            ? value : throw new ArgumentOutOfRangeException(name, value, "Must be a finite number, 0 or above.");

    public static double Within(double value, double least, double most, [CallerArgumentExpression(nameof(value))] string name = "")
        => value >= least && value <= most
            ? value : throw new ArgumentOutOfRangeException(name, value, FormattableString.Invariant($"Must lie between {least} and {most}."));

    public static void SameLength(int expected, int found, string name)
    {
        if (expected != found)
            throw new ArgumentException(FormattableString.Invariant($"Must have {expected} elements, has {found}."), name);
    }
}

using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>What an eye is adapted to when it looks at something.</summary>
/// <param name="Name">What it is called in output.</param>
/// <param name="Reflectance">Its reflectance, on a grid that <see cref="CatchMatrix.CanCatch"/> allows; not all of it 0.</param>
/// <exception cref="ArgumentException">The grid does not cover 300 to 700 nm, or nothing is reflected.</exception>
public sealed record AdaptingBackground(string Name, Spectrum Reflectance)
{
    /// <summary>Its reflectance.</summary>
    public Spectrum Reflectance { get; } = Checked(Reflectance);

    private static Spectrum Checked(Spectrum reflectance)
    {
        ArgumentNullException.ThrowIfNull(reflectance);
        double most = 0;
        foreach (double value in reflectance.Values)
            most = Math.Max(most, Guard.NotNegative(value, nameof(reflectance)));
        return CatchMatrix.CanCatch(reflectance.Grid) && most > 0
            ? reflectance : throw new ArgumentException(FormattableString.Invariant($"Must cover {VisualSystem.StartNm} to {VisualSystem.StopNm} nm and not be black."), nameof(reflectance));
    }
}

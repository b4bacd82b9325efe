namespace BarbuleOptics.Quantities;

/// <summary>A length, held in nanometres; always finite. The default value is zero.</summary>
public readonly record struct Length : IComparable<Length>
{
    private Length(double nanometres) => Nanometres = nanometres;

    /// <summary>The length in nanometres.</summary>
    public double Nanometres { get; }

    /// <summary>A length given in nanometres.</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="nanometres"/> is NaN or infinite.</exception>
    public static Length FromNanometres(double nanometres) => new(Guard.Finite(nanometres));

    /// <inheritdoc/>
    public int CompareTo(Length other) => Nanometres.CompareTo(other.Nanometres);

    /// <summary>Whether <paramref name="left"/> is the shorter one.</summary>
    public static bool operator <(Length left, Length right) => left.Nanometres < right.Nanometres;

    /// <summary>Whether <paramref name="left"/> is the longer one.</summary>
    public static bool operator >(Length left, Length right) => left.Nanometres > right.Nanometres;

    /// <summary>Whether <paramref name="left"/> is not the longer one.</summary>
    public static bool operator <=(Length left, Length right) => left.Nanometres <= right.Nanometres;

    /// <summary>Whether <paramref name="left"/> is not the shorter one.</summary>
    public static bool operator >=(Length left, Length right) => left.Nanometres >= right.Nanometres;

    /// <summary>The number of nanometres and the unit, in the invariant culture.</summary>
    public override string ToString() => FormattableString.Invariant($"{Nanometres} nm");
}

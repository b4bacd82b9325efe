using BarbuleOptics.Quantities;

namespace BarbuleOptics.Color;

/// <summary>The names of the standard observers in files and options.</summary>
public static class StandardObservers
{
    private const string TwoDegree = "1931-2deg";
    private const string TenDegree = "1964-10deg";

    /// <summary>All names, in the order of the standards.</summary>
    public static ValueList<string> Names { get; } = [TwoDegree, TenDegree];

    /// <summary>The name of <paramref name="observer"/>: "1931-2deg" or "1964-10deg".</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="observer"/> is no member of the enumeration.</exception>
    public static string NameOf(StandardObserver observer) => observer switch
    {
        StandardObserver.Cie1931TwoDegree => TwoDegree,
        StandardObserver.Cie1964TenDegree => TenDegree,
        _ => throw new ArgumentOutOfRangeException(nameof(observer), observer, "Must be a member of StandardObserver."),
    };

    /// <summary>The observer called <paramref name="name"/>, in any case; false when there is none.</summary>
    public static bool TryFind(string? name, out StandardObserver observer)
    {
        bool tenDegree = string.Equals(name, TenDegree, StringComparison.OrdinalIgnoreCase);
        observer = tenDegree ? StandardObserver.Cie1964TenDegree : StandardObserver.Cie1931TwoDegree;
        return tenDegree || string.Equals(name, TwoDegree, StringComparison.OrdinalIgnoreCase);
    }
}

using System.Numerics;

namespace BarbuleOptics.Materials;

/// <summary>How a structure names a material: by name, by the path of a table, or by its constants.</summary>
public abstract record MaterialReference
{
    private MaterialReference()
    {
    }

    /// <summary>A material of the catalog, by name.</summary>
    public sealed record Named(string Name) : MaterialReference
    {
        /// <inheritdoc/>
        public override string ToString() => Name;
    }

    /// <summary>A table of the user's own; the path is relative to the structure file.</summary>
    public sealed record TablePath(string Path) : MaterialReference
    {
        /// <inheritdoc/>
        public override string ToString() => Path;
    }

    /// <summary>Constants that hold at every wavelength: n above 0, k 0 or above.</summary>
    public sealed record Inline(double N, double K) : MaterialReference
    {
        /// <inheritdoc/>
        public override string ToString() => FormattableString.Invariant($"n = {N}, k = {K}");

        /// <summary>Standard deviation of what is known about n, 0 or above; the prediction is for n itself, draws vary it.</summary>
        public double NSd { get; init; }

        /// <summary>The same of k.</summary>
        public double KSd { get; init; }

        /// <summary>n + i k.</summary>
        public Complex Index => new(N, K);
    }
}

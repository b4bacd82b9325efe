using BarbuleOptics.Quantities;

namespace BarbuleOptics.Anatomy;

/// <summary>A length as it was measured: one number, a summary with its spread, replicates, or the bounds of what is not known.</summary>
/// <remarks>All values in nanometres and finite. A negative value is allowed only where a gap nests (see <see cref="BarbuleLayer.Gap"/>).</remarks>
public abstract record MeasuredLength
{
    private MeasuredLength()
    {
    }

    /// <summary>The value that the mean geometry takes: the mean, or the middle of the bounds.</summary>
    public abstract double CentralNm { get; }

    /// <summary>A length without spread.</summary>
    public static MeasuredLength FromNanometres(double nanometres) => new Exact(Guard.Finite(nanometres));

    /// <summary>One number.</summary>
    public sealed record Exact(double Nanometres) : MeasuredLength
    {
        /// <inheritdoc/>
        public override double CentralNm => Nanometres;
    }

    /// <summary>Mean and standard deviation of n independent units, with the part between barbules where it is known.</summary>
    /// <param name="MeanNm">Mean, in nm.</param>
    /// <param name="SdNm">Standard deviation within a section, in nm, 0 or above.</param>
    /// <param name="Units">Number of independent units (barbules, not melanosomes of one section), 1 or above; null when not stated.</param>
    /// <param name="SdBetweenNm">Standard deviation between barbules, in nm, 0 or above; null when not stated.</param>
    public sealed record Summary(double MeanNm, double SdNm, int? Units, double? SdBetweenNm) : MeasuredLength
    {
        /// <inheritdoc/>
        public override double CentralNm => MeanNm;
    }

    /// <summary>Bounds of a length that is not known.</summary>
    public sealed record Interval(double LeastNm, double MostNm) : MeasuredLength
    {
        /// <inheritdoc/>
        public override double CentralNm => LeastNm + (MostNm - LeastNm) / 2;
    }

    /// <summary>At least two replicates, each an independent unit.</summary>
    public sealed record Replicates(ValueList<double> ValuesNm) : MeasuredLength
    {
        /// <inheritdoc/>
        public override double CentralNm => ValuesNm.Average();
    }

    /// <summary>At least two inner lists, one for each independent unit. The center is the mean of the units' means.</summary>
    public sealed record NestedReplicates(ValueList<ValueList<double>> UnitsNm) : MeasuredLength
    {
        /// <inheritdoc/>
        public override double CentralNm => UnitsNm.Average(unit => unit.Average());
    }
}

using BarbuleOptics.Quantities;

namespace BarbuleOptics.Anatomy;

/// <summary>A number that corrects lengths, or an angle, as far as it is known.</summary>
public abstract record MeasuredFactor
{
    private MeasuredFactor()
    {
    }

    /// <summary>The value that the mean geometry takes.</summary>
    public abstract double Central { get; }

    /// <summary>A factor without spread.</summary>
    public static MeasuredFactor Of(double value) => new Exact(Guard.Finite(value));

    /// <summary>One number.</summary>
    public sealed record Exact(double Value) : MeasuredFactor
    {
        /// <inheritdoc/>
        public override double Central => Value;
    }

    /// <summary>A mean with the standard deviation of what is known about it.</summary>
    public sealed record Summary(double Mean, double Sd) : MeasuredFactor
    {
        /// <inheritdoc/>
        public override double Central => Mean;
    }

    /// <summary>Bounds of what is not known.</summary>
    public sealed record Interval(double Least, double Most) : MeasuredFactor
    {
        /// <inheritdoc/>
        public override double Central => Least + (Most - Least) / 2;
    }
}

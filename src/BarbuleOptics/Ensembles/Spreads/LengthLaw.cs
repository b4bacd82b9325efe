namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>How one length is drawn.</summary>
internal abstract record LengthLaw
{
    private LengthLaw()
    {
    }

    /// <summary>Standard deviation of the draws, in nm; for a normal law before Student's t widens it.</summary>
    public abstract double DeviationNm { get; }

    /// <summary>Around a center.</summary>
    /// <param name="ScaleNm">Standard deviation, or the standard error of a mean, in nm, above 0.</param>
    /// <param name="Degrees">Degrees of freedom of the estimate of that error; infinity for a deviation taken as known.</param>
    public sealed record Normal(double ScaleNm, double Degrees) : LengthLaw
    {
        /// <inheritdoc/>
        public override double DeviationNm => ScaleNm;
    }

    /// <summary>Anywhere between two bounds alike, for what is not known.</summary>
    public sealed record Uniform(double LeastNm, double MostNm) : LengthLaw
    {
        /// <inheritdoc/>
        public override double DeviationNm => (MostNm - LeastNm) / Math.Sqrt(12);
    }
}

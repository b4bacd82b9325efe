namespace BarbuleOptics.Materials;

/// <summary>One optical constant, n or k, as a function of the vacuum wavelength.</summary>
public interface IDispersion
{
    /// <summary>The value at a vacuum wavelength in nanometres; formulas extend beyond their range, tables do not.</summary>
    double At(double wavelengthNm);

    /// <summary>Whether values outside the stated range are the formula's own (true) or cannot be had (false: a table).</summary>
    bool Extrapolates { get; }
}

namespace BarbuleOptics.Tests.Grating;

/// <summary>What a rigorous solver says of a section at one wavelength, direction and polarization.</summary>
internal sealed record GratingAnswer(
    double Reflected, double Diffracted, double Transmitted, double Absorbed, double Error, double[] ByMaterial, double[] ReflectedOrders, double[] TransmittedOrders)
{
    /// <summary>How far the four parts are from adding up to 1.</summary>
    public double Gap => Math.Abs(Reflected + Diffracted + Transmitted + Absorbed - 1);

    /// <summary>Largest difference of the four parts.</summary>
    public double Difference(GratingAnswer other) => new[]
    {
        Reflected - other.Reflected, Diffracted - other.Diffracted, Transmitted - other.Transmitted, Absorbed - other.Absorbed,
    }.Max(Math.Abs);
}

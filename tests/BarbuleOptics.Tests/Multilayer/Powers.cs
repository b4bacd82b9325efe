namespace BarbuleOptics.Tests.Multilayer;

/// <summary>Answer of the solver at one wavelength.</summary>
internal readonly record struct Powers(double Reflected, double Transmitted, double Absorbed, double[] Films)
{
    public double Gap => Math.Abs(Reflected + Transmitted + Absorbed - 1);
}

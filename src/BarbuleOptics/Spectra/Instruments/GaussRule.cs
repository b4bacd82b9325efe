namespace BarbuleOptics.Spectra.Instruments;

/// <summary>Gauss-Legendre rules on 0 to 1.</summary>
internal static class GaussRule
{
    /// <summary>Points and weights.</summary>
    public static (double[] Points, double[] Weights) Of(int order)
    {
        var rule = new MathNet.Numerics.Integration.GaussLegendreRule(0, 1, order);
        return (rule.Abscissas, rule.Weights);
    }
}

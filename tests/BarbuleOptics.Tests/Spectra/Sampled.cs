using BarbuleOptics.Quantities;

namespace BarbuleOptics.Tests.Spectra;

/// <summary>Spectra from formulas and from lists.</summary>
internal static class Sampled
{
    public static Spectrum Over(double startNm, double stopNm, double stepNm, Func<double, double> value)
    {
        WavelengthGrid grid = WavelengthGrid.FromRange(
            Length.FromNanometres(startNm), Length.FromNanometres(stopNm), Length.FromNanometres(stepNm));
        double[] values = new double[grid.Count];
        for (int i = 0; i < values.Length; i++)
            values[i] = value(grid.Nanometres[i]);
        return new Spectrum(grid, values);
    }

    public static Spectrum From(double startNm, params double[] valuesAtOneNm)
        => Over(startNm, startNm + valuesAtOneNm.Length - 1, 1, wavelengthNm => valuesAtOneNm[(int)Math.Round(wavelengthNm - startNm)]);

    public static double Gaussian(double x, double center, double sd) => Math.Exp(-Math.Pow((x - center) / sd, 2) / 2);
}

using BarbuleOptics.Quantities;

namespace BarbuleOptics.Tests.Color;

/// <summary>Grids and reflectance spectra for the color tests.</summary>
internal static class ColorSamples
{
    public static WavelengthGrid Grid(double startNm, double stopNm, double stepNm)
        => WavelengthGrid.FromRange(Length.FromNanometres(startNm), Length.FromNanometres(stopNm), Length.FromNanometres(stepNm));

    public static Spectrum On(WavelengthGrid grid, Func<double, double> reflectance)
    {
        var values = new double[grid.Count];
        for (int i = 0; i < values.Length; i++)
            values[i] = reflectance(grid.Nanometres[i]);
        return new Spectrum(grid, values);
    }

    /// <summary>A bell of the given full width at half its height.</summary>
    public static double Bell(double wavelengthNm, double centerNm, double widthNm)
        => Math.Exp(-4 * Math.Log(2) * Math.Pow((wavelengthNm - centerNm) / widthNm, 2));

    /// <summary>Six unlike reflectances by name.</summary>
    public static double Named(string name, double l) => name switch
    {
        "flat" => 0.5,
        "band-pass" => l is >= 481 and <= 563 ? 0.9 : 0.02,
        "fringe" => 0.06 + 0.045 * Math.Cos(4 * Math.PI * 1.56 * 640 / l),
        "ramp" => 0.1 + 0.8 * (l - 360) / 420,
        "narrow peak" => 0.01 + 0.95 * Bell(l, 472, 8),
        "dark" => 0.002 + 0.02 * Bell(l, 441, 60),
        _ => throw new ArgumentOutOfRangeException(nameof(name), name, "No such sample."),
    };
}

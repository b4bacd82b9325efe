using BarbuleOptics.Color;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Color;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Tests.Vision;

/// <summary>Eyes and spectra for the tests of vision.</summary>
internal static class Eyes
{
    public static readonly WavelengthGrid Usual = ColorSamples.Grid(300, 780, 1);

    public static IEnumerable<(VisualSystem System, Illuminant Light)> All
        => VisualSystems.All.SelectMany(system => (Illuminant[])[Illuminant.D65, Illuminant.A, Illuminant.E], (system, light) => (system, light));

    /// <summary>A smooth random reflectance: some bells on a level, at least 0.02.</summary>
    public static Spectrum RandomSpectrum(Random random, WavelengthGrid grid)
    {
        double level = 0.02 + 0.2 * random.NextDouble();
        (double Height, double CenterNm, double WidthNm)[] bells = [.. Enumerable.Range(0, 4).Select(_ => (random.NextDouble(), 300 + 400 * random.NextDouble(), 20 + 150 * random.NextDouble()))];
        return ColorSamples.On(grid, nm => level + bells.Sum(bell => bell.Height * ColorSamples.Bell(nm, bell.CenterNm, bell.WidthNm)));
    }

    public static Spectrum Scaled(Spectrum spectrum, double factor) => ColorSamples.On(spectrum.Grid, nm => factor * spectrum[(int)Math.Round((nm - spectrum.Grid.StartNm) / spectrum.Grid.StepNm)]);
}

using System.Globalization;
using BarbuleOptics.Prediction;
using BarbuleOptics.Spectra.Instruments;

namespace BarbuleOptics.Cli;

/// <summary>What a table says of an instrument.</summary>
internal static class SignalLines
{
    /// <summary>One line for the instrument and one an angle; none without one.</summary>
    public static IEnumerable<string> Of(StructurePrediction prediction)
    {
        if (prediction.Conditions.Instrument is not Instrument instrument)
            yield break;
        yield return $"Read with an instrument: {Describe(instrument)}. 'height', 'mean R' and color are of its signal; spectra.csv keeps the reflectance of the flat section at one angle.";
        foreach (View view in prediction.Views)
        {
            InstrumentSignal signal = view.Signal!;
            string share = signal.FacingShare is double facing
                ? string.Create(CultureInfo.InvariantCulture, $"mirrors in place of the facets would give {facing:0.####} of one mirror that faces the arms")
                : "the signal is that of the facets that face the arms";
            string diffracted = signal.DiffractedShare > 0 ? string.Create(CultureInfo.InvariantCulture, $", {signal.DiffractedShare:0.###} of the signal from diffracted orders") : "";
            yield return string.Create(CultureInfo.InvariantCulture,
                $"Arms at {view.Incidence.Degrees:0.##} deg: {share}, at a mean incidence of {signal.MeanIncidence.Degrees:0.#} deg{diffracted}; integration error {signal.ErrorEstimate:0.0e+0} ({signal.Directions} directions), scale {signal.Scale:0.####}.");
        }
    }

    private static string Describe(Instrument instrument)
    {
        string arms = instrument.Arms.Kind switch
        {
            ArmGeometryKind.OneLine => "light and collection on one line",
            ArmGeometryKind.FixedArms => string.Create(CultureInfo.InvariantCulture, $"two arms {instrument.Arms.Span.Degrees} deg apart"),
            _ => "both arms turn",
        };
        string tilt = instrument.Tilt.Kind switch
        {
            FacetTiltKind.Normal => string.Create(CultureInfo.InvariantCulture, $"facets tilted by {instrument.Tilt.Width.Degrees} deg (sd)"),
            FacetTiltKind.Arc => string.Create(CultureInfo.InvariantCulture, $"facets on an arc of {instrument.Tilt.Width.Degrees} deg to either side"),
            _ => "flat facets",
        };
        string rods = instrument.RodSpread.Degrees > 0 ? string.Create(CultureInfo.InvariantCulture, $", rods spread by {instrument.RodSpread.Degrees} deg (sd)") : "";
        string reference = instrument.Reference == SignalReference.WhiteStandard ? "a perfect matt white" : "a perfect mirror that faces the arms";
        return string.Create(CultureInfo.InvariantCulture,
            $"{arms}, cones of light and collection of {instrument.Light.Degrees:0.###} and {instrument.Collection.Degrees:0.###} deg (half angle), {tilt}{rods}; against {reference}");
    }
}

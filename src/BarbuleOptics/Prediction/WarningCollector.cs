using BarbuleOptics.Anatomy;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Prediction;

/// <summary>Says in words what a prediction leans on.</summary>
internal sealed class WarningCollector(Barbule barbule, Section section, PredictionConditions conditions, bool isRigorous)
{
    /// <summary>L* below which a swatch is black on any screen.</summary>
    private const double DarkestShown = 5;

    /// <summary>CIEDE2000 between layer model and rigorous solution above which is warned: 1 is just noticeable side by side.</summary>
    private const double MostColorDifference = 3;

    /// <summary>The same for the reflectance, where there is no color.</summary>
    private const double MostReflectanceChange = 0.05;

    /// <summary>Share of a mirror's signal below which an instrument sees nothing much.</summary>
    private const double LeastFacing = 1e-3;

    private readonly List<PredictionWarning> _warnings = [];

    public ValueList<PredictionWarning> All => [.. _warnings];

    public void AboutStructure(IReadOnlyList<Material> materials)
    {
        AboutIndices(materials);
        if (barbule.Backing is null)
            Add(WarningCodes.BackingUnknown, "the backing is unknown and was taken as keratin; run again with --set barbule.backing=air and with --set barbule.backing=eumelanin to see how much it matters");
        foreach ((string key, MeasuredLength length) in MeasuredLengths.Of(barbule))
        {
            if (length is MeasuredLength.Interval interval && interval.MostNm > interval.LeastNm)
                Add(WarningCodes.IntervalMiddle, FormattableString.Invariant($"{key} is only known to lie between {interval.LeastNm} and {interval.MostNm} nm; its middle, {interval.CentralNm:0.###} nm, was used; run again with --set {key}={interval.LeastNm} and with --set {key}={interval.MostNm} to see how much it matters"));
        }
        foreach ((string key, MeasuredFactor factor, string unit) in MeasuredFactors.Of(barbule))
        {
            if (factor is MeasuredFactor.Interval interval && interval.Most > interval.Least)
                Add(WarningCodes.IntervalMiddle, FormattableString.Invariant($"{key} is only known to lie between {interval.Least} and {interval.Most}{(unit.Length > 0 ? " " + unit : "")}; its middle, {interval.Central:0.####}, was used"));
        }
        if (section.Runs.Any(run => run.Cell.Any(body => body.Outer.Shape == OutlineShape.Rectangle) && !run.IsFilm))
            Add(WarningCodes.BarModel, "platelets are computed as bars without end along one direction; real ones end in both; say so where you report the result");
        if (section.Materials.Any(material => material.IsAveraged))
            Add(WarningCodes.CoreAveraged, "a porous core is computed as one permittivity (three-dimensional Bruggeman average); pores near a tenth of the wavelength also scatter; if yours are as large, expect a paler color");
    }

    public void AboutThinBack()
        => Add(WarningCodes.BackCoherent, FormattableString.Invariant(
            $"the backing of {section.Back!.Thickness.CentralNm:0.##} nm is thinner than half a wave at {conditions.Wavelengths.StopNm} nm, too thin to average over fringes; it was solved at this one thickness, as with coherent = true"));

    /// <summary>Each layer opens orders by its own spacing, so the longest decides; what spacings do together is said beside it.</summary>
    public void AboutOrders(Material surround, Material matrix)
    {
        double[] spacingsNm = [.. section.Runs.Where(run => !run.IsFilm).Select(run => run.SpacingNm).Distinct()];
        if (spacingsNm.Length == 0)
            return;
        double spacingNm = spacingsNm.Max();
        ReadOnlySpan<double> wavelengthsNm = conditions.Wavelengths.Nanometres;
        double? coarseNm = DiffractionOnset.LongestWithin(wavelengthsNm, wavelength => 2 * spacingNm * matrix.N.At(wavelength));
        if (coarseNm is double coarse && !isRigorous)
            Add(WarningCodes.CoarseSpacing, FormattableString.Invariant($"the spacing of {spacingNm:0.##} nm is over half a wavelength in the matrix up to {coarse:0.#} nm, where averaging rows into films is a rough picture; rely on the grating solver, which runs where no --mixing rule is named{Together(spacingsNm)}"));
        foreach (Angle incidence in conditions.Incidences)
        {
            double sine = Math.Sin(incidence.Radians);
            double? inMatrix = DiffractionOnset.LongestWithin(wavelengthsNm, w => DiffractionOnset.InMatrixNm(section, spacingNm, sine, surround.N.At(w), matrix.N.At(w)));
            double? inSurround = DiffractionOnset.LongestWithin(wavelengthsNm, w => DiffractionOnset.InSurroundNm(section, spacingNm, sine, surround.N.At(w)));
            if (inMatrix is double m)
                Add(WarningCodes.OrdersInMatrix, InMatrix(m), incidence);
            if (inSurround is double s)
                Add(WarningCodes.OrdersInSurround, InSurround(s), incidence);
        }
    }

    private string InMatrix(double lastNm)
        => FormattableString.Invariant($"up to {lastNm:0.#} nm the rows act as a diffraction grating inside the barbule") + (isRigorous
            ? ", which was solved as such; but no barbule is a perfect lattice, and its disorder smears the narrow resonances of light trapped there: rely on the broad features"
            : ", where no mixing rule holds; do not rely on the spectrum there, nor on a color that rests on it: leave --mixing out for the grating solver");

    private string InSurround(double lastNm)
        => FormattableString.Invariant($"up to {lastNm:0.#} nm the rows also send light in other directions than that of a mirror") + (isRigorous
            ? "; R, peaks and color are those of the mirror's direction alone, and diffracted_reflectance has the rest: compare with measurements that leave it out"
            : ", which films leave out; compare with measurements at longer wavelengths only");

    private string Together(double[] spacingsNm)
        => spacingsNm.Length == 1 ? "" : section.PeriodNm is double periodNm
            ? FormattableString.Invariant($"; spacings that differ repeat together after {periodNm:0.##} nm, so that weaker orders open at longer wavelengths still")
            : "; spacings that differ open weaker orders together at longer wavelengths still";

    public void AboutCoverage(bool coversVisible, bool coversObserver)
    {
        if (!coversVisible)
            Add(WarningCodes.NoColor, "the wavelengths do not cover 400-700 nm in steps of at most 20 nm, so no color was computed; the spectra stand; --wavelengths 300:780:1 gives both");
        else if (!coversObserver)
            Add(WarningCodes.ObserverNotCovered, "the wavelengths do not cover 380-780 nm; beyond them the color holds the end values; --wavelengths 380:780:1 covers them");
    }

    /// <summary>Says where eyes cannot be asked.</summary>
    public void AboutEyes(bool canCatch)
    {
        if (!canCatch && conditions.Eyes.Count > 0)
            Add(WarningCodes.NoBirdColor, "the wavelengths do not cover 300-700 nm in steps of at most 20 nm, so no color to a bird was computed; what lies beyond was not guessed; --wavelengths 300:780:1 covers both");
    }

    public void AboutView(View view)
    {
        if (view.Features.AtEdge)
            Add(WarningCodes.PeakAtEdge, FormattableString.Invariant($"the reflectance still rises at {EndsOf(view)}; a peak may lie beyond: widen --wavelengths to see it"), view.Incidence);
        if (view.Birds.Any(bird => bird.IsDark))
            Add(WarningCodes.DarkToBirds, FormattableString.Invariant($"some cones catch less than {BirdColor.LeastCatch} of what the background gives them; contrasts rest on logarithms of catches, which mean little so near to black: report relative catches and no contrast"), view.Incidence);
        // No screen shows which black a black is.
        if (view.Color is { InSrgbGamut: false, Lab.L: >= DarkestShown })
            Add(WarningCodes.OutsideSrgb, "the color lies outside sRGB; its swatch is the nearest that a screen shows; report x and y, or L*, C* and h", view.Incidence);
    }

    /// <summary>Says how far the layer model is off at the angle where it is worst; only where it is the result, for beside a rigorous one its
    /// error is no reason to worry.</summary>
    public void AboutLayerModel(IReadOnlyList<View> views)
    {
        if (isRigorous)
            return;
        View[] off = [.. views.Where(view => view.LayerModelError is LayerModelError found
            && (found.Ciede2000 is double difference ? difference > MostColorDifference : found.LargestChange > MostReflectanceChange))];
        if (off.Length == 0)
            return;
        View worst = off.MaxBy(view => view.LayerModelError!.Ciede2000 ?? view.LayerModelError!.LargestChange)!;
        LayerModelError error = worst.LayerModelError!;
        string color = error.Ciede2000 is double ciede ? FormattableString.Invariant($", and the color differs by {ciede:0.0} in CIEDE2000") : "";
        string others = off.Length == 1 ? "" : FormattableString.Invariant($", the worst of {off.Length} angles");
        Add(WarningCodes.LayerModelError, FormattableString.Invariant(
            $"the layer model is off by {error.LargestChange:0.000} in reflectance at {error.LargestChangeAtNm:0.#} nm{color}{others}; leave --mixing out for the rigorous solution"), worst.Incidence);
    }

    /// <summary>Says where an instrument sees little, and what its signal leaves out.</summary>
    public void AboutSignals(IReadOnlyList<InstrumentSignal> signals)
    {
        foreach (InstrumentSignal signal in signals)
        {
            if (signal.FacingShare < LeastFacing)
                Add(WarningCodes.NoSignal, FormattableString.Invariant($"{signal.FacingShare:0.0e+0} of the light a mirror would send into the collector comes from these facets; there is hardly anything to measure: widen --aperture or --tilt, or turn the arms"), signal.Angle);
        }
        double worst = signals.Max(signal => signal.ErrorEstimate / signal.Scale);
        if (worst > 2 * InstrumentSignals.LastAdded * conditions.Accuracy)
            Add(WarningCodes.SignalAccuracy, FormattableString.Invariant($"the integral over cones and facets may be off by {worst:0.0e+0} of a mirror's signal, above the {conditions.Accuracy:0.0e+0} asked for; report it"));
        if (conditions.Polarization != Polarizations.Unpolarized)
            Add(WarningCodes.SignalPolarization, "the signal is computed as if every facet saw the light in the plane of the arms; tilted facets turn the polarization a little: rely on unpolarized signals where that matters");
        else if (!isRigorous && !section.IsFilms)
            Add(WarningCodes.SignalAzimuth, "films know rods across or along only; between the two the signal takes cos^2 and sin^2 of the azimuth as shares: leave --mixing out for the rigorous solution");
    }

    private string EndsOf(View view)
    {
        WavelengthGrid grid = conditions.Wavelengths;
        return (view.Features.RisesAtStart, view.Features.RisesAtStop) switch
        {
            (true, true) => FormattableString.Invariant($"both ends, {grid.StartNm} and {grid.StopNm} nm"),
            (true, false) => FormattableString.Invariant($"the short end, {grid.StartNm} nm"),
            _ => FormattableString.Invariant($"the long end, {grid.StopNm} nm"),
        };
    }

    /// <summary>Says what error the slices of the layer model leave.</summary>
    public void AboutSlices(double reached)
    {
        if (reached > conditions.Accuracy)
            Add(WarningCodes.AccuracyNotReached, FormattableString.Invariant($"the depth slices reach {reached:0.0e+0} in R and T, not the {conditions.Accuracy:0.0e+0} asked for; report the error reached, or ask for less with --accuracy"));
    }

    /// <summary>Says what was done with layers of different spacing, and what it may cost.</summary>
    public void AboutSpacings(SpacingReport? report, string where = "")
    {
        if (report is null)
            return;
        string moves = string.Join(", ", report.Moves.Select(move => FormattableString.Invariant($"layer {move.LayerNumber} from {move.FromNm:0.##} to {move.ToNm:0.##} nm")));
        Add(WarningCodes.SpacingMoved, FormattableString.Invariant(
            $"{where}layers of different spacing were solved with a common period of {report.PeriodNm:0.##} nm where more than one order passes between them, up to {report.LongestNm:0.#} nm: {moves}; the next choice of a period changes R by up to {report.Change:0.0e+0} there: rely on no finer detail"));
    }

    /// <summary>Says where the comparison of a layer model with the rigorous solution cannot be better than that is; null where there is none.</summary>
    public void AboutReference(GratingResponses? rigorous, SpacingReport? spacings)
    {
        if (rigorous is { IsUnreliable: true })
        {
            (Angle incidence, double wavelengthNm, double error) = rigorous.Worst;
            Add(WarningCodes.AccuracyNotReached, FormattableString.Invariant(
                $"at {wavelengthNm:0.###} nm the rigorous solution beside this layer model may be off by {error:0.00}, above {GratingResponses.MostError}; the two were not compared"), incidence);
            return;
        }
        AboutSpacings(spacings, "in the rigorous solution beside this layer model ");
        if (rigorous?.ErrorEstimate > conditions.Accuracy)
        {
            Add(WarningCodes.AccuracyNotReached, FormattableString.Invariant(
                $"the rigorous solution beside this layer model may be off by {rigorous.ErrorEstimate:0.0e+0}, above the {conditions.Accuracy:0.0e+0} asked for; rely on no smaller difference between the two"));
        }
    }

    /// <summary>Says where the rigorous solution stayed above the error asked for.</summary>
    public void AboutAccuracy(GratingResponses rigorous)
    {
        (Angle Incidence, double WavelengthNm, double Error)[] missed = [.. rigorous.Errors.Where(sample => sample.Error > conditions.Accuracy)];
        if (missed.Length == 0)
            return;
        (Angle incidence, double worstNm, double worst) = missed.MaxBy(sample => sample.Error);
        double fromNm = missed.Min(sample => sample.WavelengthNm), toNm = missed.Max(sample => sample.WavelengthNm);
        string others = missed.Length == 1 ? "" : FormattableString.Invariant(
            $"; {missed.Length} of {rigorous.Errors.Count()} values lie above it, at {fromNm:0.###} to {toNm:0.###} nm and {List([.. missed.Select(sample => sample.Incidence.Degrees).Distinct().Order()])} degrees");
        Add(WarningCodes.AccuracyNotReached, FormattableString.Invariant(
            $"at {worstNm:0.###} nm the error may reach {worst:0.0e+0}, above the {conditions.Accuracy:0.0e+0} asked for{others}; report the error reached, or ask for less with --accuracy"), incidence);
    }

    private static string List(double[] values)
        => FormattableString.Invariant(values.Length == 1 ? (FormattableString)$"{values[0]:0.##}" : $"{values[0]:0.##} to {values[^1]:0.##}");

    private void AboutIndices(IReadOnlyList<Material> materials)
    {
        foreach (Material material in materials)
        {
            if (material.Covers(conditions.Wavelengths))
                continue;
            var parts = new List<string>();
            if (conditions.Wavelengths.StartNm < material.LeastNm)
                parts.Add(FormattableString.Invariant($"{conditions.Wavelengths.StartNm}-{Math.Min(material.LeastNm, conditions.Wavelengths.StopNm)} nm"));
            if (conditions.Wavelengths.StopNm > material.MostNm)
                parts.Add(FormattableString.Invariant($"{Math.Max(material.MostNm, conditions.Wavelengths.StartNm)}-{conditions.Wavelengths.StopNm} nm"));
            Add(WarningCodes.IndexExtrapolated, FormattableString.Invariant(
                $"the index of {material.Name} was published for {material.LeastNm}-{material.MostNm} nm; at {string.Join(" and ", parts)} its formula is extended; rely less on what lies there (barbule materials NAME shows its note), or give a table of your own (--materials)"));
        }
    }

    private void Add(string code, string message, Angle? incidence = null) => _warnings.Add(new PredictionWarning(code, message, incidence));
}

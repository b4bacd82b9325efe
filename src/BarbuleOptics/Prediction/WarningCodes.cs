namespace BarbuleOptics.Prediction;

/// <summary>The codes of warnings; they stay as they are from version to version.</summary>
public static class WarningCodes
{
    /// <summary>A dispersion formula is used beyond the wavelengths it was published for.</summary>
    public const string IndexExtrapolated = "index-extrapolated";

    /// <summary>Diffraction orders propagate in the matrix at wavelengths shown: no mixing rule holds, and disorder smears what a grating does.</summary>
    public const string OrdersInMatrix = "orders-in-matrix";

    /// <summary>Diffraction orders leave into the surround at wavelengths shown.</summary>
    public const string OrdersInSurround = "orders-in-surround";

    /// <summary>The spacing is over half a wavelength in the matrix, where averaging into films means little.</summary>
    public const string CoarseSpacing = "coarse-spacing";

    /// <summary>Platelets are computed as bars without end.</summary>
    public const string BarModel = "bar-model";

    /// <summary>A porous core is computed as one averaged permittivity.</summary>
    public const string CoreAveraged = "core-averaged";

    /// <summary>A color lies outside sRGB and its swatch is only the nearest shown.</summary>
    public const string OutsideSrgb = "outside-srgb";

    /// <summary>The spectrum still rises at an end of the grid.</summary>
    public const string PeakAtEdge = "peak-at-edge";

    /// <summary>A length given by bounds is taken at its middle.</summary>
    public const string IntervalMiddle = "interval-middle";

    /// <summary>An unknown backing is taken as the default matrix.</summary>
    public const string BackingUnknown = "backing-unknown";

    /// <summary>A backing to be averaged over thickness is too thin for it and was solved at its own thickness.</summary>
    public const string BackCoherent = "back-coherent";

    /// <summary>The grid ends within the observer's range and the ends are held.</summary>
    public const string ObserverNotCovered = "observer-not-covered";

    /// <summary>The grid leaves out visible light, so there is no color.</summary>
    public const string NoColor = "no-color";

    /// <summary>The grid leaves out light that birds see, so there is no color to a bird.</summary>
    public const string NoBirdColor = "no-bird-color";

    /// <summary>So little is caught by an eye that contrasts, which rest on logarithms, mean little.</summary>
    public const string DarkToBirds = "dark-to-birds";

    /// <summary>The solver could not be refined to the accuracy asked for.</summary>
    public const string AccuracyNotReached = "accuracy-not-reached";

    /// <summary>The layer model, asked for, gives another color than the rigorous solution.</summary>
    public const string LayerModelError = "layer-model-error";

    /// <summary>Spacings without a common period were moved to the nearest one.</summary>
    public const string SpacingMoved = "spacing-moved";

    /// <summary>Draws: a spread rests on fewer than four independent units.</summary>
    public const string FewUnits = "few-units";

    /// <summary>Draws: a length was kept, since it says nothing of the spread asked for.</summary>
    public const string LengthKept = "length-kept";

    /// <summary>Draws: a length that is not known was drawn between its bounds.</summary>
    public const string RangeDrawn = "range-drawn";

    /// <summary>Draws: lists of as many replicates were taken as measured on the same units.</summary>
    public const string ReplicatesPaired = "replicates-paired";

    /// <summary>Draws: rows were drawn one by one, and each stays periodic.</summary>
    public const string RowsPeriodic = "rows-periodic";

    /// <summary>Draws: many lengths drawn could not be and were moved to the nearest that could, which shifts their mean.</summary>
    public const string DrawsTruncated = "draws-truncated";

    /// <summary>Draws: some could not be solved and were left out.</summary>
    public const string DrawsFailed = "draws-failed";

    /// <summary>Draws: the peak of the mean geometry was lost in some.</summary>
    public const string PeakLost = "peak-lost";

    /// <summary>No facet, or hardly one, sends light from one arm of the instrument into the other.</summary>
    public const string NoSignal = "no-signal";

    /// <summary>The signal is one of polarized light, whose turning on tilted facets is left out.</summary>
    public const string SignalPolarization = "signal-polarization";

    /// <summary>Films stand for rows at azimuths between across and along.</summary>
    public const string SignalAzimuth = "signal-azimuth";

    /// <summary>The integral over directions did not reach the accuracy asked for.</summary>
    public const string SignalAccuracy = "signal-accuracy";

    /// <summary>Draws: they are of one direction, whatever instrument the prediction is read with.</summary>
    public const string DrawsOneDirection = "draws-one-direction";
}

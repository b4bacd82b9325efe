using BarbuleOptics.Color;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra.Instruments;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Prediction;

/// <summary>How a structure is looked at.</summary>
public sealed record PredictionConditions
{
    /// <summary>Vacuum wavelengths; 300 to 780 nm in steps of 1 nm unless set.</summary>
    public WavelengthGrid Wavelengths { get; init; } = WavelengthGrid.FromRange(
        Length.FromNanometres(300), Length.FromNanometres(780), Length.FromNanometres(1));

    /// <summary>Angles of incidence in the surround, each 0 to below 90 degrees; normal incidence unless set.</summary>
    /// <exception cref="ArgumentException">There is none, or one lies outside its range.</exception>
    public ValueList<Angle> Incidences
    {
        get;
        init => field = value.Count > 0 && value.All(angle => angle.Degrees is >= 0 and < 90)
            ? value : throw new ArgumentException("Must be one angle or more, each 0 to below 90 degrees.", nameof(value));
    } = [Angle.FromDegrees(0)];

    /// <summary>Polarization of the incident light that views and colors are of; both unless set.</summary>
    public Polarizations Polarization { get; init; } = Polarizations.Unpolarized;

    /// <summary>Whether the spectra hold s, p and their mean (true), or the polarization asked for alone (false).</summary>
    public bool AllPolarizations { get; init; } = true;

    /// <summary>Largest absolute error asked of R, T and A, above 0; 1e-4 unless set.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not a finite number above 0.</exception>
    public double Accuracy { get; init => field = Guard.Positive(value); } = 1e-4;

    /// <summary>Which solver is asked for; the rigorous one wherever films are not exact unless set.</summary>
    public SolverChoice Solver { get; init; } = SolverChoice.Auto;

    /// <summary>How rows are averaged into films; naming a rule asks for the layer model, and none is named unless set.</summary>
    public IMixingRule? Mixing { get; init; }

    /// <summary>Whether the layer model is solved beside every rigorous result, and the rigorous solution beside every result by a rule that was named,
    /// so that views say how far apart they are; true unless set.</summary>
    public bool ComparesSolvers { get; init; } = true;

    /// <summary>The light under which colors are computed, to people and to birds; D65 unless set.</summary>
    public Illuminant Illuminant { get; init; } = Illuminant.D65;

    /// <summary>The observer; CIE 1931 unless set.</summary>
    public StandardObserver Observer { get; init; } = StandardObserver.Cie1931TwoDegree;

    /// <summary>Over which wavelengths tristimulus values are summed; every nanometre unless set.</summary>
    public SummationStep Summation { get; init; } = SummationStep.OneNanometre;

    /// <summary>The eyes of birds that colors are computed for, each name once; the two averages unless set.</summary>
    /// <exception cref="ArgumentException">Two have one name.</exception>
    public ValueList<VisualSystem> Eyes
    {
        get;
        init => field = value.Select(eye => eye.Name).Distinct(StringComparer.OrdinalIgnoreCase).Count() == value.Count
            ? value : throw new ArgumentException("Every eye must have a name of its own.", nameof(value));
    } = VisualSystems.Averages;

    /// <summary>What those eyes are adapted to; flat, a perfect mirror, where null, as it is unless set.</summary>
    public AdaptingBackground? Background { get; init; }
    /// <summary>The instrument that views and colors are read with; null for the reflectance of a flat section at one angle, as it is unless set.</summary>
    public Instrument? Instrument { get; init; }

    /// <summary>Most threads used, 1 or above; all processors unless set. Results do not depend on it.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Below 1.</exception>
    public int Threads
    {
        get;
        init => field = value >= 1 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "Must be 1 or above.");
    } = Environment.ProcessorCount;
}

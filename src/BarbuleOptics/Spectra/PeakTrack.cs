using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra;

/// <summary>One peak followed over the angle of incidence by continuity, and the index that its shift shows.</summary>
/// <param name="Sightings">One an angle, in the order of the angles.</param>
/// <param name="Shift">The fitted law of its shift; null with fewer than two sightings or where the peak does not shift towards the blue.</param>
public sealed record PeakTrack(ValueList<PeakSighting> Sightings, BlueShift? Shift)
{
    /// <summary>The index that the shift shows; null where there is no <see cref="Shift"/>.</summary>
    public double? EffectiveIndex => Shift?.EffectiveIndex;

    /// <summary>Follows the main peak of the smallest angle at which there is one.</summary>
    /// <param name="views">Angle of incidence, 0 to below 90 degrees, and the spectrum's features there; angles ascend.</param>
    /// <param name="surroundIndex">Refractive index of the medium the light comes from, above 0: 1 for air.</param>
    /// <remarks>
    /// The next wavelength is predicted from two sightings as lambda^2 linear in (n_s sin a)^2, or, where the angles of the sightings
    /// lie too close for the step ahead or there is one alone, for a stack of index 1.55 (<see cref="BlueShift"/>). The nearest peak is taken, one with at least a tenth of the last prominence before
    /// weaker ones; the peak is lost where none lies within 3 % of the prediction plus half of the predicted shift. A lost peak may be
    /// found again at a later angle. Where fringes crowd, steps of the angle should stay below half a fringe.
    /// </remarks>
    /// <exception cref="ArgumentException">Angles do not ascend.</exception>
    /// <exception cref="ArgumentOutOfRangeException">An angle or the index lies outside its range.</exception>
    public static PeakTrack Follow(IReadOnlyList<(Angle Incidence, SpectrumFeatures Features)> views, double surroundIndex = 1)
    {
        ArgumentNullException.ThrowIfNull(views);
        Guard.Positive(surroundIndex);
        CheckAngles(views);

        var prediction = new PeakPrediction(surroundIndex);
        var sightings = new List<PeakSighting>(views.Count);
        foreach ((Angle incidence, SpectrumFeatures features) in views)
        {
            double sineSquared = Math.Pow(surroundIndex * Math.Sin(incidence.Radians), 2);
            SpectralPeak? peak = prediction.IsOpen ? features.MainPeak : prediction.Choose(sineSquared, features.Peaks);
            if (peak is not null)
                prediction.Add(sineSquared, peak);
            sightings.Add(new PeakSighting(incidence, peak));
        }
        return new PeakTrack([.. sightings], BlueShift.Fit(prediction.SinesSquared, prediction.WavelengthsNm));
    }

    private static void CheckAngles(IReadOnlyList<(Angle Incidence, SpectrumFeatures Features)> views)
    {
        double before = double.NegativeInfinity;
        foreach ((Angle incidence, _) in views)
        {
            double degrees = incidence.Degrees;
            if (!(degrees >= 0 && degrees < 90))
                throw new ArgumentOutOfRangeException(nameof(views), degrees, "Angles must be 0 or above and below 90 degrees.");
            if (degrees <= before)
                throw new ArgumentException(FormattableString.Invariant($"Angles must ascend; {degrees} follows {before} degrees."), nameof(views));
            before = degrees;
        }
    }
}

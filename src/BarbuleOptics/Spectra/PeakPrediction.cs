using System.Runtime.InteropServices;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra;

/// <summary>Where a followed peak should be next, from where it was.</summary>
internal sealed class PeakPrediction(double surroundIndex)
{
    /// <summary>Index of a barbule before any shift was seen: keratin's.</summary>
    private const double UsualIndex = 1.55;

    /// <summary>Share of the prediction within which a peak is taken for the same.</summary>
    private const double Tolerance = 0.03;

    /// <summary>Share of the predicted shift that may be wrong.</summary>
    private const double ShiftTolerance = 0.5;

    /// <summary>Share of the last prominence that a peak should have.</summary>
    private const double LeastProminenceShare = 0.1;

    /// <summary>Distance of two sightings, as a share of the step ahead, from which their slope is trusted.</summary>
    private const double LeastBaseline = 0.25;

    private readonly List<double> _sinesSquared = [];
    private readonly List<double> _wavelengthsNm = [];
    private double _lastProminence;

    /// <summary>Whether no peak was seen yet.</summary>
    public bool IsOpen => _wavelengthsNm.Count == 0;

    /// <summary>(n_s sin a)^2 of each sighting.</summary>
    public ReadOnlySpan<double> SinesSquared => CollectionsMarshal.AsSpan(_sinesSquared);

    /// <summary>Wavelength of each sighting, in nm.</summary>
    public ReadOnlySpan<double> WavelengthsNm => CollectionsMarshal.AsSpan(_wavelengthsNm);

    /// <summary>Remembers a sighting.</summary>
    public void Add(double sineSquared, SpectralPeak peak)
    {
        _sinesSquared.Add(sineSquared);
        _wavelengthsNm.Add(peak.WavelengthNm);
        _lastProminence = peak.Prominence;
    }

    /// <summary>The peak that continues the sightings; null where there is none.</summary>
    public SpectralPeak? Choose(double sineSquared, ValueList<SpectralPeak> peaks)
    {
        double expectedNm = WavelengthNmAt(sineSquared);
        double reachNm = Tolerance * expectedNm + ShiftTolerance * Math.Abs(_wavelengthsNm[^1] - expectedNm);
        var within = peaks.Where(peak => Math.Abs(peak.WavelengthNm - expectedNm) <= reachNm).ToList();
        return within.Where(peak => peak.Prominence >= LeastProminenceShare * _lastProminence).MinBy(Distance) ?? within.MinBy(Distance);

        double Distance(SpectralPeak peak) => Math.Abs(peak.WavelengthNm - expectedNm);
    }

    private double WavelengthNmAt(double sineSquared)
    {
        double last = _wavelengthsNm[^1] * _wavelengthsNm[^1], lastSine = _sinesSquared[^1];
        double square = last + Slope(sineSquared - lastSine) * (sineSquared - lastSine);
        return Math.Sqrt(Math.Max(0, square));
    }

    /// <summary>Slope of lambda^2 over (n_s sin a)^2, from the last sighting and the latest before it that lies far enough away not to
    /// magnify the peaks' errors over <paramref name="step"/>; for the usual index where none does.</summary>
    private double Slope(double step)
    {
        double last = _wavelengthsNm[^1] * _wavelengthsNm[^1], lastSine = _sinesSquared[^1];
        for (int i = _wavelengthsNm.Count - 2; i >= 0; i--)
        {
            if (lastSine - _sinesSquared[i] >= LeastBaseline * step)
                return (last - _wavelengthsNm[i] * _wavelengthsNm[i]) / (lastSine - _sinesSquared[i]);
        }
        // Light from a denser surround still enters what it shines on, so the index guessed must exceed that of the surround.
        double index = Math.Max(UsualIndex, 1.05 * surroundIndex);
        return -last / (index * index - lastSine);
    }
}

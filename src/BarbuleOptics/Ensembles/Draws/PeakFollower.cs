namespace BarbuleOptics.Ensembles.Draws;

/// <summary>Finds the main peak of the mean geometry again in the spectrum of a draw.</summary>
/// <remarks>The peak moves with the lengths almost in proportion: its place is predicted from its slope against each length at the mean geometry, and the
/// peak nearest to the prediction is taken, at most half the way to the mean geometry's next peak off, so that an order of interference is not mistaken for another.</remarks>
internal sealed class PeakFollower
{
    /// <summary>Farthest from the prediction where the mean geometry has no other peak, as a share of the wavelength.</summary>
    private const double MostShare = 0.15;

    private readonly double[] _centersNm;
    private readonly double[] _slopes;
    private readonly double _peakNm;
    private readonly double _mostNm;
    private bool _takesHighest;

    private PeakFollower(double[] centersNm, double[] slopes, double peakNm, double mostNm, bool hasPeak)
        => (_centersNm, _slopes, _peakNm, _mostNm, HasPeak) = (centersNm, slopes, peakNm, mostNm, hasPeak);

    /// <summary>Whether the mean geometry has a peak.</summary>
    public bool HasPeak { get; }

    /// <summary>Wavelength of the mean geometry's main peak, in nm; NaN where there is none.</summary>
    public double PeakNm => HasPeak ? _peakNm : double.NaN;

    /// <summary>A follower of the highest peak of the mean geometry, without slopes yet.</summary>
    public static PeakFollower Of(PeakScan mean, ReadOnlySpan<double> centersNm)
    {
        var slopes = new double[centersNm.Length];
        if (mean.Highest < 0)
            return new PeakFollower(centersNm.ToArray(), slopes, 0, 0, false);
        double peakNm = mean.WavelengthNm(mean.Highest), mostNm = MostShare * peakNm;
        for (int peak = 0; peak < mean.Count; peak++)
        {
            if (peak != mean.Highest)
                mostNm = Math.Min(mostNm, Math.Abs(mean.WavelengthNm(peak) - peakNm) / 2);
        }
        return new PeakFollower(centersNm.ToArray(), slopes, peakNm, mostNm, true);
    }

    /// <summary>One that takes the highest peak, whichever it is.</summary>
    public static PeakFollower Highest { get; } = new([], [], 0, double.PositiveInfinity, true) { _takesHighest = true };

    /// <summary>The same with slopes, nm of the peak a nm of each length.</summary>
    public PeakFollower With(double[] slopes) => new(_centersNm, slopes, _peakNm, _mostNm, HasPeak);

    /// <summary>Number of the peak among those of a draw; -1 where it is lost.</summary>
    public int Find(PeakScan peaks, ReadOnlySpan<double> lengthsNm)
    {
        if (_takesHighest)
            return peaks.Highest;
        if (!HasPeak)
            return -1;
        double expectedNm = _peakNm;
        for (int slot = 0; slot < _slopes.Length; slot++)
            expectedNm += _slopes[slot] * (lengthsNm[slot] - _centersNm[slot]);
        return peaks.Nearest(expectedNm, _mostNm);
    }
}

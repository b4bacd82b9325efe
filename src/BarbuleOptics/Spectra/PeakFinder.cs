using BarbuleOptics.Quantities;

namespace BarbuleOptics.Spectra;

/// <summary>Finds interior maxima, their topographic prominence and their widths.</summary>
internal static class PeakFinder
{
    /// <summary>Least prominence of a peak, as a share of the highest reflectance.</summary>
    private const double LeastProminenceShare = 0.01;

    /// <summary>Least prominence of a peak whatever the spectrum: below lies the rounding of a solver.</summary>
    public const double LeastProminence = 1e-9;

    /// <summary>The peaks, from the highest reflectance down.</summary>
    public static IEnumerable<SpectralPeak> Find(Spectrum reflectance)
    {
        ReadOnlySpan<double> values = reflectance.Values;
        List<Summit> summits = Maxima(reflectance);
        double[] lowestLeft = LowestSinceHigher(values, fromLeft: true);
        double[] lowestRight = LowestSinceHigher(values, fromLeft: false);
        double highest = 0;
        foreach (Summit summit in summits)
            highest = Math.Max(highest, summit.Height);

        // The test takes the sample: on a shelf beside a cliff the parabola's vertex stands above all samples.
        summits.RemoveAll(summit => reflectance[summit.First] - Valley(summit) < Math.Max(LeastProminence, LeastProminenceShare * highest));

        var peaks = new SpectralPeak[summits.Count];
        for (int i = 0; i < peaks.Length; i++)
        {
            Summit summit = summits[i];
            int left = i > 0 ? summits[i - 1].Last : 0;
            int right = i < peaks.Length - 1 ? summits[i + 1].First : values.Length - 1;
            double prominence = summit.Height - Valley(summit);
            peaks[i] = new SpectralPeak(summit.WavelengthNm, summit.Height, prominence,
                summit.Height > 0 ? PeakWidth.At(summit.Height / 2, summit, left, right, reflectance) : null,
                PeakWidth.At(summit.Height - prominence / 2, summit, left, right, reflectance));
        }
        return peaks.OrderByDescending(peak => peak.Reflectance).ThenBy(peak => peak.WavelengthNm);

        double Valley(Summit summit) => Math.Max(lowestLeft[summit.First], lowestRight[summit.Last]);
    }

    /// <summary>Which ends of the spectrum stand out as a peak would.</summary>
    public static (bool Start, bool Stop) RisesAtEnds(ReadOnlySpan<double> values)
    {
        double highest = 0;
        foreach (double value in values)
            highest = Math.Max(highest, value);
        double least = Math.Max(LeastProminence, LeastProminenceShare * highest);
        return (Stands(values[0] - LowestSinceHigher(values, fromLeft: false)[0]), Stands(values[^1] - LowestSinceHigher(values, fromLeft: true)[^1]));

        bool Stands(double rise) => rise > 0 && rise >= least;
    }

    /// <summary>Maxima with lower samples on both sides, in the order of the grid.</summary>
    private static List<Summit> Maxima(Spectrum reflectance)
    {
        ReadOnlySpan<double> values = reflectance.Values;
        var summits = new List<Summit>();
        for (int first = 1; first < values.Length - 1; first++)
        {
            if (values[first] <= values[first - 1])
                continue;
            int last = first;
            while (last < values.Length - 1 && values[last + 1] == values[first])
                last++;
            if (last < values.Length - 1 && values[last + 1] < values[first])
                summits.Add(Summit.Over(first, last, reflectance));
            first = last;
        }
        return summits;
    }

    /// <summary>For each sample the lowest value between it and the nearest higher one on a side, or the grid's end.</summary>
    /// <remarks>A stack of descending samples gives all in one pass: one comb of maxima after the other must not cost their square.</remarks>
    private static double[] LowestSinceHigher(ReadOnlySpan<double> values, bool fromLeft)
    {
        var lowest = new double[values.Length];
        var higher = new Stack<int>();
        for (int step = 0; step < values.Length; step++)
        {
            int i = fromLeft ? step : values.Length - 1 - step;
            lowest[i] = values[i];
            while (higher.TryPeek(out int top) && values[top] <= values[i])
                lowest[i] = Math.Min(lowest[i], lowest[higher.Pop()]);
            higher.Push(i);
        }
        return lowest;
    }
}

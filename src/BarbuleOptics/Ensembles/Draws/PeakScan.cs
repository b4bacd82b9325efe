using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles.Draws;

/// <summary>The peaks of one spectrum after another, without a trace in memory.</summary>
/// <remarks>The same peaks as <see cref="Spectra.SpectrumFeatures"/> finds (interior maxima, vertex of a parabola, prominence at least 1 % of the highest and
/// 1e-9), without widths; the tests hold one to the other.</remarks>
internal sealed class PeakScan
{
    private const double LeastProminenceShare = 0.01;
    private const double LeastProminence = 1e-9;

    private readonly double[] _wavelengthsNm;
    private readonly double _stepNm;
    private readonly int[] _first;
    private readonly double[] _tops;
    private readonly double[] _placesNm;
    private readonly double[] _heights;

    // Lowest sample before each maximum, and one more for behind the last.
    private readonly double[] _valleys;

    public PeakScan(WavelengthGrid grid)
    {
        _wavelengthsNm = grid.Nanometres.ToArray();
        _stepNm = grid.StepNm;
        int most = grid.Count / 2 + 1;
        (_first, _tops, _placesNm, _heights, _valleys) = (new int[most], new double[most], new double[most], new double[most], new double[most + 1]);
    }

    /// <summary>Number of peaks found.</summary>
    public int Count { get; private set; }

    /// <summary>Number of the peak with the highest reflectance; -1 where there is none.</summary>
    public int Highest { get; private set; }

    /// <summary>Wavelength of a peak, in nm; peaks ascend.</summary>
    public double WavelengthNm(int peak) => _placesNm[peak];

    /// <summary>Its reflectance.</summary>
    public double Reflectance(int peak) => _heights[peak];

    /// <summary>Finds the peaks of a spectrum.</summary>
    public void Scan(ReadOnlySpan<double> values)
    {
        FindMaxima(values);
        double highest = 0;
        for (int i = 0; i < Count; i++)
            highest = Math.Max(highest, _heights[i]);
        double least = Math.Max(LeastProminence, LeastProminenceShare * highest);
        int kept = 0;
        for (int i = 0; i < Count; i++)
        {
            // What is kept moves down; tops and valleys stay as they are until all are judged.
            if (Prominence(i) >= least)
                _first[kept++] = i;
        }
        Highest = -1;
        for (int i = 0; i < kept; i++)
        {
            (_placesNm[i], _heights[i]) = (_placesNm[_first[i]], _heights[_first[i]]);
            if (Highest < 0 || _heights[i] > _heights[Highest])
                Highest = i;
        }
        Count = kept;
    }

    /// <summary>The peak nearest to a wavelength, at most some way off; -1 where there is none.</summary>
    public int Nearest(double wavelengthNm, double mostNm)
    {
        int nearest = -1;
        for (int i = 0; i < Count; i++)
        {
            double awayNm = Math.Abs(_placesNm[i] - wavelengthNm);
            if (awayNm <= mostNm)
                (nearest, mostNm) = (i, awayNm);
        }
        return nearest;
    }

    private void FindMaxima(ReadOnlySpan<double> values)
    {
        Count = 0;
        double lowest = values[0];
        for (int first = 1; first < values.Length - 1; first++)
        {
            lowest = Math.Min(lowest, values[first]);
            if (values[first] <= values[first - 1])
                continue;
            int last = first;
            while (last < values.Length - 1 && values[last + 1] == values[first])
                last++;
            if (last < values.Length - 1 && values[last + 1] < values[first])
            {
                Place(values, first, last);
                _valleys[Count++] = lowest;
                lowest = values[first];
            }
            first = last;
        }
        _valleys[Count] = Math.Min(lowest, values[^1]);
    }

    private void Place(ReadOnlySpan<double> values, int first, int last)
    {
        double top = values[first];
        _tops[Count] = top;
        if (last > first + 1)
        {
            (_placesNm[Count], _heights[Count]) = ((_wavelengthsNm[first] + _wavelengthsNm[last]) / 2, top);
            return;
        }
        double before = values[first - 1], after = values[first + 1];
        double offset = (before - after) / (2 * (before - 2 * top + after)), height = top - (before - after) * offset / 4;
        (_placesNm[Count], _heights[Count]) = (_wavelengthsNm[first] + offset * _stepNm, top <= 1 ? Math.Min(height, 1) : height);
    }

    private double Prominence(int peak)
    {
        double left = _valleys[peak], right = _valleys[peak + 1];
        for (int i = peak - 1; i >= 0 && _tops[i] <= _tops[peak]; i--)
            left = Math.Min(left, _valleys[i]);
        for (int i = peak + 1; i < Count && _tops[i] <= _tops[peak]; i++)
            right = Math.Min(right, _valleys[i + 1]);
        return _tops[peak] - Math.Max(left, right);
    }
}

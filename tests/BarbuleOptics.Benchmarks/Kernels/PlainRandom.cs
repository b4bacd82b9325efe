namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>The random numbers of the workloads, by a rule short enough to stand in the scripts they are compared with, too: x' = 1103515245 x + 12345
/// modulo 2^31, from 1.</summary>
internal sealed class PlainRandom
{
    private long _state = 1;

    /// <summary>The next number, 0 to below 1.</summary>
    public double Next()
    {
        _state = (1103515245 * _state + 12345) & 0x7fffffff;
        return _state / 2147483648.0;
    }

    /// <summary>Thicknesses between 20 and 200 nm.</summary>
    public double[] ThicknessesNm(int count) => [.. Enumerable.Range(0, count).Select(_ => 20 + 180 * Next())];
}

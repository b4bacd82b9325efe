using System.Globalization;
using BarbuleOptics.Files;

namespace BarbuleOptics.Cli;

/// <summary>One line on a terminal that says how far a long calculation is; it is gone when the calculation ends.</summary>
/// <param name="terminal">The terminal; null where there is none, and nothing is shown.</param>
/// <param name="clock">Tells how long it has taken.</param>
internal sealed class ProgressLine(TextWriter? terminal, TimeProvider clock) : IProgress<double>
{
    /// <summary>What takes less shows nothing, in ms.</summary>
    private const double QuietMs = 1000;

    /// <summary>Least time between two changes of the line, in ms.</summary>
    private const double StepMs = 100;

    private readonly Lock _lock = new();
    private string _what = "";
    private long _start;
    private double _shownAtMs;
    private int _width;
    private double _share;

    /// <summary>Shows nothing.</summary>
    public static ProgressLine None { get; } = new(null, TimeProvider.System);

    /// <summary>Starts a calculation.</summary>
    /// <param name="what">What is calculated, such as a file's name.</param>
    public void Begin(string what)
    {
        lock (_lock)
            (_what, _start, _shownAtMs, _share) = (OneLine.Escape(what), clock.GetTimestamp(), double.NegativeInfinity, 0);
    }

    /// <inheritdoc/>
    public void Report(double value)
    {
        if (terminal is null)
            return;
        lock (_lock)
        {
            double elapsedMs = clock.GetElapsedTime(_start).TotalMilliseconds;
            // Reports of several threads may come out of order.
            _share = Math.Max(_share, value);
            if (elapsedMs < QuietMs || elapsedMs < _shownAtMs + StepMs)
                return;
            _shownAtMs = elapsedMs;
            string line = string.Create(CultureInfo.InvariantCulture, $"{_what}: {Math.Floor(100 * _share)} %");
            terminal.Write("\r" + line.PadRight(_width));
            _width = line.Length;
        }
    }

    /// <summary>Takes the line away.</summary>
    public void End()
    {
        lock (_lock)
        {
            if (_width > 0)
                terminal?.Write("\r" + new string(' ', _width) + "\r");
            _width = 0;
        }
    }
}

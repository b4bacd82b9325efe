using BarbuleOptics.Cli;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>How far a long calculation is: on a terminal only, after a second, and gone at its end.</summary>
public sealed class ProgressLineTests
{
    [Fact]
    public void A_short_calculation_shows_nothing()
    {
        (StringWriter terminal, StillClock clock, ProgressLine line) = Terminal();
        line.Begin("a.toml");
        clock.Ms = 999;
        line.Report(0.5);
        line.End();
        Assert.Equal("", terminal.ToString());
    }

    [Fact]
    public void A_long_one_shows_its_file_and_its_share_and_takes_the_line_away()
    {
        (StringWriter terminal, StillClock clock, ProgressLine line) = Terminal();
        line.Begin("a.toml");
        clock.Ms = 1000;
        line.Report(0.257);
        line.End();
        Assert.Equal("\ra.toml: 25 %\r            \r", terminal.ToString());
    }

    [Fact]
    public void It_changes_ten_times_a_second_at_most_and_never_falls()
    {
        (StringWriter terminal, StillClock clock, ProgressLine line) = Terminal();
        line.Begin("a");
        clock.Ms = 1500;
        line.Report(0.3);
        clock.Ms = 1599;
        line.Report(0.4);
        clock.Ms = 1600;
        line.Report(0.35);
        Assert.Equal("\ra: 30 %\ra: 40 %", terminal.ToString());
    }

    [Fact]
    public void Each_calculation_starts_anew()
    {
        (StringWriter terminal, StillClock clock, ProgressLine line) = Terminal();
        line.Begin("a");
        clock.Ms = 2000;
        line.Report(1);
        line.End();
        line.Begin("b");
        clock.Ms = 2900;
        line.Report(0.9);
        Assert.DoesNotContain("b", terminal.ToString(), StringComparison.Ordinal);
        clock.Ms = 3000;
        line.Report(0.1);
        Assert.EndsWith("\rb: 90 %", terminal.ToString(), StringComparison.Ordinal);
    }

    [Fact]
    public void A_name_with_an_escape_byte_does_not_reach_the_terminal()
    {
        (StringWriter terminal, StillClock clock, ProgressLine line) = Terminal();
        line.Begin("a\u001b[2J.toml");
        clock.Ms = 1000;
        line.Report(0);
        Assert.DoesNotContain('\u001b', terminal.ToString());
    }

    [Fact]
    public void Without_a_terminal_nothing_is_shown()
    {
        var clock = new StillClock { Ms = 0 };
        var line = new ProgressLine(null, clock);
        line.Begin("a");
        clock.Ms = 5000;
        line.Report(0.5);
        line.End();
    }

    private static (StringWriter Terminal, StillClock Clock, ProgressLine Line) Terminal()
    {
        var terminal = new StringWriter();
        var clock = new StillClock();
        return (terminal, clock, new ProgressLine(terminal, clock));
    }

    private sealed class StillClock : TimeProvider
    {
        public long Ms { get; set; }

        public override long TimestampFrequency => 1000;

        public override long GetTimestamp() => Ms;
    }
}

using BarbuleOptics.Color;

namespace BarbuleOptics.Cli;

/// <summary>Shows colors where the terminal can, and nothing where it cannot: not one escape byte then.</summary>
internal sealed class TerminalColors(ColorDepth depth)
{
    private const int FirstOfCube = 16, FirstGray = 232, GrayCount = 24;

    /// <summary>The levels of each channel in xterm's cube of 6 x 6 x 6 colors, numbers 16 to 231; grays from 8 in steps of 10 follow (xterm, ctlseqs and 256colres).</summary>
    private static readonly int[] Levels = [0, 95, 135, 175, 215, 255];

    /// <summary>For output that is no terminal.</summary>
    public static TerminalColors None { get; } = new(ColorDepth.None);

    /// <summary>Whether colors are shown.</summary>
    public bool AreShown => Depth != ColorDepth.None;

    /// <summary>How many colors are shown.</summary>
    public ColorDepth Depth { get; } = depth;

    /// <summary>Decides from what the environment says.</summary>
    /// <param name="isRedirected">Whether output goes into a file or another program.</param>
    /// <param name="variable">The value of an environment variable; null where it is not set.</param>
    /// <remarks>NO_COLOR with any text turns colors off (no-color.org); COLORTERM "truecolor" or "24bit" promises 8 bits a channel (common practice, no standard).</remarks>
    public static TerminalColors For(bool isRedirected, Func<string, string?> variable)
    {
        string? terminal = variable("TERM");
        if (isRedirected || !string.IsNullOrEmpty(variable("NO_COLOR")) || string.IsNullOrEmpty(terminal) || terminal == "dumb")
            return None;
        if (variable("COLORTERM") is "truecolor" or "24bit")
            return new TerminalColors(ColorDepth.Full);
        return terminal.Contains("256color", StringComparison.Ordinal) ? new TerminalColors(ColorDepth.Palette) : None;
    }

    /// <summary>A block of one color, as wide as that many letters; empty where colors are not shown.</summary>
    public string Block(SrgbColor color, int width) => Depth switch
    {
        ColorDepth.Full => FormattableString.Invariant($"\e[48;2;{color.Red};{color.Green};{color.Blue}m{new string(' ', width)}\e[0m"),
        ColorDepth.Palette => FormattableString.Invariant($"\e[48;5;{NearestOfPalette(color)}m{new string(' ', width)}\e[0m"),
        _ => "",
    };

    /// <summary>Number of the palette's color that is nearest by the sum of squares over the channels.</summary>
    private static int NearestOfPalette(SrgbColor color)
    {
        int red = NearestLevel(color.Red), green = NearestLevel(color.Green), blue = NearestLevel(color.Blue);
        int gray = Math.Clamp(((color.Red + color.Green + color.Blue) / 3 - 3) / 10, 0, GrayCount - 1), grayLevel = 8 + 10 * gray;
        int cubeError = Error(color, Levels[red], Levels[green], Levels[blue]), grayError = Error(color, grayLevel, grayLevel, grayLevel);
        return grayError < cubeError ? FirstGray + gray : FirstOfCube + 36 * red + 6 * green + blue;
    }

    private static int NearestLevel(byte value) => Enumerable.Range(0, Levels.Length).MinBy(i => Math.Abs(Levels[i] - value));

    private static int Error(SrgbColor color, int red, int green, int blue)
        => (color.Red - red) * (color.Red - red) + (color.Green - green) * (color.Green - green) + (color.Blue - blue) * (color.Blue - blue);
}

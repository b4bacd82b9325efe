using System.CommandLine.Parsing;
using System.Globalization;
using BarbuleOptics.Color;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures;
using BarbuleOptics.Files;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Cli;

/// <summary>Reads the texts of options, always with a decimal point, whatever the user's language.</summary>
internal static class OptionReaders
{
    public const double MostAngleCount = 1000;

    public static bool Wavelengths(string text, out WavelengthGrid grid, out string allowed)
    {
        grid = null!;
        allowed = "from:to:step in nm, such as 300:780:1, from 10 to 100000 nm with at most 100000 wavelengths";
        if (!Numbers(text, ':', out double[] parts) || parts.Length != 3)
            return false;
        try
        {
            grid = WavelengthGrid.FromRange(Length.FromNanometres(parts[0]), Length.FromNanometres(parts[1]), Length.FromNanometres(parts[2]));
            return true;
        }
        catch (ArgumentOutOfRangeException)
        {
            return false;
        }
    }

    public static bool Angles(string text, out ValueList<Angle> angles, out string allowed)
    {
        angles = [];
        allowed = "a list such as 0,30,60 or a range from:to:step such as 0:60:15, each angle once, 0 to below 90 degrees, at most 1000 of them";
        double[] degrees;
        if (text.Contains(':', StringComparison.Ordinal))
        {
            if (!Numbers(text, ':', out double[] range) || range.Length != 3 || range[2] <= 0 || range[1] < range[0] || (range[1] - range[0]) / range[2] > MostAngleCount)
                return false;
            int steps = (int)Math.Floor((range[1] - range[0]) / range[2] + 1e-9);
            degrees = [.. Enumerable.Range(0, steps + 1).Select(i => Math.Round(range[0] + i * range[2], 9))];
        }
        else if (!Numbers(text, ',', out degrees))
        {
            return false;
        }
        if (degrees.Length > MostAngleCount || degrees.Any(degree => !(degree >= 0 && degree < 90)) || degrees.Distinct().Count() != degrees.Length)
            return false;
        angles = [.. degrees.Select(Angle.FromDegrees)];
        return true;
    }

    public static bool Polarization(string text, out Polarizations? polarization, out string allowed)
    {
        bool found = PolarizationNames.TryFind(text, out Polarizations value);
        polarization = value;
        allowed = OneOf(PolarizationNames.All, text);
        return found;
    }

    public static bool Mixing(string text, out IMixingRule? rule, out string allowed)
    {
        bool found = MixingRules.TryFind(text, out rule);
        allowed = OneOf(MixingRules.All.Select(candidate => candidate.Name), text);
        return found;
    }

    public static bool Light(string text, out string light, out string allowed)
    {
        light = text;
        allowed = $"the path of a file or {OneOf(Illuminant.All.Select(candidate => candidate.Name), text)}";
        return Illuminant.TryFind(text, out _) || EyeFile.IsPath(text);
    }

    public static void RefuseUnknownEyes(OptionResult result)
    {
        foreach (string text in result.Tokens.Select(token => token.Value).Where(text => !VisualSystems.TryFind(text, out _) && !EyeFile.IsPath(text)))
            result.AddError($"--vision: found '{text}'; allowed the path of a file or {OneOf(VisualSystems.All.Select(eye => eye.Name), text)}");
    }

    public static bool Summation(string text, out SummationStep step, out string allowed)
    {
        allowed = "1 or 5";
        step = text == "5" ? SummationStep.FiveNanometres : SummationStep.OneNanometre;
        return text is "1" or "5";
    }

    public static bool Observer(string text, out StandardObserver observer, out string allowed)
    {
        allowed = OneOf(StandardObservers.Names, text);
        return StandardObservers.TryFind(text, out observer);
    }

    public static bool Solver(string text, out SolverChoice solver, out string allowed)
    {
        allowed = OneOf(SolverNames.All, text);
        return SolverNames.TryFind(text, out solver);
    }

    public static bool Accuracy(string text, out double accuracy, out string allowed)
    {
        allowed = "a number from 1e-10 to 0.1";
        return Number(text, out accuracy) && accuracy is >= 1e-10 and <= 0.1;
    }

    public static bool Threads(string text, out int threads, out string allowed)
    {
        allowed = "a whole number from 1 to 1024";
        return int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out threads) && threads is >= 1 and <= 1024;
    }

    public static bool Draws(string text, out int draws, out string allowed)
    {
        allowed = FormattableString.Invariant($"a whole number from {DrawOptions.LeastDraws} to {DrawOptions.MostDraws}");
        return int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out draws) && draws is >= DrawOptions.LeastDraws and <= DrawOptions.MostDraws;
    }

    public static bool SpreadName(string text, out Spread spread, out string allowed)
    {
        allowed = OneOf(SpreadNames.All, text);
        return SpreadNames.TryParse(text, out spread);
    }

    public static bool Seed(string text, out long seed, out string allowed)
    {
        allowed = "a whole number from 0 to 9223372036854775807";
        return long.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out seed);
    }

    public static bool FigureWidth(string text, out FigureSize size, out string allowed)
    {
        size = default;
        allowed = FormattableString.Invariant($"{FigureSize.LeastWidthMm} to {FigureSize.MostWidthMm} mm");
        if (!Number(text, out double widthMm) || widthMm is < FigureSize.LeastWidthMm or > FigureSize.MostWidthMm)
            return false;
        size = FigureSize.FromWidth(widthMm);
        return true;
    }

    private static string OneOf(IEnumerable<string> names, string text)
    {
        string[] all = [.. names];
        string? near = NearMiss.Find(text, all);
        return string.Join(", ", all) + (near is null ? "" : $"; did you mean {near}?");
    }

    private static bool Numbers(string text, char separator, out double[] numbers)
    {
        string[] parts = text.Split(separator);
        numbers = new double[parts.Length];
        for (int i = 0; i < parts.Length; i++)
        {
            if (!Number(parts[i], out numbers[i]))
                return false;
        }
        return true;
    }

    private static bool Number(string text, out double number)
        => double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out number) && double.IsFinite(number);
}

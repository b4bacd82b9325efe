using System.Globalization;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Cli;

/// <summary>Warnings as a person reads them: what holds of several angles or materials is said once.</summary>
internal static class WarningLines
{
    /// <summary>Most things listed one by one.</summary>
    private const int MostListed = 6;

    /// <summary>One line a kind of warning where the words allow it.</summary>
    public static IEnumerable<string> Of(IEnumerable<PredictionWarning> warnings)
    {
        foreach (IGrouping<string, PredictionWarning> alike in warnings.GroupBy(warning => warning.Code))
        {
            string[] messages = [.. alike.Select(warning => warning.Message).Distinct()];
            if (Joined(messages) is string message)
            {
                yield return Line(alike.Key, alike, message);
                continue;
            }
            foreach (string each in messages)
                yield return Line(alike.Key, alike.Where(warning => warning.Message == each), each);
        }
    }

    private static string Line(string code, IEnumerable<PredictionWarning> warnings, string message)
    {
        string[] angles = [.. warnings.Select(warning => warning.Incidence?.Degrees.ToString("0.##", CultureInfo.InvariantCulture)).OfType<string>().Distinct()];
        return $"Warning {code}{(angles.Length > 0 ? $" at {List(angles)} degrees" : "")}: {message}.";
    }

    /// <summary>The messages as one, where they differ in no more than one word; null where they do not.</summary>
    private static string? Joined(string[] messages)
    {
        string[][] words = [.. messages.Select(message => message.Split(' '))];
        string[] first = words[0];
        if (words.Any(other => other.Length != first.Length))
            return null;
        int[] differing = [.. Enumerable.Range(0, first.Length).Where(i => words.Any(other => other[i] != first[i]))];
        if (differing.Length > 1)
            return null;
        foreach (int i in differing)
            first[i] = List([.. words.Select(other => other[i])]);
        return string.Join(' ', first);
    }

    private static string List(string[] items) => items.Length switch
    {
        1 => items[0],
        <= MostListed => $"{string.Join(", ", items[..^1])} and {items[^1]}",
        _ => $"{items[0]} to {items[^1]}",
    };
}

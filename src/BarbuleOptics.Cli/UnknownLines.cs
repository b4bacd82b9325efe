using System.Globalization;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Ensembles;

namespace BarbuleOptics.Cli;

/// <summary>What is assumed and what is not known, in words.</summary>
internal static class UnknownLines
{
    /// <summary>The factors that lengths were corrected by.</summary>
    public static IEnumerable<string> Corrections(Barbule barbule)
    {
        string[] factors = [.. MeasuredFactors.Of(barbule).Select(one => $"{one.Key} {Text(one.Factor.Central)}{(one.Unit.Length > 0 ? " " + one.Unit : "")}")];
        if (factors.Length > 0)
            yield return $"Assumed: lengths were corrected to those of the living barbule by {string.Join(", ", factors)}.";
    }

    /// <summary>Hue against each thing not known, and the hue terms within reach.</summary>
    public static IEnumerable<string> Of(UnknownReach? reach)
    {
        if (reach is null)
            yield break;
        foreach (UnknownView view in reach.Views)
        {
            foreach (UnknownSweep sweep in view.Sweeps.Where(sweep => sweep.Points.Any(point => point.Term is not null)))
                yield return $"Not known at {Text(view.Incidence.Degrees)} degrees: {sweep.Key}, {string.Join(", ", Runs(sweep))} (all else at its middle).";
            if (view.ReachableTerms.Count > 0 && view.Sweeps.Count > 1)
                yield return $"Hue terms within reach at {Text(view.Incidence.Degrees)} degrees over all that is not known: {string.Join(", ", view.ReachableTerms.Select(term => term.Term))}; the row above is one of many.";
        }
    }

    /// <summary>Neighboring values with one hue term.</summary>
    private static IEnumerable<string> Runs(UnknownSweep sweep)
    {
        string unit = sweep.Unit.Length > 0 ? " " + sweep.Unit : "";
        for (int first = 0; first < sweep.Points.Count;)
        {
            int last = first;
            while (last + 1 < sweep.Points.Count && sweep.Points[last + 1].Term == sweep.Points[first].Term)
                last++;
            UnknownPoint from = sweep.Points[first], to = sweep.Points[last];
            string range = first == last ? Text(from.Value) : $"{Text(from.Value)} to {Text(to.Value)}";
            string hue = from.HueDegrees is double start && to.HueDegrees is double end ? first == last ? $" (h {Text(start)})" : $" (h {Text(start)} to {Text(end)})" : "";
            yield return $"{range}{unit} {from.Term ?? "no color"}{hue}";
            first = last + 1;
        }
    }

    private static string Text(double value) => value.ToString(Math.Abs(value) < 10 ? "0.###" : "0.#", CultureInfo.InvariantCulture);
}

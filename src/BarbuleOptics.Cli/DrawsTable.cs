using System.Globalization;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Ensembles.Statistics;

namespace BarbuleOptics.Cli;

/// <summary>Draws as a table for a person: intervals of peak and color, probabilities of hue terms.</summary>
internal static class DrawsTable
{
    private static readonly (string Name, string Head, string Format)[] Rows =
    [
        ("peak_nm", "peak nm", "0.0"), ("peak_reflectance", "height", "0.0000"), ("L", "L*", "0.0"), ("C", "C*", "0.0"), ("h_deg", "h deg", "0.0"),
    ];

    /// <summary>Writes the table; nothing without draws.</summary>
    public static void Write(EnsemblePrediction? ensemble, TextWriter output)
    {
        if (ensemble is null)
            return;
        output.WriteLine(" angle  draws of       median   middle 50 %         middle 95 %         error");
        foreach (DrawnView view in ensemble.Views)
        {
            foreach ((string name, string head, string format) in Rows)
            {
                if (view.Value(name) is DrawnValue value)
                    output.WriteLine(Line(view, head, format, value));
            }
        }
        output.WriteLine();
    }

    /// <summary>Hue terms and what the draws rest on.</summary>
    public static IEnumerable<string> Remarks(EnsemblePrediction? ensemble)
    {
        if (ensemble is null)
            yield break;
        foreach (DrawnView view in ensemble.Views)
        {
            if (view.Terms.Count > 0)
                yield return $"Hue at {Text(view.Incidence.Degrees, "0.##")} degrees: {Terms(view.Terms)}{Elsewhere(view)}.";
            if (view.OtherPeakShare > 0)
                yield return $"At {Text(view.Incidence.Degrees, "0.##")} degrees another peak than the one followed from the mean geometry is the highest in {Percent(view.OtherPeakShare)} of the draws.";
        }
        yield return Question(ensemble);
        if (ensemble.EffectiveDegrees is double degrees)
            yield return $"Lengths were drawn from Student's t with {Text(degrees, "0.#")} degrees of freedom (Welch and Satterthwaite); 'error' is the standard error of the ends of the 95 % interval from {ensemble.Replicates} independent sets of draws.";
        else
            yield return $"Lengths were drawn from normal laws; 'error' is the standard error of the ends of the 95 % interval from {ensemble.Replicates} independent sets of draws.";
    }

    private static string Question(EnsemblePrediction ensemble)
    {
        string lengths = string.Join(", ", ensemble.Lengths.Select(length => $"{length.Key} {Text(length.Deviation, "0.###")}{(length.Unit.Length > 0 ? " " + length.Unit : "")}"));
        return ensemble.Options.Spread switch
        {
            Spread.Mean => $"Spread of the mean, {ensemble.Options.Draws} draws: how sure this color is, given {lengths}.",
            Spread.Between => $"Spread between barbules, {ensemble.Options.Draws} draws: how barbules differ; rows of one move together ({lengths}).",
            _ => $"Spread within a section, {ensemble.Options.Draws} draws: what disorder does; every row is drawn by itself ({lengths}).",
        };
    }

    private static string Elsewhere(DrawnView view)
        => view.LargestDisagreement is not double disagreement ? "" :
            $"; by set of melanin constants, {string.Join("; ", view.Melanins.Select(melanin => $"{melanin.Material}: {Terms(melanin.Terms)}"))}; two of these sets disagree in up to {Percent(disagreement)} of the draws";

    private static string Terms(IReadOnlyList<TermShare> terms) => string.Join(", ", terms.Select(term => $"{term.Term} {Percent(term.Share)}"));

    private static string Line(DrawnView view, string head, string format, DrawnValue value)
        => $"{Text(view.Incidence.Degrees, "0.##"),6}  {head,-10}{Text(value.Median, format),11}   {Range(value.From50, value.To50, format),-18}  {Range(value.From95, value.To95, format),-18}  {Text(Math.Max(value.From95Error, value.To95Error), format)}";

    private static string Range(double from, double to, string format) => $"{Text(from, format)} to {Text(to, format)}";

    private static string Percent(double share) => share is > 0 and < 0.001 ? "below 0.1 %" : Text(100 * share, "0.#") + " %";

    private static string Text(double value, string format) => value.ToString(format, CultureInfo.InvariantCulture);
}

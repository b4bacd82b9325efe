using System.Globalization;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Cli;

/// <summary>How far the layer model is from the rigorous solution, in one sentence over all angles.</summary>
internal static class LayerModelLine
{
    /// <summary>Most angles whose values are listed one by one; of more the largest are told.</summary>
    private const int MostListed = 6;

    /// <summary>The sentence; null where nothing was compared.</summary>
    public static string? Of(StructurePrediction prediction)
    {
        (View View, LayerModelError Error)[] compared = [.. prediction.Views.Where(view => view.LayerModelError is not null).Select(view => (view, view.LayerModelError!))];
        if (compared.Length == 0)
            return null;
        string subject = prediction.IsRigorous
            ? $"The layer model ({compared[0].Error.Mixing}) would be off from this"
            : "This layer model is off from the rigorous solution of the section";
        return compared.Length <= MostListed ? $"{subject} by {Listed(compared)}." : $"{subject} by up to {Largest([.. compared.Select(one => one.Error)])}, at {compared.Length} angles.";
    }

    private static string Listed((View View, LayerModelError Error)[] compared)
    {
        string shifts = compared.All(one => one.Error.PeakShiftNm is null) ? "" : $"{List(compared.Select(one => Shift(one.Error.PeakShiftNm)))} nm in the main peak, ";
        string changes = List(compared.Select(one => one.Error.LargestChange.ToString("0.000", CultureInfo.InvariantCulture)));
        string angles = List(compared.Select(one => one.View.Incidence.Degrees.ToString("0.##", CultureInfo.InvariantCulture)));
        string colors = compared.Any(one => one.Error.Ciede2000 is null) ? "" : $", CIEDE2000 {List(compared.Select(one => Color(one.Error.Ciede2000)))}";
        return $"{shifts}{changes} in R at most{colors}, at {angles} degrees";
    }

    private static string Largest(LayerModelError[] errors)
    {
        double? largestShift = errors.Max(error => error.PeakShiftNm is double found ? Math.Abs(found) : (double?)null);
        string shift = largestShift is double shiftNm ? string.Create(CultureInfo.InvariantCulture, $"{shiftNm:0.0} nm in the main peak, ") : "";
        string color = errors.Max(error => error.Ciede2000) is double difference ? $", CIEDE2000 {Color(difference)}" : "";
        return string.Create(CultureInfo.InvariantCulture, $"{shift}{errors.Max(error => error.LargestChange):0.000} in R{color}");
    }

    private static string Shift(double? shiftNm) => shiftNm?.ToString("+0.0;-0.0;0.0", CultureInfo.InvariantCulture) ?? "(no peak matches)";

    private static string Color(double? difference) => difference?.ToString("0.0", CultureInfo.InvariantCulture) ?? "-";

    private static string List(IEnumerable<string> items)
    {
        string[] all = [.. items];
        return all.Length == 1 ? all[0] : $"{string.Join(", ", all[..^1])} and {all[^1]}";
    }
}

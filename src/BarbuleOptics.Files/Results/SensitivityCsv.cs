using System.Globalization;
using BarbuleOptics.Ensembles;

namespace BarbuleOptics.Files.Results;

/// <summary>Variance shares as comma-separated values in long form: one line an angle, outcome and measurement.</summary>
public static class SensitivityCsv
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "sensitivity.csv";

    /// <summary>The header line.</summary>
    public const string Header = "incidence_deg,outcome,key,first_order,first_order_error,total,total_error";

    /// <summary>Writes the table: UTF-8 without byte-order mark, lines ended by a line feed.</summary>
    public static void Write(SensitivityResult result, Stream stream)
    {
        ArgumentNullException.ThrowIfNull(result);
        using StreamWriter text = LongTable.Begin(stream, Header);
        foreach (SensitivityView view in result.Views)
        {
            foreach (OutcomeShares outcome in view.Outcomes)
            {
                foreach (InputShare input in outcome.Inputs)
                    text.Write(string.Create(CultureInfo.InvariantCulture, $"{view.Incidence.Degrees},{outcome.Name},{input.Key},{input.First},{input.FirstError},{input.Total},{input.TotalError}\n"));
            }
        }
    }
}

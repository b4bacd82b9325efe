using System.Globalization;

namespace BarbuleOptics.Files.Specimens;

/// <summary>What failed in a table of specimens and why: one line a problem.</summary>
public static class FailedCsv
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "failed.csv";

    /// <summary>The header line.</summary>
    public const string Header = "specimen,row,column,key,problem\n";

    /// <summary>The lines of one specimen.</summary>
    /// <param name="row">The specimen.</param>
    /// <param name="problems">What is wrong with it; a place that is no cell of the table leaves the column empty.</param>
    public static string Lines(SpecimenRow row, IEnumerable<FileProblem> problems)
    {
        ArgumentNullException.ThrowIfNull(row);
        ArgumentNullException.ThrowIfNull(problems);
        return string.Concat(problems.Select(problem => string.Join(',', ((string[])[row.Name, Whole(row.Number), Column(row, problem), problem.Key ?? "", OneLine.Escape(problem.Message)]).Select(DelimitedText.Quoted)) + "\n"));
    }

    private static string Column(SpecimenRow row, FileProblem problem) => problem.Location.Line == row.Number ? Whole(problem.Location.Column) : "";

    private static string Whole(int number) => number.ToString(CultureInfo.InvariantCulture);
}

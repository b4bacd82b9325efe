namespace BarbuleOptics.Files.Specimens;

/// <summary>One row of a sheet.</summary>
/// <param name="Number">Its number as an editor or a spreadsheet counts, from 1.</param>
/// <param name="Cells">Its cells; what counts as blank is empty.</param>
internal sealed record SheetRow(int Number, IReadOnlyList<string> Cells)
{
    /// <summary>The cell of a column, from 0; empty beyond the last.</summary>
    public string Cell(int column) => column < Cells.Count ? Cells[column] : "";

    /// <summary>Whether every cell is blank.</summary>
    public bool IsBlank => Cells.All(cell => cell.Length == 0);
}

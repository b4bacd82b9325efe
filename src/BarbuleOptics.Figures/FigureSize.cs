namespace BarbuleOptics.Figures;

/// <summary>Printed width of a figure; the height follows from what it shows. The default value is one column.</summary>
public readonly record struct FigureSize
{
    /// <summary>Least width, in mm.</summary>
    public const double LeastWidthMm = 60;

    /// <summary>Greatest width, in mm.</summary>
    public const double MostWidthMm = 200;

    private const double ColumnMm = 85;

    // Less the column's width, so that the default value of the structure is a column.
    private readonly double _beyondColumnMm;

    private FigureSize(double widthMm) => _beyondColumnMm = widthMm - ColumnMm;

    /// <summary>One column of a journal, 85 mm.</summary>
    public static FigureSize OneColumn { get; } = new(ColumnMm);

    /// <summary>Two columns of a journal, 170 mm.</summary>
    public static FigureSize TwoColumns { get; } = new(2 * ColumnMm);

    /// <summary>Width, in mm.</summary>
    public double WidthMm => ColumnMm + _beyondColumnMm;

    internal double WidthPt => WidthMm / 25.4 * 72;

    /// <summary>A width in mm, 60 to 200.</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="widthMm"/> lies outside 60 to 200.</exception>
    public static FigureSize FromWidth(double widthMm)
        => widthMm is >= LeastWidthMm and <= MostWidthMm
            ? new FigureSize(widthMm)
            : throw new ArgumentOutOfRangeException(
                nameof(widthMm), widthMm, FormattableString.Invariant($"Must lie between {LeastWidthMm} and {MostWidthMm} mm."));
}

namespace BarbuleOptics.Files;

/// <summary>Where something stands: a place in a file, a whole file, or an option of the command line.</summary>
/// <param name="Source">The file as the user named it, or the option as typed (<c>--set layer1.diameter=abc</c>).</param>
/// <param name="Line">Line, from 1; 0 where <paramref name="Source"/> is meant as a whole.</param>
/// <param name="Column">Column in characters, from 1; 0 where <paramref name="Source"/> is meant as a whole.</param>
public sealed record SourceLocation(string Source, int Line, int Column)
{
    /// <summary>All of <paramref name="source"/>.</summary>
    public static SourceLocation Whole(string source) => new(source, 0, 0);

    /// <summary><c>file:line:column</c>, or the source alone; always one line.</summary>
    public override string ToString()
        => Line == 0 ? OneLine.Escape(Source) : FormattableString.Invariant($"{OneLine.Escape(Source)}:{Line}:{Column}");
}

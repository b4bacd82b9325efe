namespace BarbuleOptics.Files.Toml;

/// <summary>What reading one file brings to light: problems, warnings and the place of every key.</summary>
internal sealed class ReadingLog(string source)
{
    /// <summary>Problems listed of one file; more are counted only.</summary>
    public const int MostProblems = 20;

    private readonly List<FileProblem> _problems = [];
    private readonly List<FileNote> _notes = [];
    private readonly Dictionary<string, SourceLocation> _locations = new(StringComparer.Ordinal);
    private int _unlisted;

    /// <summary>The file as the user named it.</summary>
    public string Source { get; } = source;

    public bool HasProblems => _problems.Count > 0;

    public IReadOnlyList<FileNote> Notes => _notes;

    public IReadOnlyDictionary<string, SourceLocation> Locations => _locations;

    public void Refuse(SourceLocation location, string? key, string message) => Refuse(new FileProblem(location, key, message));

    public void Refuse(FileProblem problem)
    {
        if (_problems.Count < MostProblems)
            _problems.Add(problem);
        else
            _unlisted++;
    }

    public void Warn(string code, SourceLocation location, string key, string message)
        => _notes.Add(new FileNote(code, location, key, message));

    /// <summary>Remembers where a key stands; the first place counts.</summary>
    public void Remember(string key, SourceLocation location) => _locations.TryAdd(key, location);

    /// <summary>The problems in the order of the file, those of other sources behind.</summary>
    public IReadOnlyList<FileProblem> Problems()
    {
        List<FileProblem> ordered =
        [
            .. _problems.OrderBy(problem => problem.Location.Source != Source)
                .ThenBy(problem => problem.Location.Line).ThenBy(problem => problem.Location.Column),
        ];
        if (_unlisted > 0)
            ordered.Add(new FileProblem(SourceLocation.Whole(Source), null, FormattableString.Invariant($"{_unlisted} more problems are not listed.")));
        return ordered;
    }
}

namespace BarbuleOptics.Files;

/// <summary>Why a file is refused.</summary>
/// <param name="Location">Where.</param>
/// <param name="Key">The key at fault, named as on the command line (<c>layer1.lumen</c>); null where no key is concerned.</param>
/// <param name="Message">What was found and what is allowed, in one line.</param>
public sealed record FileProblem(SourceLocation Location, string? Key, string Message)
{
    /// <summary><c>file:line:column: key: message</c>, always one line.</summary>
    public override string ToString()
        => Key is null ? $"{Location}: {OneLine.Escape(Message)}" : $"{Location}: {OneLine.Escape(Key)}: {OneLine.Escape(Message)}";
}

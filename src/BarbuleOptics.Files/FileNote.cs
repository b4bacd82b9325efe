namespace BarbuleOptics.Files;

/// <summary>Something in a file that is allowed but worth a warning.</summary>
/// <param name="Code">Short name of the kind of warning, fit for a program (<c>pitch-ignored</c>).</param>
/// <param name="Location">Where.</param>
/// <param name="Key">The key concerned, named as on the command line.</param>
/// <param name="Message">What is the matter, in one line.</param>
public sealed record FileNote(string Code, SourceLocation Location, string Key, string Message)
{
    /// <summary>Code of the warning that a distance between rows is given for one row.</summary>
    public const string PitchIgnored = "pitch-ignored";

    /// <summary><c>file:line:column: key: message</c>, always one line.</summary>
    public override string ToString() => $"{Location}: {OneLine.Escape(Key)}: {OneLine.Escape(Message)}";
}

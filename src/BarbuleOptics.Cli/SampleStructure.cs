namespace BarbuleOptics.Cli;

/// <summary>A structure file that comes with the program.</summary>
/// <param name="FileName">Its name, without folders.</param>
/// <param name="Text">Its content, comments and all.</param>
internal sealed record SampleStructure(string FileName, string Text)
{
    private const string Folder = "samples/";

    /// <summary>All of them, by name.</summary>
    public static IEnumerable<SampleStructure> All => Embedded.Names(Folder).Select(name => new SampleStructure(name[Folder.Length..], Embedded.Text(name)));

    /// <summary>What it is: the first paragraph of its comment, in one line.</summary>
    public string Purpose
        => string.Join(' ', Text.Split('\n').Select(line => line.Trim()).TakeWhile(line => line.StartsWith("# ", StringComparison.Ordinal)).Select(line => line[2..].Trim()));
}

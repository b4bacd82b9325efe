namespace BarbuleOptics.Files.Specimens;

/// <summary>The folder in which the parts of an unfinished table wait, a file a specimen, named for the hash of all that decides its content.</summary>
/// <param name="outputFolder">The folder of the results; the parts stand in a folder within it.</param>
public sealed class PartFolder(string outputFolder)
{
    /// <summary>Name of the folder.</summary>
    public const string Name = "unfinished";

    private const string Ending = ".part", TemporaryEnding = ".tmp";

    /// <summary>Where it is.</summary>
    public string Location { get; } = Path.Combine(outputFolder, Name);

    /// <summary>Whether an earlier run left it.</summary>
    public bool Exists => Directory.Exists(Location);

    /// <summary>Makes it, if it is not there.</summary>
    /// <exception cref="OutputException">It cannot be made.</exception>
    public void Make() => Guarded(() => Directory.CreateDirectory(Location));

    /// <summary>The part of a key; null where it is not there, or damaged, as a loss of power may leave it.</summary>
    public SpecimenPart? TryRead(string key)
    {
        try
        {
            return SpecimenPart.FromBytes(File.ReadAllBytes(PathOf(key)), key);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return null;
        }
    }

    /// <summary>Keeps a part: under a temporary name until it is complete.</summary>
    /// <exception cref="OutputException">It cannot be written.</exception>
    public void Keep(string key, SpecimenPart part)
    {
        ArgumentNullException.ThrowIfNull(part);
        string temporary = Path.Combine(Location, Path.GetRandomFileName() + TemporaryEnding);
        Guarded(() =>
        {
            File.WriteAllBytes(temporary, part.ToBytes(key));
            File.Move(temporary, PathOf(key), overwrite: true);
        });
    }

    /// <summary>Takes the parts away, and the folder unless something else is in it; also what a killed run left half written beside it.</summary>
    /// <param name="results">Names of the results.</param>
    public void Remove(IEnumerable<string> results)
    {
        ArgumentNullException.ThrowIfNull(results);
        Undo.Quietly(() =>
        {
            foreach (string path in results.SelectMany(name => Directory.GetFiles(outputFolder, $".{name}.*{TemporaryEnding}*")))
                File.Delete(path);
        });
        if (!Exists)
            return;
        Undo.Quietly(() =>
        {
            foreach (string path in Directory.GetFiles(Location).Where(path => path.EndsWith(Ending, StringComparison.Ordinal) || path.EndsWith(TemporaryEnding, StringComparison.Ordinal)))
                File.Delete(path);
            Directory.Delete(Location);
        });
    }

    private string PathOf(string key) => Path.Combine(Location, key + Ending);

    private void Guarded(Action action)
    {
        try
        {
            action();
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            throw OutputFolder.Translated(Location, e);
        }
    }
}

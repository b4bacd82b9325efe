using BarbuleOptics.Anatomy;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Files;

/// <summary>A structure that was read and found free of problems, with all that later steps need to speak of its file.</summary>
public sealed class LoadedStructure
{
    private readonly IReadOnlyDictionary<string, SourceLocation> _locations;

    internal LoadedStructure(
        Barbule barbule, string file, string sha256, IMaterialCatalog catalog,
        IReadOnlyList<FileNote> notes, IReadOnlyDictionary<string, SourceLocation> locations)
    {
        Barbule = barbule;
        File = file;
        Sha256 = sha256;
        Catalog = catalog;
        Notes = notes;
        _locations = locations;
    }

    /// <summary>What was measured.</summary>
    public Barbule Barbule { get; }

    /// <summary>The file as the user named it.</summary>
    public string File { get; }

    /// <summary>SHA-256 of the file's bytes, in lower-case hexadecimal digits; <c>--set</c> options do not change it.</summary>
    public string Sha256 { get; }

    /// <summary>Finds every material that the structure names, its tables given by path among them.</summary>
    public IMaterialCatalog Catalog { get; }

    /// <summary>Warnings about the file.</summary>
    public IReadOnlyList<FileNote> Notes { get; }

    /// <summary>Where a key stands (<c>layer1.spacing</c>); where the file does not have it, what encloses it; at the last the file.</summary>
    public SourceLocation Locate(string key)
    {
        ArgumentNullException.ThrowIfNull(key);
        // A problem with the pitch stands at row_separation where the file gives that.
        if (!_locations.ContainsKey(key) && PartnerKeys.Of(key) is { } partner && _locations.ContainsKey(partner))
            key = partner;
        for (string name = key; name.Length > 0; name = name[..Math.Max(0, name.LastIndexOf('.'))])
        {
            if (_locations.TryGetValue(name, out SourceLocation? location))
                return location;
        }
        return SourceLocation.Whole(File);
    }

    /// <summary>A problem that was found in the structure later on, with its place in the file.</summary>
    public FileProblem Locate(AnatomyProblem problem)
    {
        ArgumentNullException.ThrowIfNull(problem);
        return new FileProblem(Locate(problem.Key), problem.Key, problem.Message);
    }
}

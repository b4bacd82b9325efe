using System.Security.Cryptography;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Files.Toml;

namespace BarbuleOptics.Files;

/// <summary>Reads structure files (TOML 1.0), one barbule a file. What is wrong with a file is never thrown: it comes as a list.</summary>
/// <remarks>Refused beyond: 1 MB, UTF-8, 16 brackets one within another, lengths of 1 mm, 1,000 rows, index n and k of 100.
/// Sizes are checked against each other at their central values, as far as one layer shows it; whether bodies overlap is for
/// the section to say, and <see cref="LoadedStructure.Locate(AnatomyProblem)"/> finds the line.</remarks>
public static class StructureFile
{
    /// <summary>Reads a file.</summary>
    /// <param name="path">As the user named it; messages repeat it.</param>
    /// <param name="catalog">The materials that may be named.</param>
    /// <param name="sets"><c>KEY=VALUE</c> texts of <c>--set</c> options, with keys such as <c>barbule.surround</c>, <c>cortex.thickness</c>,
    /// <c>layer1.diameter</c>, <c>layer1.body2.x</c>, <c>back.thickness</c>, <c>name</c>. They replace or add values before the checks. VALUE is TOML, and what
    /// is none is a text. A later option counts more. Setting spacing removes separation and the other way round, likewise pitch and row_separation.</param>
    public static FileResult<LoadedStructure> Read(string path, MaterialCatalog catalog, IReadOnlyList<string>? sets = null)
    {
        ArgumentNullException.ThrowIfNull(path);
        var log = new ReadingLog(path);
        return SourceText.ReadFile(path, log) is { } bytes
            ? Parse(bytes, path, Path.GetDirectoryName(path) ?? "", catalog, sets)
            : FileResult.Failure<LoadedStructure>(log.Problems());
    }

    /// <summary>Reads the bytes of a file.</summary>
    /// <param name="bytes">The file's content.</param>
    /// <param name="displayName">What messages call the file.</param>
    /// <param name="baseDirectory">The folder that paths of material tables start from, empty for the current one;
    /// null where paths are refused.</param>
    /// <param name="catalog">The materials that may be named.</param>
    /// <param name="sets">As for <see cref="Read"/>.</param>
    public static FileResult<LoadedStructure> Parse(
        ReadOnlySpan<byte> bytes, string displayName, string? baseDirectory, MaterialCatalog catalog, IReadOnlyList<string>? sets = null)
    {
        ArgumentNullException.ThrowIfNull(displayName);
        ArgumentNullException.ThrowIfNull(catalog);
        var log = new ReadingLog(displayName);
        var materials = new MaterialReader(catalog, baseDirectory, log);
        if (TomlDocument.Parse(bytes, log) is { } root)
        {
            SetOptions.Apply(root, sets ?? [], log);
            if (new StructureReader(materials, log).Read(root, Path.GetFileNameWithoutExtension(displayName)) is { } barbule)
            {
                string sha256 = Convert.ToHexStringLower(SHA256.HashData(bytes));
                return FileResult.Success(new LoadedStructure(barbule, displayName, sha256, materials.Catalog, log.Notes, log.Locations));
            }
        }
        return FileResult.Failure<LoadedStructure>(log.Problems());
    }
}

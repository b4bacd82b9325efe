using System.Security.Cryptography;
using System.Text;
using BarbuleOptics.Files;
using BarbuleOptics.Files.Results;
using BarbuleOptics.Files.Specimens;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Cli;

/// <summary>Hashes of all that decides results, so that a part of an earlier run is taken up only where it would come out the same.</summary>
internal static class BatchKeys
{
    /// <summary>The key of all that specimens share: program, options and the content of files that options name.</summary>
    public static string Common(BatchRequest request)
    {
        var text = new StringBuilder();
        text.Append(ProgramIdentity.Version).Append('\n');
        // Two builds of one version may differ while the program is being worked on.
        foreach (Type type in (Type[])[typeof(Predictor), typeof(SpecimenTable), typeof(BatchKeys)])
            text.Append(type.Module.ModuleVersionId).Append('\n');
        foreach (string option in request.Options)
            text.Append(option.Length).Append(':').Append(option).Append('\n').Append(File.Exists(option) ? HashOfFile(option) : "").Append('\n');
        if (request.MaterialFolder is string folder && Directory.Exists(folder))
        {
            foreach (string path in Directory.GetFiles(folder, "*.toml").Order(StringComparer.Ordinal))
                text.Append(Path.GetFileName(path)).Append(' ').Append(HashOfFile(path)).Append('\n');
        }
        return Hash(text.ToString());
    }

    /// <summary>The key of one specimen.</summary>
    /// <param name="common">The key of <see cref="Common"/>.</param>
    /// <param name="table">The table as typed; tables of materials are found from its folder.</param>
    /// <param name="row">The specimen.</param>
    public static string Of(string common, string table, SpecimenRow row)
    {
        if (row.Structure.Value is not LoadedStructure loaded)
            return Hash(common + "\n" + FailedCsv.Lines(row, row.Structure.Problems));
        string structure = StructureWriter.Write(loaded.Barbule);
        string folder = Path.GetDirectoryName(table) ?? "";
        var text = new StringBuilder().Append(common).Append('\n').Append(row.Number).Append('\n').Append(row.Name.Length).Append(':').Append(row.Name).Append('\n').Append(structure);
        foreach (string path in structure.Split('"').Where((_, i) => i % 2 == 1).Select(name => Path.Combine(folder, name)).Where(File.Exists).Distinct().Order(StringComparer.Ordinal))
            text.Append(path).Append(' ').Append(HashOfFile(path)).Append('\n');
        return Hash(text.ToString());
    }

    /// <summary>SHA-256 of a text, in lower-case hexadecimal digits.</summary>
    public static string Hash(string text) => Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(text)));

    private static string HashOfFile(string path)
    {
        using FileStream stream = File.OpenRead(path);
        return Convert.ToHexStringLower(SHA256.HashData(stream));
    }
}

using BarbuleOptics.Files.Results;

namespace BarbuleOptics.Files.Specimens;

/// <summary>What the results of a table come from, so that they can be told from those of another.</summary>
/// <param name="Table">The table as the user named it.</param>
/// <param name="Sha256">SHA-256 of its bytes.</param>
/// <param name="Options">The options that decide results, as typed.</param>
/// <param name="Specimens">Number of specimens.</param>
/// <param name="Failed">Number of those that failed.</param>
/// <param name="Key">Hash of all that decides the results.</param>
public sealed record BatchJson(string Table, string Sha256, IReadOnlyList<string> Options, int Specimens, int Failed, string Key)
{
    /// <summary>Name of the file in an output folder.</summary>
    public const string FileName = "batch.json";

    /// <summary>The document, UTF-8.</summary>
    public byte[] Write() => PredictionJson.Document(json =>
    {
        json.WriteStartObject();
        PredictionJson.WriteProgram(json);
        json.WriteStartObject("table");
        json.WriteString("file", Table);
        json.WriteString("sha256", Sha256);
        json.WriteNumber("specimens", Specimens);
        json.WriteNumber("failed", Failed);
        json.WriteEndObject();
        json.WriteStartArray("options");
        foreach (string option in Options)
            json.WriteStringValue(option);
        json.WriteEndArray();
        json.WriteString("key", Key);
        json.WriteEndObject();
    });

    /// <summary>Whether a folder holds the document of this very run.</summary>
    public bool StandsIn(string folder)
    {
        try
        {
            return File.ReadAllBytes(Path.Combine(folder, FileName)).AsSpan().SequenceEqual(Write());
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return false;
        }
    }
}

using BarbuleOptics.Anatomy;
using BarbuleOptics.Files.Toml;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Files;

/// <summary>Reads a whole structure from its tree.</summary>
internal sealed class StructureReader(MaterialReader materials, ReadingLog log)
{
    /// <summary>The one version of the format.</summary>
    public const int Format = 1;

    /// <summary>Keys of the file and of its sections.</summary>
    public static readonly string[] TopKeys = ["format", "name", "barbule", "cortex", "layer", "back", "preparation", "preservation"];

    private const string Unknown = "unknown";

    private static readonly string[] BarbuleKeys = ["surround", "matrix", "backing", "axis"];
    private static readonly string[] CortexKeys = ["thickness"];
    private static readonly string[] BackKeys = ["thickness", "behind", "coherent"];

    /// <summary>The barbule; null when anything was refused.</summary>
    /// <param name="root">The file.</param>
    /// <param name="defaultName">Its name where it states none.</param>
    public Barbule? Read(TomlTable root, string defaultName)
    {
        var reader = new TableReader(root, log);
        CheckFormat(reader, log);
        reader.RefuseOthers(TopKeys, key => key is "layers" or "bodies" or "body" ? "is no key of the file; did you mean [[layer]]" : null);
        string name = reader.Text("name") ?? defaultName;
        TableReader section = reader.Inner("barbule") ?? new TableReader(new TomlTable("barbule", TableOrigin.Implicit, root.Location), log);
        section.RefuseOthers(BarbuleKeys);
        MaterialReference surround = materials.ReadLossless(section, "surround", Barbule.DefaultSurround);
        MaterialReference matrix = materials.Read(section, "matrix", Barbule.DefaultMatrix);
        MaterialReference? backing = IsUnknown(section) ? null : materials.Read(section, "backing", Barbule.DefaultMatrix);
        Angle axis = ReadAxis(section);
        MeasuredLength? cortex = ReadCortex(reader);
        ValueList<BarbuleLayer> layers = ReadLayers(reader);
        Back? back = ReadBack(reader);
        var factors = new FactorReader(log);
        Preparation? preparation = factors.ReadPreparation(reader);
        Preservation? preservation = factors.ReadPreservation(reader);
        RefuseNothing(reader, cortex);
        return log.HasProblems ? null : new Barbule(name, surround, matrix, backing, axis, cortex, layers, back) { Preparation = preparation, Preservation = preservation };
    }

    /// <summary>Refuses a file of another format than ours.</summary>
    public static void CheckFormat(TableReader reader, ReadingLog log)
    {
        if (!reader.TryGet("format", out TomlNode? value))
            reader.RefuseMissing("format", FormattableString.Invariant($"format = {Format} at the top of the file"));
        else if (value is not TomlNumber { Whole: Format })
            log.Refuse(value.Location, "format", FormattableString.Invariant($"found {value.Found}; allowed {Format}"));
    }

    private static bool IsUnknown(TableReader section) => section.TryGet("backing", out TomlNode? value) && value is TomlText { Value: Unknown };

    private static Angle ReadAxis(TableReader section)
    {
        if (!section.TryGet("axis", out TomlNode? value))
            return Angle.FromDegrees(0);
        switch (value)
        {
            case TomlText { Value: "across" }:
                return Angle.FromDegrees(0);
            case TomlText { Value: "along" }:
                return Angle.FromDegrees(90);
            case TomlNumber { Value: >= 0 and <= 90 and var degrees }:
                return Angle.FromDegrees(degrees);
            default:
                string suggestion = TableReader.Suggestion((value as TomlText)?.Value, ["across", "along"]);
                section.Refuse("axis", $"found {value.Found}{suggestion}; allowed \"across\", \"along\", or 0 (across) to 90 (along) degrees");
                return Angle.FromDegrees(0);
        }
    }

    private MeasuredLength? ReadCortex(TableReader reader)
    {
        if (reader.Inner("cortex") is not { } cortex)
            return null;
        cortex.RefuseOthers(CortexKeys);
        return LengthReader.Need(cortex, "thickness", LengthReader.Distance, log);
    }

    private ValueList<BarbuleLayer> ReadLayers(TableReader reader)
    {
        var layers = new LayerReader(materials, log);
        return [.. reader.Many("layer", "[[layer]]").Select(layers.Read).OfType<BarbuleLayer>()];
    }

    private Back? ReadBack(TableReader reader)
    {
        if (reader.Inner("back") is not { } back)
            return null;
        back.RefuseOthers(BackKeys);
        MeasuredLength? thickness = LengthReader.Need(back, "thickness", LengthReader.Size, log);
        MaterialReference behind = materials.Read(back, "behind", Barbule.DefaultSurround);
        bool coherent = back.Flag("coherent") ?? false;
        return thickness is null ? null : new Back(thickness, behind, coherent);
    }

    // Only when nothing else is wrong: a misspelled [cortx] is named already.
    private void RefuseNothing(TableReader reader, MeasuredLength? cortex)
    {
        if (log.HasProblems)
            return;
        bool hasLayers = reader.TryGet("layer", out TomlNode? layers) && layers is not TomlArray { Items.Count: 0 };
        if (!hasLayers && !reader.Has("cortex"))
            log.Refuse(reader.Table.Location, null, "found neither [[layer]] nor [cortex]; needed at least one layer or a cortex");
        else if (!hasLayers && cortex is { CentralNm: 0 })
            log.Refuse(reader.Table.Location, "cortex.thickness", "found 0 and no layer; needed at least one layer or a cortex");
    }
}

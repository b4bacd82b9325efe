using BarbuleOptics.Files.Toml;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Files;

/// <summary>Reads the eye of a bird (TOML 1.0), one a file.</summary>
/// <remarks>
/// Keys: <c>format = 1</c>, <c>name</c>, <c>like</c> (a built-in system whose values stand where the file has none; without it all must be given),
/// <c>source</c>, <c>obtained</c>, <c>weber_fraction</c> (of the long cones), <c>double_weber_fraction</c>, <c>[media] half_nm, width_nm</c>, and
/// <c>[shortest]</c>, <c>[short]</c>, <c>[medium]</c>, <c>[long]</c>, <c>[double]</c>, each with <c>pigment_nm</c>, <c>number</c> (not of double cones),
/// <c>cut_nm</c> and <c>mid_nm</c> of its droplet; <c>transparent = true</c> takes the droplet of <c>like</c> away.
/// </remarks>
public static class EyeFile
{
    private const string Double = "double";

    private static readonly string[] Keys = ["format", "name", "like", "source", "obtained", "weber_fraction", "double_weber_fraction", "media", .. VisualSystem.Ranks, Double];
    private static readonly NumberRange Fraction = new(0, 10, ExcludesLeast: true);
    private static readonly NumberRange Wavelength = new(200, 800);
    private static readonly NumberRange EdgeNm = new(0, 200, ExcludesLeast: true);

    /// <summary>Whether a text is a path rather than the name of a built-in system or light.</summary>
    public static bool IsPath(string text) => MaterialReader.IsPath(text);

    /// <summary>Reads a file; what is wrong with it comes as a list.</summary>
    public static FileResult<VisualSystem> Read(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        var log = new ReadingLog(path);
        return SourceText.ReadFile(path, log) is { } bytes ? Parse(bytes, path) : FileResult.Failure<VisualSystem>(log.Problems());
    }

    /// <summary>Reads the bytes of a file.</summary>
    /// <param name="bytes">The file's content.</param>
    /// <param name="displayName">What messages call the file.</param>
    public static FileResult<VisualSystem> Parse(ReadOnlySpan<byte> bytes, string displayName)
    {
        ArgumentNullException.ThrowIfNull(displayName);
        var log = new ReadingLog(displayName);
        VisualSystem? eye = TomlDocument.Parse(bytes, log) is { } root ? Read(new TableReader(root, log), log) : null;
        return eye is null || log.HasProblems ? FileResult.Failure<VisualSystem>(log.Problems()) : FileResult.Success(eye);
    }

    private static VisualSystem? Read(TableReader reader, ReadingLog log)
    {
        StructureReader.CheckFormat(reader, log);
        reader.RefuseOthers(Keys);
        VisualSystem? like = VisualSystems.TryFind(reader.Word("like", [.. VisualSystems.All.Select(system => system.Name)]), out VisualSystem? found) ? found : null;
        if (like is null && reader.Has("like"))
            return null; // What else is missing would be the consequence.
        string? name = ReadName(reader);
        string? source = Needed(reader, "source", like is null ? null : like.Source, "where the values were published, with DOI");
        string? obtained = Needed(reader, "obtained", like is null ? null : $"{like.Name} with values given by the user", "how the values were obtained (published, from memory, measured)");
        double? weber = Number(reader, "weber_fraction", Fraction, like?.WeberFraction), doubleWeber = Number(reader, "double_weber_fraction", Fraction, like?.DoubleWeberFraction);
        OcularMedia? media = ReadMedia(reader, like);
        Cone?[] singles = [.. Enumerable.Range(0, VisualSystem.SingleCount).Select(i => ReadCone(reader, VisualSystem.Ranks[i], like?.SingleCones[i]))];
        Cone? doubleCone = reader.Has(Double) ? ReadCone(reader, Double, like?.DoubleCone) : like?.DoubleCone;
        RefuseDisorder(reader, singles);
        if (log.HasProblems || name is null || source is null || obtained is null || weber is null || doubleWeber is null || media is null)
            return null;
        return new VisualSystem
        {
            Name = name,
            SingleCones = [.. singles.Select(cone => cone!)],
            DoubleCone = doubleCone,
            Media = media,
            WeberFraction = weber.Value,
            DoubleWeberFraction = doubleWeber.Value,
            Source = source,
            Obtained = obtained,
        };
    }

    private static void RefuseDisorder(TableReader reader, Cone?[] singles)
    {
        for (int i = 1; i < singles.Length; i++)
        {
            if (singles[i] is not { } right || singles[i - 1] is not { } left || right.PigmentNm > left.PigmentNm)
                continue;
            (string rank, string before) = (VisualSystem.Ranks[i], VisualSystem.Ranks[i - 1]);
            if (reader.Has(rank))
                reader.Inner(rank)!.Refuse("pigment_nm", $"found {OneLine.Number(right.PigmentNm)}; allowed above that of {before}, {OneLine.Number(left.PigmentNm)}");
            else
                reader.Inner(before)!.Refuse("pigment_nm", $"found {OneLine.Number(left.PigmentNm)}; allowed below that of {rank}, {OneLine.Number(right.PigmentNm)}");
        }
    }

    private static string? ReadName(TableReader reader)
    {
        if (!reader.Has("name"))
            reader.RefuseMissing("name", "what output calls this eye");
        string? name = reader.Text("name");
        if (name is null || (name == name.Trim() && name.Length <= 60 && !IsPath(name) && !VisualSystems.TryFind(name, out _)))
            return name;
        reader.Refuse("name", $"found {OneLine.Quote(name)}; allowed up to 60 letters without / and not ending in .toml, other than {string.Join(", ", VisualSystems.All.Select(system => system.Name))}");
        return null;
    }

    private static OcularMedia? ReadMedia(TableReader reader, VisualSystem? like)
    {
        if (!reader.Has("media"))
        {
            if (like is null)
                reader.RefuseMissing("media", "a section [media] with half_nm and width_nm");
            return like?.Media;
        }
        if (reader.Inner("media") is not { } section)
            return null;
        section.RefuseOthers(["half_nm", "width_nm"]);
        double? half = Number(section, "half_nm", Wavelength, like?.Media.HalfNm), width = Number(section, "width_nm", EdgeNm, like?.Media.WidthNm);
        return half is { } halfNm && width is { } widthNm ? new OcularMedia(halfNm, widthNm) : null;
    }

    private static Cone? ReadCone(TableReader reader, string key, Cone? like)
    {
        if (!reader.Has(key))
        {
            if (like is null)
                reader.RefuseMissing(key, $"a section [{key}] with pigment_nm{(key == Double ? "" : ", number")} and, for a colored droplet, cut_nm and mid_nm");
            return like;
        }
        if (reader.Inner(key) is not { } section)
            return null;
        section.RefuseOthers(key == Double ? ["pigment_nm", "cut_nm", "mid_nm", "transparent"] : ["pigment_nm", "number", "cut_nm", "mid_nm", "transparent"]);
        double? pigment = Number(section, "pigment_nm", new NumberRange(PigmentTemplate.LeastPeakNm, PigmentTemplate.MostPeakNm), like?.PigmentNm);
        double? number = key == Double ? 1 : Number(section, "number", new NumberRange(0, 1000, ExcludesLeast: true), like?.Abundance);
        bool isRead = ReadDroplet(section, like?.Droplet, out OilDroplet? droplet);
        return isRead && pigment is { } pigmentNm && number is { } count ? new Cone(pigmentNm, droplet, count) : null;
    }

    private static bool ReadDroplet(TableReader section, OilDroplet? like, out OilDroplet? droplet)
    {
        droplet = like;
        if (section.Flag("transparent") == true)
        {
            droplet = null;
            foreach (string key in (string[])["cut_nm", "mid_nm"])
            {
                if (section.Has(key))
                    section.Refuse(key, "found beside transparent = true; allowed one of the two");
            }
            return true;
        }
        if (!section.Has("cut_nm") && !section.Has("mid_nm"))
            return true;
        double? cut = Number(section, "cut_nm", Wavelength, like?.CutNm), mid = Number(section, "mid_nm", Wavelength, like?.MidNm);
        if (cut is not { } cutNm || mid is not { } midNm)
            return false;
        if (midNm <= cutNm)
        {
            section.Refuse("mid_nm", $"found {OneLine.Number(midNm)}; allowed above cut_nm, {OneLine.Number(cutNm)}");
            return false;
        }
        droplet = new OilDroplet(cutNm, midNm);
        return true;
    }

    private static double? Number(TableReader reader, string key, NumberRange range, double? otherwise)
    {
        if (reader.Has(key))
            return reader.Number(key, range);
        if (otherwise is null)
            reader.RefuseMissing(key, $"a number, {range}");
        return otherwise;
    }

    private static string? Needed(TableReader reader, string key, string? otherwise, string what)
    {
        if (reader.Has(key))
            return reader.Text(key);
        if (otherwise is null)
            reader.RefuseMissing(key, what);
        return otherwise;
    }
}

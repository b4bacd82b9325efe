using BarbuleOptics.Anatomy;
using BarbuleOptics.Files.Toml;

namespace BarbuleOptics.Files;

/// <summary>Reads the form of a melanosome and its sizes.</summary>
internal sealed class FormReader(ReadingLog log)
{
    public const string Rod = "rod";
    public const string FlattenedRod = "flattened-rod";
    public const string Platelet = "platelet";
    public const string Film = "film";

    /// <summary>Every form that a layer may have.</summary>
    public static readonly string[] LayerForms = [Rod, FlattenedRod, Platelet, Film];

    /// <summary>Every form that a body of a cell may have.</summary>
    public static readonly string[] BodyForms = [Rod, FlattenedRod, Platelet];

    /// <summary>The sizes of any form.</summary>
    public static readonly string[] AllSizes = [.. LayerForms.SelectMany(Sizes).Distinct()];

    private static readonly NumberRange Share = new(0, 1);

    /// <summary>The keys of a form's sizes.</summary>
    public static string[] Sizes(string form) => form switch
    {
        Rod => ["diameter", "lumen"],
        FlattenedRod => ["height", "width", "lumen_height", "lumen_width"],
        Platelet => ["thickness", "width", "wall", "core_air"],
        _ => ["thickness"],
    };

    /// <summary>Extent along the surface that the mean geometry takes, in nm; null for a film.</summary>
    public static double? WidthNm(MelanosomeForm form) => form switch
    {
        MelanosomeForm.Rod rod => rod.Diameter.CentralNm,
        MelanosomeForm.FlattenedRod rod => rod.Width.CentralNm,
        MelanosomeForm.Platelet platelet => platelet.Width.CentralNm,
        _ => null,
    };

    /// <summary>The form with its sizes; null when it was refused.</summary>
    public MelanosomeForm? Read(TableReader reader, string form)
    {
        MelanosomeForm? read = form switch
        {
            Rod => ReadRod(reader),
            FlattenedRod => ReadFlattenedRod(reader),
            Platelet => ReadPlatelet(reader),
            _ => Need(reader, "thickness") is { } thickness ? new MelanosomeForm.Film(thickness) : null,
        };
        if (read is not null)
        {
            foreach ((string key, string message) in FormCheck.Faults(read))
                reader.Refuse(key, message);
        }
        return read;
    }

    private MelanosomeForm.Rod? ReadRod(TableReader reader)
    {
        MeasuredLength? diameter = Need(reader, "diameter"), lumen = ReadCore(reader, "lumen");
        return diameter is null ? null : new MelanosomeForm.Rod(diameter, lumen);
    }

    private MelanosomeForm.FlattenedRod? ReadFlattenedRod(TableReader reader)
    {
        MeasuredLength? height = Need(reader, "height"), width = Need(reader, "width");
        MeasuredLength? lumenHeight = ReadCore(reader, "lumen_height"), lumenWidth = ReadCore(reader, "lumen_width");
        if (reader.Has("lumen_height") != reader.Has("lumen_width"))
            reader.RefuseMissing(reader.Has("lumen_height") ? "lumen_width" : "lumen_height", "for lumen_height and lumen_width come together");
        return height is null || width is null ? null : new MelanosomeForm.FlattenedRod(height, width, lumenHeight, lumenWidth);
    }

    private MelanosomeForm.Platelet? ReadPlatelet(TableReader reader)
    {
        MeasuredLength? thickness = Need(reader, "thickness"), width = Need(reader, "width");
        MeasuredLength? wall = LengthReader.Read(reader, "wall", LengthReader.Size, log);
        double coreAir = reader.Number("core_air", Share) ?? 1;
        if (reader.Has("core_air") && !reader.Has("wall"))
            reader.Refuse("core_air", "found without a wall; allowed where wall gives the shell round a core");
        return thickness is null || width is null ? null : new MelanosomeForm.Platelet(thickness, width, wall, coreAir);
    }

    private MeasuredLength? ReadCore(TableReader reader, string key) => LengthReader.Read(reader, key, LengthReader.Distance, log);

    private MeasuredLength? Need(TableReader reader, string key) => LengthReader.Need(reader, key, LengthReader.Size, log);
}

using BarbuleOptics.Anatomy;
using BarbuleOptics.Files.Toml;
using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Files;

/// <summary>Reads one <c>[[layer]]</c>.</summary>
internal sealed class LayerReader(MaterialReader materials, ReadingLog log)
{
    private const string BodyHeader = "[[layer.body]]";

    private static readonly string[] DepthKeys = ["rows", "pitch", "row_separation", "gap"];
    private static readonly string[] LateralKeys = ["spacing", "separation", "stacking", "shift"];
    private static readonly string[] MaterialKeys = ["material", "lumen_material"];
    private static readonly string[] PlaceKeys = ["x", "z"];
    private static readonly string[] StackingWords = ["aligned", "staggered"];
    private static readonly NumberRange Share = new(-1, 1);

    private readonly FormReader _forms = new(log);

    /// <summary>The layer; null when it was refused.</summary>
    public BarbuleLayer? Read(TableReader reader)
    {
        bool hasBodies = reader.Has("body");
        string? form = hasBodies ? null : NeedForm(reader, FormReader.LayerForms);
        ValueList<Body>? bodies = hasBodies ? ReadBodies(reader) : form is not null ? ReadOnlyBody(reader, form) : null;
        RefuseOthers(reader, form, hasBodies);
        bool isFilm = form == FormReader.Film;
        Packing? lateral = isFilm || (form is null && !hasBodies) ? null : ReadLateral(reader, bodies);
        RowCount? rows = reader.Has("rows") ? ReadRows(reader) : RowCount.One;
        Packing? depth = ReadDepth(reader, rows);
        Stacking stacking = !isFilm && reader.Word("stacking", StackingWords) == "staggered" ? Stacking.Staggered : Stacking.Aligned;
        double shift = isFilm ? 0 : reader.Number("shift", Share, " of the spacing") ?? 0;
        MeasuredLength? gap = reader.Has("gap") ? LengthReader.Read(reader, "gap", LengthReader.Signed, log) : MeasuredLength.FromNanometres(0);
        if (bodies is null || rows is null || gap is null)
            return null;
        if (bodies[0].Form is MelanosomeForm.Film film && depth is { BetweenSurfaces: false } && depth.Distance.CentralNm < film.Thickness.CentralNm - SectionBuilder.TouchingNm)
            reader.Refuse("pitch", $"found {OneLine.Number(depth.Distance.CentralNm)}; allowed the thickness or above, {OneLine.Number(film.Thickness.CentralNm)}");
        return new BarbuleLayer(bodies, lateral, rows, depth, stacking, shift, gap);
    }

    private ValueList<Body>? ReadOnlyBody(TableReader reader, string form)
        => ReadBody(reader, form) is { } body ? [body] : null;

    private ValueList<Body>? ReadBodies(TableReader layer)
    {
        IReadOnlyList<TableReader> readers = layer.Many("body", BodyHeader);
        if (readers.Count == 0 && layer.TryGet("body", out TomlNode? value) && value is TomlArray { Items.Count: 0 })
            layer.Refuse("body", $"found {value.Found}; allowed sections that open with {BodyHeader}");
        Body?[] bodies = [.. readers.Select(ReadPlacedBody)];
        return bodies.Length > 0 && bodies.All(body => body is not null) ? [.. bodies!] : null;
    }

    private Body? ReadPlacedBody(TableReader reader)
    {
        string? form = NeedForm(reader, FormReader.BodyForms);
        string[] known = [.. FormReader.AllSizes, .. DepthKeys, .. LateralKeys];
        string[] allowed = ["form", .. MaterialKeys, .. form is null ? FormReader.AllSizes : FormReader.Sizes(form), .. PlaceKeys];
        reader.RefuseOthers(allowed, key => !known.Contains(key) ? null
            : FormReader.AllSizes.Contains(key) ? $"is no key of a {form}" : "is a key of the layer, not of a body");
        double x = reader.Number("x", Share, " of the spacing") ?? 0, z = reader.Number("z", LengthReader.Signed, " nm") ?? 0;
        return form is not null && ReadBody(reader, form) is { } body ? body with { SpacingShare = x, OffsetNm = z } : null;
    }

    private Body? ReadBody(TableReader reader, string form)
    {
        MelanosomeForm? sizes = _forms.Read(reader, form);
        var material = materials.Read(reader, "material", Barbule.DefaultMelanin);
        var lumen = materials.Read(reader, "lumen_material", Barbule.DefaultLumen);
        return sizes is null ? null : new Body(sizes, material, lumen, 0, 0);
    }

    private static string? NeedForm(TableReader reader, string[] forms)
    {
        if (!reader.Has("form"))
            reader.RefuseMissing("form", TableReader.Quoted(forms));
        return reader.Word("form", forms);
    }

    private static void RefuseOthers(TableReader reader, string? form, bool hasBodies)
    {
        string[] ofForm = ["form", .. FormReader.AllSizes, .. MaterialKeys];
        string[] allowed = form switch
        {
            _ when hasBodies => ["body", .. LateralKeys, .. DepthKeys],
            null => [.. ofForm, .. LateralKeys, .. DepthKeys],
            FormReader.Film => ["form", "material", .. FormReader.Sizes(form), .. DepthKeys],
            _ => ["form", .. MaterialKeys, .. FormReader.Sizes(form), .. LateralKeys, .. DepthKeys],
        };
        string[] known = [.. ofForm, .. LateralKeys];
        reader.RefuseOthers(allowed, key => PlaceKeys.Contains(key) ? $"is a key of {BodyHeader}"
            : !known.Contains(key) ? null
            : hasBodies ? $"stands in each {BodyHeader} where a layer has them" : $"is no key of a {form}");
    }

    private Packing? ReadLateral(TableReader reader, ValueList<Body>? bodies)
    {
        Packing? packing = ReadPacking(reader, "spacing", "separation");
        if (packing is null && !reader.Has("spacing") && !reader.Has("separation"))
            reader.RefuseMissing("spacing", "spacing (center to center) or separation (surface to surface)");
        if (packing is { BetweenSurfaces: true } && bodies?.Count > 1)
            reader.Refuse("separation", "found with several bodies in a cell; allowed spacing (center to center)");
        if (packing is { BetweenSurfaces: false } && bodies is not null)
        {
            double width = bodies.Max(body => FormReader.WidthNm(body.Form) ?? 0);
            if (packing.Distance.CentralNm < width - SectionBuilder.TouchingNm)
                reader.Refuse("spacing", $"found {OneLine.Rounded(packing.Distance.CentralNm)}; allowed the width or above, {OneLine.Rounded(width)}");
        }
        return packing;
    }

    // Where all counts are one the distance means nothing; it is still read, so that nonsense is refused.
    private Packing? ReadDepth(TableReader reader, RowCount? rows)
    {
        Packing? packing = ReadPacking(reader, "pitch", "row_separation");
        string? given = reader.Has("pitch") ? "pitch" : reader.Has("row_separation") ? "row_separation" : null;
        if (rows is null)
            return null;
        bool isSingle = rows.Counts.All(count => count == 1);
        if (!isSingle && given is null)
            reader.RefuseMissing("pitch", $"pitch (center to center) or row_separation (surface to surface) for {rows.Counts.Max()} rows");
        if (!isSingle || given is null)
            return packing;
        reader.TryGet(given, out TomlNode? value);
        log.Warn(FileNote.PitchIgnored, value!.Location, reader.Table.PathOf(given), $"{given} is ignored: there is one row.");
        return null;
    }

    private Packing? ReadPacking(TableReader reader, string centers, string surfaces)
    {
        MeasuredLength? pitch = LengthReader.Read(reader, centers, LengthReader.Size, log);
        MeasuredLength? separation = LengthReader.Read(reader, surfaces, LengthReader.Distance, log);
        if (reader.Has(centers) && reader.Has(surfaces))
            reader.Refuse(surfaces, $"found beside {centers}; allowed one of the two");
        return pitch is not null ? new Packing(pitch, false) : separation is not null ? new Packing(separation, true) : null;
    }

    private RowCount? ReadRows(TableReader reader)
    {
        reader.TryGet("rows", out TomlNode? value);
        IReadOnlyList<TomlNode> items = value is TomlArray { Items.Count: > 0 } list ? list.Items : [value!];
        List<int> counts = [];
        foreach (TomlNode item in items)
        {
            if (item is TomlNumber { Whole: >= 1 and <= RowCount.Most and { } count })
                counts.Add((int)count);
            else
                log.Refuse(item.Location, reader.Table.PathOf("rows"), $"found {item.Found}; allowed a whole number, 1 to {RowCount.Most}, or a list of them");
        }
        return counts.Count == items.Count ? new RowCount([.. counts]) : null;
    }
}

using System.Globalization;
using System.Text;
using BarbuleOptics.Anatomy;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Files;

/// <summary>Writes a barbule as a structure file. What is read back is equal to what was written, for every barbule that
/// <see cref="StructureFile"/> accepts.</summary>
/// <remarks>Numbers have the shortest digits that give the same double again; the text is the same in every culture.</remarks>
public static class StructureWriter
{
    /// <summary>The file's text, lines ended by a line feed.</summary>
    public static string Write(Barbule barbule)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        var text = new StringBuilder();
        Line(text, "format", "1");
        Line(text, "name", Quote(barbule.Name));
        Header(text, "[barbule]");
        Line(text, "surround", Material(barbule.Surround));
        Line(text, "matrix", Material(barbule.Matrix));
        Line(text, "backing", barbule.Backing is null ? Quote("unknown") : Material(barbule.Backing));
        Line(text, "axis", barbule.Axis.Degrees switch { 0 => Quote("across"), 90 => Quote("along"), var degrees => Number(degrees) });
        if (barbule.Cortex is { } cortex)
        {
            Header(text, "[cortex]");
            Line(text, "thickness", Length(cortex));
        }
        foreach (BarbuleLayer layer in barbule.Layers)
            Write(text, layer);
        if (barbule.Back is { } back)
        {
            Header(text, "[back]");
            Line(text, "thickness", Length(back.Thickness));
            Line(text, "behind", Material(back.Behind));
            Line(text, "coherent", back.Coherent ? "true" : "false");
        }
        if (barbule.Preparation is { } preparation)
        {
            Header(text, "[preparation]");
            OptionalLine(text, "obliquity", preparation.ObliquityDegrees);
            OptionalLine(text, "keratin_scale", preparation.KeratinScale);
            OptionalLine(text, "melanin_scale", preparation.MelaninScale);
        }
        if (barbule.Preservation is { } preservation)
        {
            Header(text, "[preservation]");
            OptionalLine(text, "melanosome_shrinkage", preservation.MelanosomeShrinkage);
            OptionalLine(text, "cortex_shrinkage", preservation.CortexShrinkage);
        }
        return text.ToString();
    }

    private static void Write(StringBuilder text, BarbuleLayer layer)
    {
        Header(text, "[[layer]]");
        bool isPlain = layer.Bodies is [{ SpacingShare: 0, OffsetNm: 0 }];
        if (isPlain)
            Write(text, layer.Bodies[0]);
        if (layer.Lateral is { } lateral)
            Line(text, lateral.BetweenSurfaces ? "separation" : "spacing", Length(lateral.Distance));
        Line(text, "rows", layer.Rows.Counts is [var only] ? Whole(only) : List(layer.Rows.Counts.Select(Whole)));
        if (layer.Depth is { } depth)
            Line(text, depth.BetweenSurfaces ? "row_separation" : "pitch", Length(depth.Distance));
        if (!layer.IsFilm)
        {
            Line(text, "stacking", Quote(layer.Stacking == Stacking.Staggered ? "staggered" : "aligned"));
            Line(text, "shift", Number(layer.ShiftShare));
        }
        Line(text, "gap", Length(layer.Gap));
        if (isPlain)
            return;
        foreach (Body body in layer.Bodies)
        {
            Header(text, "[[layer.body]]");
            Write(text, body);
            Line(text, "x", Number(body.SpacingShare));
            Line(text, "z", Number(body.OffsetNm));
        }
    }

    private static void Write(StringBuilder text, Body body)
    {
        switch (body.Form)
        {
            case MelanosomeForm.Rod rod:
                Line(text, "form", Quote(FormReader.Rod));
                Line(text, "diameter", Length(rod.Diameter));
                OptionalLine(text, "lumen", rod.Lumen);
                break;
            case MelanosomeForm.FlattenedRod rod:
                Line(text, "form", Quote(FormReader.FlattenedRod));
                Line(text, "height", Length(rod.Height));
                Line(text, "width", Length(rod.Width));
                OptionalLine(text, "lumen_height", rod.LumenHeight);
                OptionalLine(text, "lumen_width", rod.LumenWidth);
                break;
            case MelanosomeForm.Platelet platelet:
                Line(text, "form", Quote(FormReader.Platelet));
                Line(text, "thickness", Length(platelet.Thickness));
                Line(text, "width", Length(platelet.Width));
                OptionalLine(text, "wall", platelet.Wall);
                if (platelet.Wall is not null)
                    Line(text, "core_air", Number(platelet.CoreAir));
                break;
            case MelanosomeForm.Film film:
                Line(text, "form", Quote(FormReader.Film));
                Line(text, "thickness", Length(film.Thickness));
                break;
        }
        Line(text, "material", Material(body.Material));
        if (body.Form is not MelanosomeForm.Film)
            Line(text, "lumen_material", Material(body.LumenMaterial));
    }

    private static string Length(MeasuredLength length) => length switch
    {
        MeasuredLength.Exact exact => Number(exact.Nanometres),
        MeasuredLength.Summary summary => Summary(summary),
        MeasuredLength.Interval interval => $"{{ min = {Number(interval.LeastNm)}, max = {Number(interval.MostNm)} }}",
        MeasuredLength.Replicates replicates => Numbers(replicates.ValuesNm),
        MeasuredLength.NestedReplicates nested => List(nested.UnitsNm.Select(Numbers)),
        _ => throw new ArgumentException($"Must be a known kind of length, is {length.GetType().Name}.", nameof(length)),
    };

    private static string Summary(MeasuredLength.Summary summary)
    {
        string units = summary.Units is { } n ? $", n = {Whole(n)}" : "";
        string between = summary.SdBetweenNm is { } sd ? $", sd_between = {Number(sd)}" : "";
        return $"{{ mean = {Number(summary.MeanNm)}, sd = {Number(summary.SdNm)}{units}{between} }}";
    }

    private static string Material(MaterialReference reference) => reference switch
    {
        MaterialReference.Inline inline => $"{{ n = {Number(inline.N)}, k = {Number(inline.K)}{Deviation("n_sd", inline.NSd)}{Deviation("k_sd", inline.KSd)} }}",
        MaterialReference.Named named => Quote(named.Name),
        MaterialReference.TablePath table => Quote(table.Path),
        _ => throw new ArgumentException($"Must be a known kind of reference, is {reference.GetType().Name}.", nameof(reference)),
    };

    private static string Deviation(string key, double value) => value == 0 ? "" : $", {key} = {Number(value)}";

    private static string Numbers(ValueList<double> values) => List(values.Select(Number));

    private static string List(IEnumerable<string> items) => $"[{string.Join(", ", items)}]";

    private static string Number(double value) => OneLine.Number(value);

    private static string Whole(int value) => value.ToString(CultureInfo.InvariantCulture);

    private static string Quote(string text)
    {
        var quoted = new StringBuilder("\"");
        foreach (char c in text)
        {
            if (c is '"' or '\\')
                quoted.Append('\\').Append(c);
            else if (char.IsControl(c))
                quoted.Append(CultureInfo.InvariantCulture, $"\\u{(int)c:X4}");
            else
                quoted.Append(c);
        }
        return quoted.Append('"').ToString();
    }

    private static void OptionalLine(StringBuilder text, string key, MeasuredLength? length)
    {
        if (length is not null)
            Line(text, key, Length(length));
    }

    private static void OptionalLine(StringBuilder text, string key, MeasuredFactor? factor)
    {
        if (factor is not null)
            Line(text, key, Factor(factor));
    }

    private static string Factor(MeasuredFactor factor) => factor switch
    {
        MeasuredFactor.Exact exact => Number(exact.Value),
        MeasuredFactor.Summary summary => $"{{ mean = {Number(summary.Mean)}, sd = {Number(summary.Sd)} }}",
        MeasuredFactor.Interval interval => $"{{ min = {Number(interval.Least)}, max = {Number(interval.Most)} }}",
        _ => throw new ArgumentException($"Must be a known kind of factor, is {factor.GetType().Name}.", nameof(factor)),
    };

    private static void Header(StringBuilder text, string header) => text.Append('\n').Append(header).Append('\n');

    private static void Line(StringBuilder text, string key, string value) => text.Append(key).Append(" = ").Append(value).Append('\n');
}

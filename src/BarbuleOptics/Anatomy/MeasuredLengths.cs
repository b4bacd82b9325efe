namespace BarbuleOptics.Anatomy;

/// <summary>Every measured length of a structure with its name.</summary>
public static class MeasuredLengths
{
    /// <summary>The lengths from the outside in, named as on the command line: <c>cortex.thickness</c>, <c>layer1.diameter</c>.</summary>
    public static IEnumerable<(string Key, MeasuredLength Length)> Of(Barbule barbule)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        if (barbule.Cortex is not null)
            yield return ("cortex.thickness", barbule.Cortex);
        for (int l = 0; l < barbule.Layers.Count; l++)
        {
            foreach ((string key, MeasuredLength length) in Of(barbule.Layers[l]))
                yield return (FormattableString.Invariant($"layer{l + 1}.{key}"), length);
        }
        if (barbule.Back is not null)
            yield return ("back.thickness", barbule.Back.Thickness);
    }

    private static IEnumerable<(string Key, MeasuredLength Length)> Of(BarbuleLayer layer)
    {
        for (int b = 0; b < layer.Bodies.Count; b++)
        {
            string prefix = layer.Bodies.Count == 1 ? "" : FormattableString.Invariant($"body{b + 1}.");
            foreach ((string key, MeasuredLength? length) in Of(layer.Bodies[b].Form))
            {
                if (length is not null)
                    yield return (prefix + key, length);
            }
        }
        if (layer.Lateral is not null)
            yield return (layer.Lateral.BetweenSurfaces ? "separation" : "spacing", layer.Lateral.Distance);
        if (layer.Depth is not null)
            yield return (layer.Depth.BetweenSurfaces ? "row_separation" : "pitch", layer.Depth.Distance);
        yield return ("gap", layer.Gap);
    }

    private static (string Key, MeasuredLength? Length)[] Of(MelanosomeForm form) => form switch
    {
        MelanosomeForm.Rod rod => [("diameter", rod.Diameter), ("lumen", rod.Lumen)],
        MelanosomeForm.FlattenedRod rod => [("height", rod.Height), ("width", rod.Width), ("lumen_height", rod.LumenHeight), ("lumen_width", rod.LumenWidth)],
        MelanosomeForm.Platelet platelet => [("thickness", platelet.Thickness), ("width", platelet.Width), ("wall", platelet.Wall)],
        MelanosomeForm.Film film => [("thickness", film.Thickness)],
        _ => [],
    };
}

using BarbuleOptics.Anatomy;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>Every length of a structure in the order in which <see cref="DrawnStructure"/> takes them.</summary>
/// <remarks>From the outside in: the cortex; of each layer the sizes of its bodies (row after row where rows are drawn by themselves), the distance along the
/// surface, the distance of rows (of each two neighbors then), the gap; the far side; factors; optical constants with a deviation. Where rows are drawn by themselves the distance along the surface is
/// kept: a row stays periodic, and rows of one layer keep one period.</remarks>
internal static class StructureSlots
{
    /// <summary>The lengths, without a law yet.</summary>
    /// <param name="barbule">The structure.</param>
    /// <param name="separateRows">Whether each row has lengths of its own.</param>
    public static IEnumerable<DrawSlot> Of(Barbule barbule, bool separateRows)
    {
        if (barbule.Cortex is not null)
            yield return new("cortex.thickness", 0, barbule.Cortex, null);
        for (int l = 0; l < barbule.Layers.Count; l++)
        {
            BarbuleLayer layer = barbule.Layers[l];
            string prefix = FormattableString.Invariant($"layer{l + 1}.");
            int rows = separateRows ? layer.Rows.Central : 1;
            for (int row = 1; row <= rows; row++)
            {
                foreach ((string key, MeasuredLength length) in Sizes(layer))
                    yield return new(prefix + key, separateRows ? row : 0, length, null);
            }
            if (layer.Lateral is not null)
                yield return new(prefix + (layer.Lateral.BetweenSurfaces ? "separation" : "spacing"), 0, layer.Lateral.Distance, null);
            if (layer.Depth is not null)
            {
                for (int row = 1; row <= Math.Max(1, rows - 1); row++)
                    yield return new(prefix + (layer.Depth.BetweenSurfaces ? "row_separation" : "pitch"), separateRows ? row : 0, layer.Depth.Distance, null);
            }
            yield return new(prefix + "gap", 0, layer.Gap, null);
        }
        if (barbule.Back is not null)
            yield return new("back.thickness", 0, barbule.Back.Thickness, null);
        foreach ((string key, MeasuredFactor factor, string unit) in MeasuredFactors.Of(barbule))
            yield return new(key, 0, new MeasuredLength.Exact(factor.Central), null) { Unit = unit, Factor = factor };
        foreach ((string place, Materials.MaterialReference.Inline constants) in UncertainConstants.Of(barbule))
        {
            foreach ((string key, double center, double sd) in UncertainConstants.Parts(place, constants))
                yield return new(key, 0, new MeasuredLength.Exact(center), null) { Unit = "", Factor = new MeasuredFactor.Summary(center, sd) };
        }
    }

    private static IEnumerable<(string Key, MeasuredLength Length)> Sizes(BarbuleLayer layer)
    {
        for (int b = 0; b < layer.Bodies.Count; b++)
        {
            string prefix = layer.Bodies.Count == 1 ? "" : FormattableString.Invariant($"body{b + 1}.");
            foreach ((string key, MeasuredLength? length) in SizesOf(layer.Bodies[b].Form))
            {
                if (length is not null)
                    yield return (prefix + key, length);
            }
        }
    }

    private static (string Key, MeasuredLength? Length)[] SizesOf(MelanosomeForm form) => form switch
    {
        MelanosomeForm.Rod rod => [("diameter", rod.Diameter), ("lumen", rod.Lumen)],
        MelanosomeForm.FlattenedRod rod => [("height", rod.Height), ("width", rod.Width), ("lumen_height", rod.LumenHeight), ("lumen_width", rod.LumenWidth)],
        MelanosomeForm.Platelet platelet => [("thickness", platelet.Thickness), ("width", platelet.Width), ("wall", platelet.Wall)],
        MelanosomeForm.Film film => [("thickness", film.Thickness)],
        _ => [],
    };
}

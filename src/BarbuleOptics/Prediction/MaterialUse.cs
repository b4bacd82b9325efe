using BarbuleOptics.Anatomy;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Prediction;

/// <summary>One place of a structure that names a material.</summary>
/// <param name="Key">The place, as on the command line: <c>barbule.matrix</c>, <c>layer1.material</c>.</param>
/// <param name="Reference">What it names.</param>
internal readonly record struct MaterialUse(string Key, MaterialReference Reference)
{
    /// <summary>Every place whose material the light can meet, the surround first.</summary>
    /// <param name="barbule">The structure.</param>
    /// <param name="section">The same, laid out.</param>
    public static IEnumerable<MaterialUse> Of(Barbule barbule, Section section)
    {
        yield return new("barbule.surround", barbule.Surround);
        if (HasMatrix(section))
            yield return new("barbule.matrix", barbule.Matrix);
        for (int l = 0; l < barbule.Layers.Count; l++)
        {
            BarbuleLayer layer = barbule.Layers[l];
            for (int b = 0; b < layer.Bodies.Count; b++)
            {
                string place = FormattableString.Invariant($"layer{l + 1}") + (layer.Bodies.Count == 1 ? "" : FormattableString.Invariant($".body{b + 1}"));
                yield return new(place + ".material", layer.Bodies[b].Material);
                if (CellBuilder.HasLumen(layer.Bodies[b].Form))
                    yield return new(place + ".lumen_material", layer.Bodies[b].LumenMaterial);
            }
        }
        yield return new("barbule.backing", section.Backing);
        if (barbule.Back is not null)
            yield return new("back.behind", barbule.Back.Behind);
    }

    /// <summary>Whether anything is left for the matrix: films alone may fill the whole depth.</summary>
    private static bool HasMatrix(Section section)
        => section.Runs.Count > 0 || section.Films.Sum(film => film.ThicknessNm) < section.DepthNm - SectionBuilder.TouchingNm;
}

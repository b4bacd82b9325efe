using BarbuleOptics.Anatomy;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Prediction;

/// <summary>One place of a structure that names a material.</summary>
/// <param name="Key">The place, as on the command line: <c>barbule.matrix</c>, <c>layer1.material</c>.</param>
/// <param name="Reference">What it names.</param>
internal readonly record struct MaterialUse(string Key, MaterialReference Reference)
{
    /// <summary>Every place whose material the light can meet, the surround first.</summary>
    public static IEnumerable<MaterialUse> Of(Barbule barbule)
    {
        yield return new("barbule.surround", barbule.Surround);
        yield return new("barbule.matrix", barbule.Matrix);
        if (barbule.Backing is not null)
            yield return new("barbule.backing", barbule.Backing);
        for (int l = 0; l < barbule.Layers.Count; l++)
        {
            BarbuleLayer layer = barbule.Layers[l];
            for (int b = 0; b < layer.Bodies.Count; b++)
            {
                string place = FormattableString.Invariant($"layer{l + 1}") + (layer.Bodies.Count == 1 ? "" : FormattableString.Invariant($".body{b + 1}"));
                yield return new(place + ".material", layer.Bodies[b].Material);
                if (IsHollow(layer.Bodies[b].Form))
                    yield return new(place + ".lumen_material", layer.Bodies[b].LumenMaterial);
            }
        }
        if (barbule.Back is not null)
            yield return new("back.behind", barbule.Back.Behind);
    }

    private static bool IsHollow(MelanosomeForm form) => form switch
    {
        MelanosomeForm.Rod rod => rod.Lumen is { CentralNm: > 0 },
        MelanosomeForm.FlattenedRod rod => rod.LumenHeight is { CentralNm: > 0 },
        MelanosomeForm.Platelet platelet => platelet.Wall is not null && platelet.CoreAir > 0,
        _ => false,
    };
}

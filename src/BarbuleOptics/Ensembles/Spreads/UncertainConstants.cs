using BarbuleOptics.Anatomy;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Ensembles.Spreads;

/// <summary>The optical constants of a structure that carry a deviation, each once: equal constants at several places are one material.</summary>
internal static class UncertainConstants
{
    private const double LeastIndex = 0.05;

    /// <summary>They and the key of the place where each is met first: <c>barbule.matrix</c>, <c>layer1.material</c>.</summary>
    public static IEnumerable<(string Key, MaterialReference.Inline Constants)> Of(Barbule barbule)
        => Places(barbule).Where(place => place.Reference is MaterialReference.Inline { NSd: > 0 } or MaterialReference.Inline { KSd: > 0 })
            .Select(place => (place.Key, (MaterialReference.Inline)place.Reference!)).DistinctBy(place => place.Item2);

    /// <summary>The slots of one material: n and k, as far as they vary.</summary>
    public static IEnumerable<(string Key, double Center, double Sd)> Parts(string key, MaterialReference.Inline constants)
    {
        if (constants.NSd > 0)
            yield return (key + ".n", constants.N, constants.NSd);
        if (constants.KSd > 0)
            yield return (key + ".k", constants.K, constants.KSd);
    }

    /// <summary>The structure with drawn constants in the order of <see cref="Of"/> and <see cref="Parts"/>; n below 0.05 and k below 0 are raised in <paramref name="values"/>.</summary>
    public static Barbule With(Barbule barbule, Span<double> values)
    {
        var drawn = new Dictionary<MaterialReference, MaterialReference>();
        int at = 0;
        foreach ((_, MaterialReference.Inline constants) in Of(barbule))
        {
            double n = constants.N, k = constants.K;
            if (constants.NSd > 0)
            {
                values[at] = Math.Max(LeastIndex, values[at]);
                n = values[at++];
            }
            if (constants.KSd > 0)
            {
                values[at] = Math.Max(0, values[at]);
                k = values[at++];
            }
            drawn[constants] = new MaterialReference.Inline(n, k);
        }
        return barbule with
        {
            Surround = Drawn(barbule.Surround),
            Matrix = Drawn(barbule.Matrix),
            Backing = barbule.Backing is null ? null : Drawn(barbule.Backing),
            Layers = [.. barbule.Layers.Select(layer => layer with { Bodies = [.. layer.Bodies.Select(body => body with { Material = Drawn(body.Material), LumenMaterial = Drawn(body.LumenMaterial) })] })],
            Back = barbule.Back is null ? null : barbule.Back with { Behind = Drawn(barbule.Back.Behind) },
        };

        MaterialReference Drawn(MaterialReference reference) => drawn.GetValueOrDefault(reference, reference);
    }

    private static IEnumerable<(string Key, MaterialReference? Reference)> Places(Barbule barbule)
    {
        yield return ("barbule.surround", barbule.Surround);
        yield return ("barbule.matrix", barbule.Matrix);
        for (int l = 0; l < barbule.Layers.Count; l++)
        {
            for (int b = 0; b < barbule.Layers[l].Bodies.Count; b++)
            {
                Body body = barbule.Layers[l].Bodies[b];
                string place = FormattableString.Invariant($"layer{l + 1}.") + (barbule.Layers[l].Bodies.Count == 1 ? "" : FormattableString.Invariant($"body{b + 1}."));
                yield return (place + "material", body.Material);
                yield return (place + "lumen_material", body.LumenMaterial);
            }
        }
        yield return ("barbule.backing", barbule.Backing);
        yield return ("back.behind", barbule.Back?.Behind);
    }
}

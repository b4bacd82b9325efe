using BarbuleOptics.Anatomy;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Ensembles;

/// <summary>The sets of melanin constants that the program ships, of which authors use one or another.</summary>
public static class MelaninSets
{
    /// <summary>Their names, the default first.</summary>
    public static IReadOnlyList<string> Names { get; } = [Barbule.DefaultMelanin, "melanin-older", "melanin-exocuticle-1", "melanin-exocuticle-2"];

    /// <summary>Whether a material is one of them.</summary>
    public static bool Has(MaterialReference? reference) => reference is MaterialReference.Named { Name: var name } && Names.Contains(name, StringComparer.Ordinal);

    /// <summary>Whether a structure names one of them.</summary>
    public static bool AreIn(Barbule barbule)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        return Has(barbule.Backing) || barbule.Layers.Any(layer => layer.Bodies.Any(body => Has(body.Material)));
    }

    /// <summary>The structure with every set in it replaced by one.</summary>
    public static Barbule Replace(Barbule barbule, string name)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        var melanin = new MaterialReference.Named(name);
        return barbule with
        {
            Backing = Has(barbule.Backing) ? melanin : barbule.Backing,
            Layers = [.. barbule.Layers.Select(layer => layer with { Bodies = [.. layer.Bodies.Select(body => Has(body.Material) ? body with { Material = melanin } : body)] })],
        };
    }
}

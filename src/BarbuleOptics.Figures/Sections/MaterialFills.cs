using BarbuleOptics.Color;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;

namespace BarbuleOptics.Figures.Sections;

/// <summary>A fill for each material of a section: well-known ones always look the same, others take turns.</summary>
/// <remarks>Fills differ in lightness or hatching, so that gray prints and color-blind readers tell them apart.</remarks>
internal sealed class MaterialFills
{
    private static readonly SrgbColor Dark = new(0x5a, 0x4a, 0x3c);

    private static readonly Dictionary<string, MaterialFill> Known = new(StringComparer.Ordinal)
    {
        ["air"] = new(Ink.White, Hatch.None, Dark),
        ["water"] = new(new(0xdc, 0xed, 0xf6), Hatch.Level, new(0x7f, 0xa9, 0xc4)),
        ["keratin"] = new(new(0xf1, 0xe3, 0xc4), Hatch.None, Dark),
        ["eumelanin"] = new(new(0x41, 0x30, 0x28), Hatch.None, Dark),
        ["resin"] = new(new(0xe8, 0xc0, 0x7c), Hatch.Falling, new(0xb0, 0x84, 0x36)),
    };

    private static readonly MaterialFill[] Others =
    [
        new(new(0x9d, 0x8f, 0x84), Hatch.None, Dark),
        new(new(0xb9, 0xcd, 0xdf), Hatch.Rising, new(0x7d, 0x98, 0xb3)),
        new(new(0xcf, 0xdf, 0xb8), Hatch.Crossed, new(0x94, 0xac, 0x70)),
        new(new(0x7f, 0x6f, 0xa3), Hatch.Falling, new(0xb5, 0xa9, 0xd0)),
        new(new(0xe3, 0xb9, 0xa4), Hatch.Level, new(0xb5, 0x7d, 0x62)),
        new(new(0x4d, 0x7f, 0x8c), Hatch.Rising, new(0x8f, 0xb9, 0xc4)),
    ];

    private readonly Dictionary<SectionMaterial, MaterialFill> _fills = [];
    private int _taken;

    /// <summary>Fills for a section, given out from the surround inward.</summary>
    public MaterialFills(Section section)
    {
        Of(section.Surround);
        foreach (SectionMaterial material in section.Materials)
            Of(material);
        Of(section.Backing);
    }

    public MaterialFill Of(MaterialReference material) => Of(SectionMaterial.Plain(material));

    public MaterialFill Of(SectionMaterial material)
    {
        if (!_fills.TryGetValue(material, out MaterialFill? fill))
        {
            fill = material.Filler is null ? Plain(material.Main) : Averaged(material, Of(material.Main), Of(material.Filler));
            _fills.Add(material, fill);
        }
        return fill;
    }

    private MaterialFill Plain(MaterialReference material)
        => Known.TryGetValue(material.ToString() ?? "", out MaterialFill? known) ? known : Other(_taken++);

    /// <summary>Fills come again with other lines.</summary>
    private static MaterialFill Other(int number)
    {
        MaterialFill fill = Others[number % Others.Length];
        int turns = number / Others.Length;
        return fill with { Hatch = (Hatch)(((int)fill.Hatch + turns) % Enum.GetValues<Hatch>().Length) };
    }

    /// <summary>The ground by the shares of both, hatched in the color of the solid.</summary>
    private static MaterialFill Averaged(SectionMaterial material, MaterialFill solid, MaterialFill filler)
    {
        return new MaterialFill(
            new SrgbColor(Mixed(solid.Color.Red, filler.Color.Red), Mixed(solid.Color.Green, filler.Color.Green), Mixed(solid.Color.Blue, filler.Color.Blue)),
            Hatch.Rising, solid.Color);

        byte Mixed(byte main, byte rest) => (byte)Math.Round(main + material.FillerShare * (rest - main));
    }
}

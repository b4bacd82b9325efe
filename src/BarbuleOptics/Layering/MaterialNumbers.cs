namespace BarbuleOptics.Layering;

/// <summary>Numbers the materials of a section, each once, in the order in which they are met.</summary>
internal sealed class MaterialNumbers
{
    private readonly List<SectionMaterial> _materials = [];

    public IReadOnlyList<SectionMaterial> All => _materials;

    public int Of(SectionMaterial material)
    {
        int number = _materials.IndexOf(material);
        if (number >= 0)
            return number;
        _materials.Add(material);
        return _materials.Count - 1;
    }
}

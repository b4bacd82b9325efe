namespace BarbuleOptics.Files;

/// <summary>Keys that say the same distance in two ways, so that a layer may have one of them.</summary>
internal static class PartnerKeys
{
    private static readonly (string Centers, string Surfaces)[] Pairs = [("spacing", "separation"), ("pitch", "row_separation")];

    /// <summary>The other key of the pair, for a key with or without what encloses it (<c>layer1.pitch</c>); null for any other.</summary>
    public static string? Of(string key)
    {
        int start = key.LastIndexOf('.') + 1;
        foreach ((string centers, string surfaces) in Pairs)
        {
            if (key[start..] == centers)
                return key[..start] + surfaces;
            if (key[start..] == surfaces)
                return key[..start] + centers;
        }
        return null;
    }
}

namespace BarbuleOptics.Ensembles.Sequences;

/// <summary>Random bits that are a function of their place: nothing is kept from one call to the next, so that threads cannot change them.</summary>
internal static class Bits
{
    /// <summary>A well mixed 64-bit word for each word: the finalizer of SplitMix64.</summary>
    /// <remarks>Steele, Lea and Flood 2014, OOPSLA, 10.1145/2660193.2660195 (constants from memory; the tests hold the bits to what chance allows).</remarks>
    public static ulong Mix(ulong word)
    {
        word += 0x9E3779B97F4A7C15;
        word = (word ^ (word >> 30)) * 0xBF58476D1CE4E5B9;
        word = (word ^ (word >> 27)) * 0x94D049BB133111EB;
        return word ^ (word >> 31);
    }

    /// <summary>A key for a thing within a thing: one stream for each pair.</summary>
    public static ulong Key(ulong outer, ulong inner) => Mix(Mix(outer) ^ inner);
}

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>The pairs of media that meet at faces, numbered in the order they first appear; open addressing, no allocation once made.</summary>
internal sealed class PairRegistry
{
    private readonly long[] _pairs;
    private readonly int[] _slots;

    /// <summary>Room for a number of pairs.</summary>
    public PairRegistry(int most)
    {
        _pairs = new long[most];
        _slots = new int[(int)System.Numerics.BitOperations.RoundUpToPowerOf2((uint)(2 * most + 1))];
        Clear();
    }

    /// <summary>Number of pairs.</summary>
    public int Count { get; private set; }

    /// <summary>Forgets all.</summary>
    public void Clear()
    {
        _slots.AsSpan().Fill(-1);
        Count = 0;
    }

    /// <summary>The media of a pair.</summary>
    public (int Above, int Below) this[int pair] => ((int)(_pairs[pair] >> 32), (int)(_pairs[pair] & uint.MaxValue));

    /// <summary>Number of a pair, new if need be; -1 where there is no room.</summary>
    public int NumberOf(int above, int below)
    {
        long pair = ((long)above << 32) | (uint)below;
        // Fibonacci hashing: the high bits of a product with 2^64 / 1.618...
        int slot = (int)((ulong)pair * 0x9E3779B97F4A7C15 >> 40) & (_slots.Length - 1);
        while (_slots[slot] >= 0)
        {
            if (_pairs[_slots[slot]] == pair)
                return _slots[slot];
            slot = (slot + 1) & (_slots.Length - 1);
        }
        if (Count == _pairs.Length)
            return -1;
        _pairs[Count] = pair;
        return _slots[slot] = Count++;
    }
}

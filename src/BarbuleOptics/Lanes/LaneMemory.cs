using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace BarbuleOptics.Lanes;

/// <summary>Doubles that begin on a boundary of 64 bytes and stay there, so that no vector crosses from one line of the cache to the next.</summary>
internal sealed class LaneMemory
{
    private const int Alignment = 64;

    private readonly double[] _array;
    private readonly int _start;

    /// <summary>Zeros.</summary>
    /// <param name="length">Number of doubles.</param>
    public LaneMemory(int length)
    {
        Length = length;
        // Pinned, so that the collector does not move it off the boundary.
        _array = GC.AllocateArray<double>(checked(length + Alignment / sizeof(double)), pinned: true);
        nint address = Marshal.UnsafeAddrOfPinnedArrayElement(_array, 0);
        _start = (int)((Alignment - address % Alignment) % Alignment / sizeof(double));
    }

    /// <summary>Number of doubles.</summary>
    public int Length { get; }

    /// <summary>The double at a place, unchecked.</summary>
    public ref double this[int at]
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(_array), _start + at);
    }
}

using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace BarbuleOptics.Lanes;

/// <summary>Memory for complex or real numbers in lanes, aligned to whole cache lines so that no vector straddles two.</summary>
/// <remarks>Indices are not checked; a complex number takes the room of two real ones, and one buffer holds one sort.</remarks>
internal sealed class LaneBuffer<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    private const int LineBytes = 64;

    /// <summary>Doubles from which an array is pinned, 80 KB: larger ones outlive small collections anyway.</summary>
    private const int LeastPinned = 10_000;

    private double[] _memory = [];
    private int _offset;

    /// <summary>Number of complex numbers there is room for.</summary>
    public int Length { get; private set; }

    /// <summary>Where a complex number begins.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ref double At(int index) => ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(_memory), _offset + index * ComplexLanes<TLanes>.Stride);

    /// <summary>Where a real number begins.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ref double RealAt(int index) => ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(_memory), _offset + index * TLanes.Count);

    /// <summary>A complex number.</summary>
    public ComplexLanes<TLanes> this[int index]
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => ComplexLanes<TLanes>.Load(ref At(index));

        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        set => ComplexLanes<TLanes>.Store(value, ref At(index));
    }

    /// <summary>Reads a real number.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public TLanes Real(int index) => TLanes.Load(in RealAt(index));

    /// <summary>Writes a real number.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void SetReal(int index, TLanes value) => TLanes.Store(value, ref RealAt(index));

    /// <summary>Makes room for complex numbers, or for twice as many real ones; what was there is lost when it grows.</summary>
    public void Reserve(int length)
    {
        if (length <= Length)
            return;
        int spare = LineBytes / sizeof(double);
        int count = length * ComplexLanes<TLanes>.Stride + spare;
        // Pinned: a moved array would lose its alignment. Small ones are not, for they often live for one section alone and pinned memory is only freed by
        // full collections; one that is moved later is slower by a little, not wrong.
        _memory = GC.AllocateArray<double>(count, pinned: count >= LeastPinned);
        nuint address = (nuint)Marshal.UnsafeAddrOfPinnedArrayElement(_memory, 0);
        _offset = (int)((LineBytes - address % LineBytes) % LineBytes / sizeof(double));
        Length = length;
    }

    /// <summary>Sets the first complex numbers to zero.</summary>
    public void Clear(int length) => _memory.AsSpan(_offset, length * ComplexLanes<TLanes>.Stride).Clear();

    /// <summary>Copies the first complex numbers of another buffer.</summary>
    public void CopyFrom(LaneBuffer<TLanes> source, int length)
        => source._memory.AsSpan(source._offset, length * ComplexLanes<TLanes>.Stride).CopyTo(_memory.AsSpan(_offset));
}

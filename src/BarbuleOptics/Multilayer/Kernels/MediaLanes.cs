using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>Reads permittivities of a block of wavelengths as vectors.</summary>
internal readonly ref struct MediaLanes<TLanes>(FilmStack stack, int first, int count)
    where TLanes : struct, ILanes<TLanes>
{
    private readonly OpticalComponents _media = stack.Media;

    /// <summary>Vacuum wavelengths, in nm.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public TLanes WavelengthNm(int vector) => LaneBlock.Load<TLanes>(stack.WavelengthsNm.Slice(first, count), vector);

    /// <summary>Index of the surround.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public TLanes SurroundIndex(int vector) => LaneBlock.Load<TLanes>(stack.SurroundIndex.Slice(first, count), vector);

    /// <summary>ex of a medium.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> X(int medium, int vector) => Read(_media.XReal, _media.XImaginary, medium, vector);

    /// <summary>ey of a medium.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> Y(int medium, int vector) => Read(_media.YReal, _media.YImaginary, medium, vector);

    /// <summary>ez of a medium.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> Z(int medium, int vector) => Read(_media.ZReal, _media.ZImaginary, medium, vector);

    /// <summary>Permittivity of the backing.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    public ComplexLanes<TLanes> Backing(int vector)
    {
        Span<double> lanes = stackalloc double[2 * TLanes.Count];
        for (int lane = 0; lane < TLanes.Count; lane++)
        {
            Complex value = stack.Backing[first + Math.Min(Math.Max(0, Math.Min(vector * TLanes.Count, count - TLanes.Count)) + lane, count - 1)];
            (lanes[lane], lanes[TLanes.Count + lane]) = (value.Real, value.Imaginary);
        }
        return ComplexLanes<TLanes>.Load(ref MemoryMarshal.GetReference(lanes));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private ComplexLanes<TLanes> Read(double[] real, double[] imaginary, int medium, int vector)
    {
        int start = medium * _media.WavelengthCount + first;
        return new(LaneBlock.Load<TLanes>(real.AsSpan(start, count), vector), LaneBlock.Load<TLanes>(imaginary.AsSpan(start, count), vector));
    }
}

using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>The factors exp(2 i kz d) of a few media at one vector of wavelengths, tabulated against thickness so finely that a short polynomial leads from
/// the nearest node to any thickness.</summary>
/// <remarks>
/// With w the growth a nm and s the step, exp(w (k s + r)) = exp(w k s) (1 + w r + ... + (w r)^5/5! + the sixth term economised), |r| at most s/2.
/// For |w| s at most <see cref="MostStep"/> the error is below 4e-16 of the factor. The step is a power of two, so that r is exact.
/// </remarks>
internal sealed class FactorNodes
{
    /// <summary>Largest |w| s.</summary>
    public const double MostStep = 0.025;

    /// <summary>Coefficients of a medium, first to fifth power, complex.</summary>
    public const int Degree = 5;

    // Every so manyth node is computed by itself, the others as products.
    private const int Stride = 32;

    private readonly int _lanes;

    /// <summary>Room for a number of media and nodes.</summary>
    public FactorNodes(int lanes, int media, int nodes)
    {
        (_lanes, Media, Nodes) = (lanes, media, (nodes + Stride - 1) / Stride * Stride);
        Values = new LaneMemory(2 * lanes * media * Nodes);
        Coefficients = new LaneMemory(2 * lanes * media * Degree);
    }

    /// <summary>Number of media.</summary>
    public int Media { get; }

    /// <summary>Nodes of each medium.</summary>
    public int Nodes { get; }

    /// <summary>Factors, medium after medium.</summary>
    public LaneMemory Values { get; }

    /// <summary>Coefficients, medium after medium, highest power first.</summary>
    public LaneMemory Coefficients { get; }

    /// <summary>Where a medium's node begins.</summary>
    public int ValueAt(int medium, int node) => 2 * _lanes * (medium * Nodes + node);

    /// <summary>Where a medium's coefficients begin.</summary>
    public int CoefficientAt(int medium) => 2 * _lanes * Degree * medium;

    /// <summary>Fills all media from their rates (see <see cref="DirectionTable"/>).</summary>
    /// <param name="rates">Rates of the first medium, in the polarization wanted.</param>
    /// <param name="stepNm">Distance of nodes.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Fill<TLanes>(ref double rates, double stepNm)
        where TLanes : struct, ILanes<TLanes>
    {
        for (int medium = 0; medium < Media; medium++)
        {
            ref double rate = ref Unsafe.Add(ref rates, medium * DirectionTable.Values * TLanes.Count);
            TLanes turns = TLanes.Load(in rate), growth = TLanes.Load(in Unsafe.Add(ref rate, TLanes.Count));
            FillNodes(turns, growth, stepNm, ref Values[ValueAt(medium, 0)]);
            FillCoefficients(turns, growth, stepNm / 2, ref Coefficients[CoefficientAt(medium)]);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private void FillNodes<TLanes>(TLanes turns, TLanes growth, double stepNm, ref double place)
        where TLanes : struct, ILanes<TLanes>
    {
        for (int node = 0; node < Nodes; node++)
        {
            ComplexLanes<TLanes> value;
            if (node < Stride || node % Stride == 0)
            {
                TLanes length = TLanes.Broadcast(node * stepNm);
                value = TLanes.PowerOfTwo(growth, length) * TLanes.Turn(turns, length);
            }
            else
            {
                value = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref place, node / Stride * Stride * ComplexLanes<TLanes>.Stride))
                        * ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref place, node % Stride * ComplexLanes<TLanes>.Stride));
            }
            ComplexLanes<TLanes>.Store(value, ref Unsafe.Add(ref place, node * ComplexLanes<TLanes>.Stride));
        }
    }

    // The sixth power on [-h, h] is within h^6/32 of (48 h^2 r^4 - 18 h^4 r^2 + h^6)/32 (Chebyshev polynomial of degree six); the last part is below rounding.
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void FillCoefficients<TLanes>(TLanes turns, TLanes growth, double half, ref double place)
        where TLanes : struct, ILanes<TLanes>
    {
        var w = new ComplexLanes<TLanes>(TLanes.Broadcast(0.69314718055994531) * growth, TLanes.Broadcast(2 * Math.PI) * turns);
        ComplexLanes<TLanes> second = TLanes.Broadcast(0.5) * (w * w), third = TLanes.Broadcast(1.0 / 3) * (second * w);
        ComplexLanes<TLanes> fourth = TLanes.Broadcast(0.25) * (third * w), fifth = TLanes.Broadcast(0.2) * (fourth * w), sixth = TLanes.Broadcast(1.0 / 6) * (fifth * w);
        fourth += TLanes.Broadcast(48.0 / 32 * half * half) * sixth;
        second -= TLanes.Broadcast(18.0 / 32 * half * half * half * half) * sixth;
        int stride = ComplexLanes<TLanes>.Stride;
        ComplexLanes<TLanes>.Store(fifth, ref place);
        ComplexLanes<TLanes>.Store(fourth, ref Unsafe.Add(ref place, stride));
        ComplexLanes<TLanes>.Store(third, ref Unsafe.Add(ref place, 2 * stride));
        ComplexLanes<TLanes>.Store(second, ref Unsafe.Add(ref place, 3 * stride));
        ComplexLanes<TLanes>.Store(w, ref Unsafe.Add(ref place, 4 * stride));
    }
}

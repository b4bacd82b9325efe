using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>Reflectance by the recursion of wave amplitudes, vectors of wavelengths at a time.</summary>
/// <remarks>
/// From the backing upward, with (a, b) = (1, 0) there: at each face of reflection rho, and through the film above it of round trip g = exp(2 i kz d),
/// a' = a + rho b, b' = (b + rho a) g; at the surround r = (rho a + b)/(a + rho b). No film needs a division, and since |g| is at most 1
/// a and b stay below the product G of all 1 + |rho|, which the caller keeps within bounds.
/// Error: let e be the unit of rounding (1.1e-16), x the sum of |2 kz| d. In the larger of |a| and |b| a step multiplies errors by at most 1 + |rho|
/// and adds, relative to G, at most 12 e for its own twelve operations, 8 e for rho and (4 + 4 |2 kz| d) e for g. So a, b and what r
/// is made of are known within G e (24 N + 4 x), N being the films and the top face, and since |r| is at most 1 plus that,
/// |dR| is at most 4.5 G e (24 N + 4 x)/|a + rho b|. A vector where a lane's denominator is too small for the bound asked for is left to
/// the field recursion. (Standard model of rounding, Higham 2002, Accuracy and Stability of Numerical Algorithms, chapters 2 and 3.)
/// </remarks>
internal static class AmplitudeKernel
{
    /// <summary>Rounding errors that a film brings, in units of rounding.</summary>
    public const double ErrorOfFilm = 24;

    /// <summary>Rounding errors that a radian of phase brings.</summary>
    public const double ErrorOfRadian = 4;

    /// <summary>Largest error of R for each unit of G e (24 N + 4 x)/|a + rho b|.</summary>
    public const double ErrorOfReflectance = 4.5;

    /// <summary>Adds the mean of the reflectances in s and p, which travel alike in all films.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Both<TLanes>(in AmplitudeRun run)
        where TLanes : struct, ILanes<TLanes>
    {
        Span<double> answer = stackalloc double[2 * TLanes.Count];
        ref double reflectance = ref MemoryMarshal.GetReference(answer);
        for (int vector = 0; vector < run.Vectors; vector++)
        {
            ref double rates = ref run.Table.Rates[vector * run.Table.RateStride];
            ref double faces = ref run.Table.Faces[vector * run.Table.FaceStride];
            ClimbBoth<TLanes>(run.Steps, ref rates, ref faces, ref Unsafe.Add(ref faces, run.Top), ref reflectance);
            Keep<TLanes>(run, vector, 0.5, ref reflectance);
        }
    }

    /// <summary>Adds the reflectance in one polarization, weighted.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void One<TLanes>(in AmplitudeRun run, bool isP, double weight)
        where TLanes : struct, ILanes<TLanes>
    {
        Span<double> answer = stackalloc double[2 * TLanes.Count];
        ref double reflectance = ref MemoryMarshal.GetReference(answer);
        int skipped = isP ? ComplexLanes<TLanes>.Stride : 0;
        for (int vector = 0; vector < run.Vectors; vector++)
        {
            ref double rates = ref run.Table.Rates[vector * run.Table.RateStride + skipped];
            ref double faces = ref run.Table.Faces[vector * run.Table.FaceStride + skipped];
            ClimbOne<TLanes>(run.Steps, ref rates, ref faces, ref Unsafe.Add(ref faces, run.Top), ref reflectance);
            Keep<TLanes>(run, vector, weight, ref reflectance);
        }
    }

    // The two loops stand in methods of their own that call nothing: only then do the amplitudes stay in registers. A film's factor is computed
    // before the film below it is passed: the processor looks some hundred operations ahead, less than factor and passage together need to overlap.
    // They leave the reflectance (the sum of s and p) and behind it the smaller |a + rho b|^2. At least one film.
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void ClimbBoth<TLanes>(Span<AmplitudeStep> steps, ref double rates, ref double faces, ref double top, ref double answer)
        where TLanes : struct, ILanes<TLanes>
    {
        ComplexLanes<TLanes> aS = ComplexLanes<TLanes>.Broadcast(1), aP = aS, bS = ComplexLanes<TLanes>.Broadcast(0), bP = bS;
        ref AmplitudeStep step = ref Unsafe.Add(ref MemoryMarshal.GetReference(steps), steps.Length - 1);
        ComplexLanes<TLanes> g = Factor<TLanes>(step, ref rates);
        for (int left = steps.Length - 1; left > 0; left--)
        {
            ref double face = ref Unsafe.Add(ref faces, step.Face);
            step = ref Unsafe.Subtract(ref step, 1);
            ComplexLanes<TLanes> next = Factor<TLanes>(step, ref rates);
            (aS, bS) = Through(ComplexLanes<TLanes>.Load(ref face), g, aS, bS);
            (aP, bP) = Through(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref face, ComplexLanes<TLanes>.Stride)), g, aP, bP);
            g = next;
        }
        ref double uppermost = ref Unsafe.Add(ref faces, step.Face);
        (aS, bS) = Through(ComplexLanes<TLanes>.Load(ref uppermost), g, aS, bS);
        (aP, bP) = Through(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref uppermost, ComplexLanes<TLanes>.Stride)), g, aP, bP);
        (TLanes upS, TLanes inS) = Norms(ComplexLanes<TLanes>.Load(ref top), aS, bS);
        (TLanes upP, TLanes inP) = Norms(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref top, ComplexLanes<TLanes>.Stride)), aP, bP);
        // One division for both.
        TLanes.Store(TLanes.MultiplyAdd(upS, inP, upP * inS) / (inS * inP), ref answer);
        TLanes.Store(TLanes.Min(inS, inP), ref Unsafe.Add(ref answer, TLanes.Count));
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void ClimbOne<TLanes>(Span<AmplitudeStep> steps, ref double rates, ref double faces, ref double top, ref double answer)
        where TLanes : struct, ILanes<TLanes>
    {
        ComplexLanes<TLanes> a = ComplexLanes<TLanes>.Broadcast(1), b = ComplexLanes<TLanes>.Broadcast(0);
        ref AmplitudeStep step = ref Unsafe.Add(ref MemoryMarshal.GetReference(steps), steps.Length - 1);
        ComplexLanes<TLanes> g = Factor<TLanes>(step, ref rates);
        for (int left = steps.Length - 1; left > 0; left--)
        {
            ref double face = ref Unsafe.Add(ref faces, step.Face);
            step = ref Unsafe.Subtract(ref step, 1);
            ComplexLanes<TLanes> next = Factor<TLanes>(step, ref rates);
            (a, b) = Through(ComplexLanes<TLanes>.Load(ref face), g, a, b);
            g = next;
        }
        (a, b) = Through(ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref faces, step.Face)), g, a, b);
        (TLanes up, TLanes incident) = Norms(ComplexLanes<TLanes>.Load(ref top), a, b);
        TLanes.Store(up / incident, ref answer);
        TLanes.Store(incident, ref Unsafe.Add(ref answer, TLanes.Count));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static ComplexLanes<TLanes> Factor<TLanes>(in AmplitudeStep step, ref double rates)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes length = TLanes.Broadcast(step.ThicknessNm);
        rates = ref Unsafe.Add(ref rates, step.Rates);
        ComplexLanes<TLanes> turned = TLanes.Turn(TLanes.Load(in rates), length);
        return step.IsLossy ? TLanes.PowerOfTwo(TLanes.Load(in Unsafe.Add(ref rates, TLanes.Count)), length) * turned : turned;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static (ComplexLanes<TLanes> A, ComplexLanes<TLanes> B) Through<TLanes>(
        in ComplexLanes<TLanes> reflection, in ComplexLanes<TLanes> factor, in ComplexLanes<TLanes> a, in ComplexLanes<TLanes> b)
        where TLanes : struct, ILanes<TLanes>
        => (ComplexLanes<TLanes>.MultiplyAdd(reflection, b, a), ComplexLanes<TLanes>.MultiplyAdd(reflection, a, b) * factor);

    // |rho a + b|^2 and |a + rho b|^2.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static (TLanes Up, TLanes Incident) Norms<TLanes>(in ComplexLanes<TLanes> top, in ComplexLanes<TLanes> a, in ComplexLanes<TLanes> b)
        where TLanes : struct, ILanes<TLanes>
        => (ComplexLanes<TLanes>.MultiplyAdd(top, a, b).Norm, ComplexLanes<TLanes>.MultiplyAdd(top, b, a).Norm);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Keep<TLanes>(in AmplitudeRun run, int vector, double weight, ref double answer)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes reflectance = TLanes.Load(in answer), norm = TLanes.Load(in Unsafe.Add(ref answer, TLanes.Count));
        LaneBlock.Add(run.Reflectance, vector, 1, TLanes.Min(TLanes.Broadcast(weight) * reflectance, TLanes.Broadcast(1)));
        if (IsDoubtful(reflectance, norm, run.LeastNorm))
            run.Doubtful[vector] = true;
    }

    /// <summary>Whether a lane is not above the bound, or NaN.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static bool IsDoubtful<TLanes>(TLanes reflectance, TLanes norm, double leastNorm)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes isSound = TLanes.Select(TLanes.LessThan(TLanes.Broadcast(leastNorm), norm), reflectance, TLanes.Broadcast(-1));
        return TLanes.Any(TLanes.Select(TLanes.LessThan(TLanes.Broadcast(-0.5), isSound), TLanes.Broadcast(0), TLanes.LessThan(TLanes.Broadcast(0), TLanes.Broadcast(1))));
    }
}

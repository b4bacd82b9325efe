using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>The recursion of <see cref="AmplitudeKernel"/> for many stacks of the same media: factors come from nodes in thickness, two stacks go side by side.</summary>
internal static class EnsembleKernel
{
    /// <summary>Adds the reflectances of all stacks at one vector of wavelengths.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Solve<TLanes>(in EnsembleRun run, int vector, ref double faces)
        where TLanes : struct, ILanes<TLanes>
    {
        Span<double> answers = stackalloc double[4 * TLanes.Count];
        ref double answer = ref MemoryMarshal.GetReference(answers);
        int films = run.Steps.Length;
        for (int stack = 0; stack < run.Stacks; stack += 2)
        {
            // The last of an odd number goes beside itself.
            int other = Math.Min(stack + 1, run.Stacks - 1);
            ClimbTwo<TLanes>(
                run.Steps, ref faces, ref run.Nodes.Values[0], ref run.Nodes.Coefficients[0],
                run.Places.Slice(stack * films, films), run.Places.Slice(other * films, films), ref Unsafe.Add(ref faces, run.Top), ref answer);
            Keep<TLanes>(run, vector, stack, ref answer);
            if (other != stack)
                Keep<TLanes>(run, vector, other, ref Unsafe.Add(ref answer, 2 * TLanes.Count));
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void ClimbTwo<TLanes>(
        ReadOnlySpan<EnsembleStep> steps, ref double faces, ref double nodes, ref double coefficients, ReadOnlySpan<ThicknessPlace> one, ReadOnlySpan<ThicknessPlace> other,
        ref double top, ref double answer)
        where TLanes : struct, ILanes<TLanes>
    {
        ComplexLanes<TLanes> a = ComplexLanes<TLanes>.Broadcast(1), b = ComplexLanes<TLanes>.Broadcast(0);
        ComplexLanes<TLanes> c = ComplexLanes<TLanes>.Broadcast(1), d = ComplexLanes<TLanes>.Broadcast(0);
        int film = steps.Length - 1;
        ref EnsembleStep step = ref Unsafe.Add(ref MemoryMarshal.GetReference(steps), film);
        ref ThicknessPlace first = ref MemoryMarshal.GetReference(one), second = ref MemoryMarshal.GetReference(other);
        ref double power = ref Unsafe.Add(ref coefficients, step.Coefficients);
        ComplexLanes<TLanes> g = Factor<TLanes>(ref nodes, ref power, Unsafe.Add(ref first, film));
        ComplexLanes<TLanes> h = Factor<TLanes>(ref nodes, ref power, Unsafe.Add(ref second, film));
        while (true)
        {
            ComplexLanes<TLanes> reflection = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref faces, step.Face));
            (a, b) = AmplitudeKernel.Through(reflection, g, a, b);
            (c, d) = AmplitudeKernel.Through(reflection, h, c, d);
            if (--film < 0)
                break;
            step = ref Unsafe.Subtract(ref step, 1);
            power = ref Unsafe.Add(ref coefficients, step.Coefficients);
            g = Factor<TLanes>(ref nodes, ref power, Unsafe.Add(ref first, film));
            h = Factor<TLanes>(ref nodes, ref power, Unsafe.Add(ref second, film));
        }
        ComplexLanes<TLanes> rho = ComplexLanes<TLanes>.Load(ref top);
        Store(rho, a, b, ref answer);
        Store(rho, c, d, ref Unsafe.Add(ref answer, 2 * TLanes.Count));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Store<TLanes>(in ComplexLanes<TLanes> top, in ComplexLanes<TLanes> a, in ComplexLanes<TLanes> b, ref double answer)
        where TLanes : struct, ILanes<TLanes>
    {
        (TLanes up, TLanes incident) = AmplitudeKernel.Norms(top, a, b);
        TLanes.Store(up / incident, ref answer);
        TLanes.Store(incident, ref Unsafe.Add(ref answer, TLanes.Count));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static ComplexLanes<TLanes> Factor<TLanes>(ref double nodes, ref double power, in ThicknessPlace place)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes rest = TLanes.Broadcast(place.RestNm), one = TLanes.Broadcast(1);
        TLanes real = TLanes.Load(in power), imaginary = TLanes.Load(in Unsafe.Add(ref power, TLanes.Count));
        (real, imaginary) = Next(real, imaginary, rest, ref Unsafe.Add(ref power, ComplexLanes<TLanes>.Stride));
        (real, imaginary) = Next(real, imaginary, rest, ref Unsafe.Add(ref power, 2 * ComplexLanes<TLanes>.Stride));
        (real, imaginary) = Next(real, imaginary, rest, ref Unsafe.Add(ref power, 3 * ComplexLanes<TLanes>.Stride));
        (real, imaginary) = Next(real, imaginary, rest, ref Unsafe.Add(ref power, 4 * ComplexLanes<TLanes>.Stride));
        return new ComplexLanes<TLanes>(TLanes.MultiplyAdd(real, rest, one), imaginary * rest) * ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref nodes, place.Node));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (TLanes Real, TLanes Imaginary) Next<TLanes>(TLanes real, TLanes imaginary, TLanes rest, ref double power)
        where TLanes : struct, ILanes<TLanes>
        => (TLanes.MultiplyAdd(real, rest, TLanes.Load(in power)), TLanes.MultiplyAdd(imaginary, rest, TLanes.Load(in Unsafe.Add(ref power, TLanes.Count))));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Keep<TLanes>(in EnsembleRun run, int vector, int stack, ref double answer)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes reflectance = TLanes.Load(in answer), norm = TLanes.Load(in Unsafe.Add(ref answer, TLanes.Count));
        LaneBlock.Add(run.Reflectance.Slice(stack * run.Wavelengths, run.Wavelengths), vector, run.Weight, TLanes.Min(reflectance, TLanes.Broadcast(1)));
        if (AmplitudeKernel.IsDoubtful(reflectance, norm, run.LeastNorm))
            run.Doubtful[stack] = true;
    }
}

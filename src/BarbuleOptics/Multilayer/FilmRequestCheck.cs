using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer.Kernels;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>Checks of a call on a film solver, the same for every one of them.</summary>
internal static class FilmRequestCheck
{
    /// <summary>What is said of a workspace made for another stack.</summary>
    public const string TooSmall = "The workspace was made for a smaller stack.";

    // Squares of what lies between stay finite and above zero.
    private const double LeastPermittivity = 1e-100;
    private const double MostPermittivity = 1e100;

    /// <summary>Throws when the call cannot be answered.</summary>
    public static void Check(FilmStack stack, in SolverRequest request, FilmWorkspace workspace, in SolverResponse response)
    {
        ArgumentNullException.ThrowIfNull(stack);
        ArgumentNullException.ThrowIfNull(workspace);
        if (!workspace.Holds(stack))
            throw new ArgumentException(TooSmall, nameof(workspace));
        CheckCall(stack, request, response);
        CheckMedia(stack, request.First, request.Count);
    }

    /// <summary>Throws when the block, the direction, the polarization or a span cannot be answered.</summary>
    public static void CheckCall(FilmStack stack, in SolverRequest request, in SolverResponse response)
    {
        SolverRequestCheck.Check(request, stack.WavelengthsNm.Length, "stack");
        CheckResponse(stack, request, response);
    }

    /// <summary>Sets everything to zero that will be filled.</summary>
    public static void Clear(in SolverRequest request, in SolverResponse response)
    {
        response.Reflectance.Clear();
        response.DiffractedReflectance.Clear();
        response.FilmAbsorptance.Clear();
        if ((request.Outputs & SolverOutputs.Transmittance) != 0)
            response.Transmittance.Clear();
        if ((request.Outputs & SolverOutputs.Absorptance) != 0)
            response.Absorptance.Clear();
    }

    private static void CheckResponse(FilmStack stack, in SolverRequest request, in SolverResponse response)
    {
        SolverRequestCheck.CheckPowers(request, response);
        if (!response.FilmAbsorptance.IsEmpty)
            Guard.SameLength(checked(stack.FilmCount * request.Count), response.FilmAbsorptance.Length, nameof(response));
    }

    /// <summary>Throws when a permittivity of the block is not usable; a medium that was never filled is zero.</summary>
    public static void CheckMedia(FilmStack stack, int first, int count)
    {
        OpticalComponents media = stack.Media;
        int known = -1;
        foreach (int medium in stack.MediumOfFilm)
        {
            // Media mostly stand in the order of the films, and again in that order.
            if (medium <= known)
                continue;
            known = medium;
            CheckParts(media.XReal, media.XImaginary, medium);
            CheckParts(media.YReal, media.YImaginary, medium);
            CheckParts(media.ZReal, media.ZImaginary, medium);
        }
        for (int wavelength = first; wavelength < first + count; wavelength++)
        {
            if (!IsUsable(stack.Backing[wavelength].Real, stack.Backing[wavelength].Imaginary))
                throw new ArgumentException(Unusable("the backing", wavelength), nameof(stack));
            if (stack.Back is IncoherentBack back && !IsUsable(back.Behind[wavelength].Real, back.Behind[wavelength].Imaginary))
                throw new ArgumentException(Unusable("what lies behind the backing", wavelength), nameof(stack));
        }

        void CheckParts(double[] real, double[] imaginary, int medium)
        {
            int start = medium * media.WavelengthCount + first;
            if (count > 0 && LaneWidth.Default.Invoke<UsableParts, bool>(new UsableParts(real.AsSpan(start, count), imaginary.AsSpan(start, count))))
                return;
            for (int i = start; i < start + count; i++)
            {
                if (!IsUsable(real[i], imaginary[i]))
                    throw new ArgumentException(Unusable(FormattableString.Invariant($"medium {medium}"), first + i - start), nameof(stack));
            }
        }
    }

    private static bool IsUsable(double real, double imaginary)
        => Math.Max(Math.Abs(real), Math.Abs(imaginary)) is >= LeastPermittivity and <= MostPermittivity;

    // The same for many at once; permittivities are numbers, as what sets them sees to.
    private readonly ref struct UsableParts(ReadOnlySpan<double> real, ReadOnlySpan<double> imaginary) : ILaneAction<bool>
    {
        private readonly ReadOnlySpan<double> _real = real, _imaginary = imaginary;

        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        public bool Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            TLanes smallest = TLanes.Broadcast(1), largest = smallest;
            for (int vector = 0; vector < LaneBlock.Vectors(_real.Length, TLanes.Count); vector++)
            {
                TLanes size = TLanes.Max(TLanes.Abs(LaneBlock.Load<TLanes>(_real, vector)), TLanes.Abs(LaneBlock.Load<TLanes>(_imaginary, vector)));
                (smallest, largest) = (TLanes.Min(smallest, size), TLanes.Max(largest, size));
            }
            return !TLanes.Any(TLanes.LessThan(smallest, TLanes.Broadcast(LeastPermittivity))) && !TLanes.Any(TLanes.LessThan(TLanes.Broadcast(MostPermittivity), largest));
        }
    }

    private static string Unusable(string what, int wavelength)
        => FormattableString.Invariant($"The permittivity of {what} at wavelength {wavelength} is zero, not finite or beyond 1e-100 to 1e100.");
}

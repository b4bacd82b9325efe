using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>Reflectance, transmittance and absorptance by the recursion of tangential fields, vectors of wavelengths at a time.</summary>
/// <remarks>The same equations as the reference solver (<see cref="FilmStep"/>, <see cref="TangentialField"/>, <see cref="Entrance"/>), so that its error bound
/// holds here, too. Films that occur again are computed once. The sum of the losses climbs with the fields.</remarks>
internal sealed class FieldKernel
{
    // Between these the squares of squares that follow neither overflow nor lose digits.
    private const double Least = 1e-60, Most = 1e60;

    /// <summary>Media kept at hand; neighbors in depth seldom are more.</summary>
    private const int MediaAtHand = 8;

    /// <summary>Vectors solved together, and films whose steps are computed before they are passed: few enough to stay in the nearest cache.</summary>
    public const int Group = 8, Chunk = 4;

    // Places of the fields in memory, in vectors; phi comes first.
    private const int Psi = 2, Flux = 4, Lost = 5, Through = 6, K0 = 7, Surround = 8, StateValues = 9;

    private readonly LaneMemory _media;
    private readonly LaneMemory _state;
    private LaneMemory _steps = new(0);
    private readonly int[] _mediumAt = new int[MediaAtHand];
    private readonly bool[] _isLossy = new bool[MediaAtHand * Group];
    private bool[] _isKnown = [];

    /// <summary>A kernel for a vector width.</summary>
    public FieldKernel(int lanes)
    {
        _media = new LaneMemory(FieldMedium.Values * lanes * MediaAtHand * Group);
        _state = new LaneMemory(StateValues * lanes * Group);
    }

    /// <summary>Solves up to <see cref="Group"/> vectors of wavelengths in one polarization and adds what comes out.</summary>
    /// <param name="run">The call.</param>
    /// <param name="vectors">Their numbers.</param>
    /// <param name="isP">Whether it is p.</param>
    /// <param name="weight">Weight of what is added.</param>
    /// <param name="failed">Receives true for a vector where numbers left the range of this method; nothing is added there.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Solve<TLanes>(in FieldRun run, ReadOnlySpan<int> vectors, bool isP, double weight, Span<bool> failed)
        where TLanes : struct, ILanes<TLanes>
    {
        int count = TLanes.Count;
        if (_isKnown.Length < run.Films.DistinctCount)
        {
            // As many as differ, which in long stacks are far fewer than all.
            _isKnown = new bool[run.Films.DistinctCount];
            _steps = new LaneMemory(FieldStep.Values * count * Group * run.Films.DistinctCount);
        }
        for (int i = 0; i < vectors.Length; i++)
            Start<TLanes>(run, vectors[i], isP, ref _state[i * StateValues * count]);
        _mediumAt.AsSpan().Fill(-1);
        _isKnown.AsSpan(0, run.Films.DistinctCount).Clear();
        ReadOnlySpan<int> distinct = run.Films.Distinct;
        for (int end = distinct.Length; end > 0; end -= Math.Min(end, Chunk))
        {
            int from = Math.Max(0, end - Chunk);
            for (int film = from; film < end; film++)
                Prepare<TLanes>(run, vectors, isP, film);
            for (int i = 0; i < vectors.Length; i++)
                Climb<TLanes>(ref _steps[i * FieldStep.Values * count], distinct[from..end], ref _state[i * StateValues * count]);
        }
        for (int i = 0; i < vectors.Length; i++)
            failed[vectors[i]] |= !TryFinish<TLanes>(run, vectors[i], weight, ref _state[i * StateValues * count]);
    }

    // Wavelength after wavelength of a film, as its permittivities lie in memory.
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private void Prepare<TLanes>(in FieldRun run, ReadOnlySpan<int> vectors, bool isP, int film)
        where TLanes : struct, ILanes<TLanes>
    {
        int number = run.Films.Distinct[film], medium = run.Films.Medium[film], slot = medium % MediaAtHand, count = TLanes.Count;
        if (_isKnown[number])
            return;
        _isKnown[number] = true;
        TLanes thicknessNm = TLanes.Broadcast(run.Films.ThicknessNm[film]);
        // Media first and steps then: a step waits for its medium, and while it does the next medium is under way.
        if (_mediumAt[slot] != medium)
        {
            _mediumAt[slot] = medium;
            for (int i = 0; i < vectors.Length; i++)
                _isLossy[slot * Group + i] = FillMedium<TLanes>(run, vectors[i], isP, medium, ref _media[(slot * Group + i) * FieldMedium.Values * count]);
        }
        for (int i = 0; i < vectors.Length; i++)
        {
            TLanes thickness = Real<TLanes>(ref _state[i * StateValues * count], K0) * thicknessNm;
            FieldStep.Fill(
                ref _media[(slot * Group + i) * FieldMedium.Values * count], _isLossy[slot * Group + i], thickness, ref _steps[(number * Group + i) * FieldStep.Values * count]);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static bool FillMedium<TLanes>(in FieldRun run, int vector, bool isP, int medium, ref double place)
        where TLanes : struct, ILanes<TLanes>
    {
        var media = new MediaLanes<TLanes>(run.Stack, run.First, run.Count);
        var light = new LightLanes<TLanes>(media.SurroundIndex(vector), run.Sine, run.Cosine);
        return isP
            ? FieldMedium.FillP(light, media.X(medium, vector), media.Z(medium, vector), ref place)
            : FieldMedium.FillS(light, media.Y(medium, vector), ref place);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void Start<TLanes>(in FieldRun run, int vector, bool isP, ref double state)
        where TLanes : struct, ILanes<TLanes>
    {
        var media = new MediaLanes<TLanes>(run.Stack, run.First, run.Count);
        var light = new LightLanes<TLanes>(media.SurroundIndex(vector), run.Sine, run.Cosine);
        ComplexLanes<TLanes> backing = media.Backing(vector);
        ComplexLanes<TLanes> admittance = isP ? light.WaveP(backing, backing).Admittance : light.DepthS(backing);
        ComplexLanes<TLanes>.Store(ComplexLanes<TLanes>.Broadcast(1), ref state);
        ComplexLanes<TLanes>.Store(admittance, ref Unsafe.Add(ref state, Psi * TLanes.Count));
        TLanes.Store(admittance.Real, ref Unsafe.Add(ref state, Flux * TLanes.Count));
        TLanes.Store(admittance.Real, ref Unsafe.Add(ref state, Through * TLanes.Count));
        TLanes.Store(TLanes.Broadcast(0), ref Unsafe.Add(ref state, Lost * TLanes.Count));
        TLanes.Store(TLanes.Broadcast(2 * Math.PI) / media.WavelengthNm(vector), ref Unsafe.Add(ref state, K0 * TLanes.Count));
        TLanes.Store(isP ? light.SurroundP : light.SurroundS, ref Unsafe.Add(ref state, Surround * TLanes.Count));
    }

    // A loop that calls nothing, so that the fields stay in registers.
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static void Climb<TLanes>(ref double steps, ReadOnlySpan<int> distinct, ref double state)
        where TLanes : struct, ILanes<TLanes>
    {
        ComplexLanes<TLanes> phi = Complex<TLanes>(ref state, 0), psi = Complex<TLanes>(ref state, Psi);
        TLanes flux = Real<TLanes>(ref state, Flux), lost = Real<TLanes>(ref state, Lost), through = Real<TLanes>(ref state, Through);
        for (int film = distinct.Length - 1; film >= 0; film--)
        {
            ref double step = ref Unsafe.Add(ref steps, distinct[film] * Group * FieldStep.Values * TLanes.Count);
            ComplexLanes<TLanes> same = Complex<TLanes>(ref step, FieldStep.Same);
            ComplexLanes<TLanes> phiToPsi = Complex<TLanes>(ref step, FieldStep.PhiToPsi), psiToPhi = Complex<TLanes>(ref step, FieldStep.PsiToPhi);
            (phi, psi) = Half(same, phiToPsi, psiToPhi, phi, psi);
            TLanes phiNorm = phi.Norm, psiNorm = psi.Norm;
            (phi, psi) = Half(same, phiToPsi, psiToPhi, phi, psi);
            TLanes kept = Real<TLanes>(ref step, FieldStep.Kept);
            flux = Sum(kept, flux, Real<TLanes>(ref step, FieldStep.PhiEntering), phiNorm, Real<TLanes>(ref step, FieldStep.PsiEntering), psiNorm);
            lost = Sum(kept, lost, Real<TLanes>(ref step, FieldStep.PhiLost), phiNorm, Real<TLanes>(ref step, FieldStep.PsiLost), psiNorm);
            through = kept * through;
            TLanes size = phi.Norm + psi.Norm;
            if (TLanes.Any(TLanes.LessThan(size, TLanes.Broadcast(Least))) || TLanes.Any(TLanes.LessThan(TLanes.Broadcast(Most), size)))
            {
                TLanes squared = TLanes.Broadcast(1) / size, factor = TLanes.Sqrt(squared);
                (phi, psi) = (factor * phi, factor * psi);
                (flux, lost, through) = (squared * flux, squared * lost, squared * through);
            }
        }
        ComplexLanes<TLanes>.Store(phi, ref state);
        ComplexLanes<TLanes>.Store(psi, ref Unsafe.Add(ref state, Psi * TLanes.Count));
        TLanes.Store(flux, ref Unsafe.Add(ref state, Flux * TLanes.Count));
        TLanes.Store(lost, ref Unsafe.Add(ref state, Lost * TLanes.Count));
        TLanes.Store(through, ref Unsafe.Add(ref state, Through * TLanes.Count));
    }

    // What the surround's wave meets: see Entrance.
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static bool TryFinish<TLanes>(
        in FieldRun run, int vector, double weight, ref double state)
        where TLanes : struct, ILanes<TLanes>
    {
        ComplexLanes<TLanes> phi = Complex<TLanes>(ref state, 0), psi = Complex<TLanes>(ref state, Psi);
        TLanes flux = Real<TLanes>(ref state, Flux), lost = Real<TLanes>(ref state, Lost), through = Real<TLanes>(ref state, Through), eta = Real<TLanes>(ref state, Surround);
        TLanes zero = TLanes.Broadcast(0), one = TLanes.Broadcast(1);
        TLanes squared = eta * eta, phiNorm = phi.Norm, psiNorm = psi.Norm;
        TLanes reactive = TLanes.SubtractProduct(phi.Imaginary, psi.Real, phi.Real * psi.Imaginary);
        TLanes byImpedance = TLanes.LessThan(squared * phiNorm, psiNorm);
        ComplexLanes<TLanes> own = ComplexLanes<TLanes>.Select(
            byImpedance, new ComplexLanes<TLanes>(eta * flux, -eta * reactive), new ComplexLanes<TLanes>(eta * phiNorm, zero));
        ComplexLanes<TLanes> met = ComplexLanes<TLanes>.Select(byImpedance, new ComplexLanes<TLanes>(psiNorm, zero), new ComplexLanes<TLanes>(flux, reactive));
        TLanes inverse = one / (own + met).Norm;
        // Fields have a unit wave's size when multiplied by the root of this; powers are counted in those of the incident wave.
        TLanes unit = TLanes.Broadcast(4) * eta * TLanes.Select(byImpedance, psiNorm, phiNorm) * inverse;
        TLanes reflected = TLanes.Min(one, (own - met).Norm * inverse), absorbed = unit * lost, transmitted = unit * through;
        TLanes sum = reflected + absorbed + transmitted;
        // Where this is not 1, NaN included, a number has left its range.
        if (TLanes.Any(TLanes.Select(TLanes.LessThan(TLanes.Abs(sum - one), TLanes.Broadcast(run.MostImbalance)), zero, TLanes.LessThan(zero, one))))
            return false;
        LaneBlock.Add(run.Reflectance, vector, weight, reflected);
        if (!run.Transmittance.IsEmpty)
            LaneBlock.Add(run.Transmittance, vector, weight, TLanes.Min(one, transmitted));
        if (!run.Absorptance.IsEmpty)
            LaneBlock.Add(run.Absorptance, vector, weight, TLanes.Min(one, absorbed));
        return true;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (ComplexLanes<TLanes> Phi, ComplexLanes<TLanes> Psi) Half<TLanes>(
        in ComplexLanes<TLanes> same, in ComplexLanes<TLanes> phiToPsi, in ComplexLanes<TLanes> psiToPhi, in ComplexLanes<TLanes> phi, in ComplexLanes<TLanes> psi)
        where TLanes : struct, ILanes<TLanes>
        => (ComplexLanes<TLanes>.MultiplyAdd(psiToPhi, psi, same * phi), ComplexLanes<TLanes>.MultiplyAdd(phiToPsi, phi, same * psi));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static TLanes Sum<TLanes>(TLanes kept, TLanes before, TLanes phi, TLanes phiNorm, TLanes psi, TLanes psiNorm)
        where TLanes : struct, ILanes<TLanes>
        => TLanes.MultiplyAdd(kept, before, TLanes.MultiplyAdd(phi, phiNorm, psi * psiNorm));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static ComplexLanes<TLanes> Complex<TLanes>(ref double step, int at)
        where TLanes : struct, ILanes<TLanes>
        => ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref step, at * TLanes.Count));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static TLanes Real<TLanes>(ref double step, int at)
        where TLanes : struct, ILanes<TLanes>
        => TLanes.Load(in Unsafe.Add(ref step, at * TLanes.Count));
}

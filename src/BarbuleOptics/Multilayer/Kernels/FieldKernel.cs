using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>Reflectance, transmittance and absorptance by the recursion of tangential fields, a vector of wavelengths at a time.</summary>
/// <remarks>The same equations as the reference solver (<see cref="FilmStep"/>, <see cref="TangentialField"/>, <see cref="Entrance"/>), so that its error bound
/// holds here, too. Films that occur again are computed once. The sum of the losses climbs with the fields.</remarks>
internal sealed class FieldKernel
{
    // Between these the squares of squares that follow neither overflow nor lose digits.
    private const double Least = 1e-60, Most = 1e60;

    /// <summary>Media kept at hand; neighbors in depth seldom are more.</summary>
    private const int MediaAtHand = 8;

    private readonly LaneMemory _media;
    private readonly LaneMemory _steps;
    private readonly int[] _mediumAt = new int[MediaAtHand];
    private readonly bool[] _isLossy = new bool[MediaAtHand];
    private readonly bool[] _isKnown;

    /// <summary>Room for a number of films at a vector width.</summary>
    public FieldKernel(int films, int lanes)
    {
        _media = new LaneMemory(FieldMedium.Values * lanes * MediaAtHand);
        _steps = new LaneMemory(FieldStep.Values * lanes * films);
        _isKnown = new bool[films];
    }

    /// <summary>Solves one vector of wavelengths in one polarization and adds what comes out.</summary>
    /// <returns>False where numbers left the range of this method; nothing is added then.</returns>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public bool TrySolve<TLanes>(in FieldRun run, int vector, bool isP, double weight)
        where TLanes : struct, ILanes<TLanes>
    {
        var media = new MediaLanes<TLanes>(run.Stack, run.First, run.Count);
        TLanes index = media.SurroundIndex(vector), wavelengthNm = media.WavelengthNm(vector);
        var light = new LightLanes<TLanes>(index, run.Sine, run.Cosine);
        TLanes k0 = TLanes.Broadcast(2 * Math.PI) / wavelengthNm, inverseK0 = TLanes.Broadcast(0.5 / Math.PI) * wavelengthNm;
        ComplexLanes<TLanes> backing = media.Backing(vector);
        ComplexLanes<TLanes> phi = ComplexLanes<TLanes>.Broadcast(1), psi = isP ? light.WaveP(backing, backing).Admittance : light.DepthS(backing);
        TLanes flux = psi.Real, through = psi.Real, lost = TLanes.Broadcast(0);
        _mediumAt.AsSpan().Fill(-1);
        _isKnown.AsSpan(0, run.Films.DistinctCount).Clear();

        ref double steps = ref _steps[0];
        ReadOnlySpan<int> distinct = run.Films.Distinct;
        for (int film = distinct.Length - 1; film >= 0; film--)
        {
            ref double step = ref Unsafe.Add(ref steps, distinct[film] * FieldStep.Values * TLanes.Count);
            if (!_isKnown[distinct[film]])
            {
                _isKnown[distinct[film]] = true;
                double thicknessNm = run.Films.ThicknessNm[film];
                ref double medium = ref MediumAt(light, media, vector, isP, run.Films.Medium[film], out bool isLossy);
                FieldStep.Fill(ref medium, isLossy, k0 * TLanes.Broadcast(thicknessNm), inverseK0 * TLanes.Broadcast(1 / thicknessNm), ref step);
            }
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
        return TryFinish(run, vector, weight, isP ? light.SurroundP : light.SurroundS, phi, psi, flux, lost, through);
    }

    // What the surround's wave meets: see Entrance.
    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private static bool TryFinish<TLanes>(
        in FieldRun run, int vector, double weight, TLanes eta, in ComplexLanes<TLanes> phi, in ComplexLanes<TLanes> psi, TLanes flux, TLanes lost, TLanes through)
        where TLanes : struct, ILanes<TLanes>
    {
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

    [MethodImpl(MethodImplOptions.AggressiveOptimization | MethodImplOptions.NoInlining)]
    private ref double MediumAt<TLanes>(in LightLanes<TLanes> light, in MediaLanes<TLanes> media, int vector, bool isP, int medium, out bool isLossy)
        where TLanes : struct, ILanes<TLanes>
    {
        int slot = medium % MediaAtHand;
        ref double place = ref _media[slot * FieldMedium.Values * TLanes.Count];
        if (_mediumAt[slot] != medium)
        {
            _mediumAt[slot] = medium;
            _isLossy[slot] = FieldMedium.Fill(light, isP, media.X(medium, vector), media.Y(medium, vector), media.Z(medium, vector), ref place);
        }
        isLossy = _isLossy[slot];
        return ref place;
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

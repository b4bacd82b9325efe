using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>Answers of one round rod, solid or with a concentric core, at the wavelengths of a pack, for both fields along the rods without a wave
/// vector along them; the formulas are those of <see cref="RodScatterer"/>.</summary>
/// <remarks>Kept are 1/(e_m b/a), e_0 = 1, else 2, since the equations of a row are symmetric in that form; an answer of zero, of a rod that is
/// not there, stands as 1e-30. Then the power into the rod and into its core, times the period, for an outgoing amplitude of one.</remarks>
internal sealed class RodLanes<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    private const double LeastAnswer = 1e-30;

    private readonly double _radiusNm;
    private readonly double _coreRadiusNm;
    private readonly int _material;
    private readonly int _coreMaterial;
    private readonly LaneBuffer<TLanes> _inverse = new();
    private readonly LaneBuffer<TLanes> _powers = new();
    private PackLanes<TLanes>? _pack;
    private int _version;
    private int _top = -1;

    /// <summary>A rod.</summary>
    /// <param name="radiusNm">Its radius, in nm.</param>
    /// <param name="coreRadiusNm">Radius of its core, in nm; 0 for a solid rod.</param>
    /// <param name="material">Number of its material.</param>
    /// <param name="coreMaterial">Number of its core's material.</param>
    public RodLanes(double radiusNm, double coreRadiusNm, int material, int coreMaterial)
        => (_radiusNm, _coreRadiusNm, _material, _coreMaterial) = (radiusNm, coreRadiusNm, material, coreMaterial);

    /// <summary>1/(e_m b/a) of multipole m.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> Inverse(RodField field, int m) => _inverse[(int)field * (_top + 1) + m];

    /// <summary>Power into the rod per |b|^2 of multipole m.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public TLanes Power(RodField field, int m) => _powers.Real(2 * ((int)field * (_top + 1) + m));

    /// <summary>Power into its core.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public TLanes CorePower(RodField field, int m) => _powers.Real(2 * ((int)field * (_top + 1) + m) + 1);

    private bool HasCore => _coreRadiusNm > 0;

    /// <summary>Makes multipoles 0 to <paramref name="top"/> ready.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Prepare(PackLanes<TLanes> pack, int top, RodTables<TLanes> tables)
    {
        if (ReferenceEquals(pack, _pack) && pack.Version == _version && top <= _top && CylinderLanes<TLanes>.RoomFor(top) == CylinderLanes<TLanes>.RoomFor(_top))
            return;
        (_pack, _version, _top) = (pack, pack.Version, top);
        _inverse.Reserve(2 * (top + 1));
        _powers.Reserve(2 * (top + 1));
        ComplexLanes<TLanes> matrix = pack.WaveNumber(Layering.Section.Matrix), rod = pack.WaveNumber(_material), core = pack.WaveNumber(_coreMaterial);
        tables.Outside.Set(TLanes.Broadcast(_radiusNm) * matrix, top, hasOutgoing: true);
        tables.Rod.Set(TLanes.Broadcast(_radiusNm) * rod, top, HasCore);
        TLanes carried = TLanes.Broadcast(1);
        if (HasCore)
        {
            tables.Core.Set(TLanes.Broadcast(_coreRadiusNm) * core, top, hasOutgoing: false);
            tables.RodAtCore.Set(TLanes.Broadcast(_coreRadiusNm) * rod, top, hasOutgoing: true);
            carried = TLanes.Exp(TLanes.Broadcast(_coreRadiusNm - _radiusNm) * rod.Imaginary);
        }
        // The tables of the matrix hold J exp(-Im z) and H exp(Im z); amplitudes are to go without.
        TLanes growth = TLanes.Exp(TLanes.Broadcast(_radiusNm) * matrix.Imaginary);
        ComplexLanes<TLanes> one = ComplexLanes<TLanes>.Broadcast(1);
        ComplexLanes<TLanes> byMatrix = pack.Permittivity(Layering.Section.Matrix).Reciprocal();
        ComplexLanes<TLanes> byRod = pack.Permittivity(_material).Reciprocal(), byCore = pack.Permittivity(_coreMaterial).Reciprocal();
        for (int m = 0; m <= top; m++)
        {
            Match(tables, RodField.Electric, m, one, one, one, carried, growth);
            Match(tables, RodField.Magnetic, m, byMatrix, byRod, byCore, carried, growth);
            carried *= TLanes.Broadcast(HasCore ? _coreRadiusNm / _radiusNm : 1);
        }
    }

    // Fluxes are slopes times 1 or 1/e.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Match(
        RodTables<TLanes> tables, RodField which, int m, ComplexLanes<TLanes> matrix, ComplexLanes<TLanes> rod, ComplexLanes<TLanes> core,
        TLanes carried, TLanes growth)
    {
        ComplexLanes<TLanes> field = tables.Rod.J(m), flux = rod * tables.Rod.JSlope(m), coreField = default, coreFlux = default;
        if (HasCore)
        {
            coreField = tables.Core.J(m);
            coreFlux = core * tables.Core.JSlope(m);
            ComplexLanes<TLanes> j = tables.RodAtCore.J(m), jFlux = rod * tables.RodAtCore.JSlope(m);
            ComplexLanes<TLanes> h = tables.RodAtCore.H(m), hFlux = rod * tables.RodAtCore.HSlope(m);
            ComplexLanes<TLanes> inner = carried * (h * coreFlux - hFlux * coreField).Reciprocal();
            ComplexLanes<TLanes> back = carried * (inner * (jFlux * coreField - j * coreFlux));
            field += back * tables.Rod.H(m);
            flux += back * (rod * tables.Rod.HSlope(m));
            inner = inner * (TLanes.Broadcast(-2 / Math.PI) * rod.TimesI);
            coreField *= inner;
            coreFlux *= inner;
        }
        ComplexLanes<TLanes> outside = tables.Outside.H(m), outsideFlux = matrix * tables.Outside.HSlope(m);
        ComplexLanes<TLanes> resists = outside * flux - outsideFlux * field;
        ComplexLanes<TLanes> answers = matrix * tables.Outside.JSlope(m) * field - tables.Outside.J(m) * flux;
        TLanes twice = TLanes.Broadcast(m == 0 ? 1 : 2), square = growth * growth;
        answers = twice * square * answers;
        TLanes least = TLanes.Broadcast(LeastAnswer * LeastAnswer);
        answers = ComplexLanes<TLanes>.Select(TLanes.LessThan(answers.Norm, least * resists.Norm), TLanes.Broadcast(LeastAnswer) * resists, answers);
        ComplexLanes<TLanes> inverse = answers.Reciprocal();
        int place = (int)which * (_top + 1) + m;
        _inverse[place] = resists * inverse;
        // An amplitude a makes drive a/resists of the fields above, and b = answers/(resists e_m) a.
        TLanes drive = TLanes.Broadcast(4 / (Math.PI * Math.PI)) * matrix.Norm * square * twice * twice * inverse.Norm;
        TLanes share = TLanes.Broadcast((m == 0 ? -2 : -1) * Math.PI) * drive;
        _powers.SetReal(2 * place, share * (field.Conjugate * flux).Imaginary);
        _powers.SetReal(2 * place + 1, share * (coreField.Conjugate * coreFlux).Imaginary);
    }
}

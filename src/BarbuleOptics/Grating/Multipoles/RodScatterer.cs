using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>How one round rod, solid or with a concentric core, answers the multipoles that fall on it. It depends on the wavelength and
/// on ky, not on the direction across the rods or the period, and is kept until one of these changes.</summary>
/// <remarks>
/// In the matrix Ey = sum i^m (a_m J_m(kr) + b_m H_m(kr)) cos(m theta) and so on; with s = |k| radius/2, amplitudes are held as
/// a_m s^m/m! and b_m m!/s^m, so that they stay near one for thin rods and high orders. b = Answer a for Ey along cos and Hy along sin.
/// From the core outward, at each circle the fields inside are matched to J and H outside: with inner fields Phi alpha and fluxes F alpha,
/// alpha = (F - Y Phi)^-1 w/h a, b = (Phi alpha - j a)/h, Y the flux of H per field H and w = -2 i/pi times (A, B), the Wronskian.
/// H has no zeros for Im z >= 0, and only decaying factors carry amplitudes from the core's circle to the rod's.
/// Source: Bohren and Huffman, Absorption and Scattering of Light by Small Particles, section 8.4, for the solid rod (from memory).
/// </remarks>
internal sealed class RodScatterer(double radiusNm, double coreRadiusNm, int material, int coreMaterial) : IRowBody
{
    private static readonly Complex Wronskian = new(0, -2 / Math.PI);

    private readonly CylinderFunctions _outside = new();
    private readonly CylinderFunctions _rod = new();
    private readonly CylinderFunctions _rodAtCore = new();
    private readonly CylinderFunctions _core = new();
    // By multipole, from incoming amplitudes: outgoing ones, then field and flux r f on the rod's circle and on the core's.
    private FieldPair[] _answer = [];
    private FieldPair[] _field = [];
    private FieldPair[] _flux = [];
    private FieldPair[] _coreField = [];
    private FieldPair[] _coreFlux = [];
    private Complex _matrixPermittivity, _rodPermittivity, _corePermittivity;
    private double _k0 = double.NaN, _ky;
    private int _top = -1;

    private bool HasCore => coreRadiusNm > 0;

    /// <inheritdoc/>
    public double RadiusNm => radiusNm;

    /// <inheritdoc/>
    public bool IsRound => true;

    /// <inheritdoc/>
    public double LeastPlaneNm => 0;

    /// <inheritdoc/>
    /// <remarks>The answer of a round rod falls like (radius/P)^(2m), whatever comes in: what is left out is as small.</remarks>
    public int MultipolesFor(double kx) => 0;

    /// <inheritdoc/>
    public bool TryPrepare(GratingWaves waves, int top)
    {
        Complex rod = waves.Permittivities[material];
        Complex core = HasCore ? waves.Permittivities[coreMaterial] : rod;
        bool same = _k0 == waves.K0 && _ky == waves.Ky && _matrixPermittivity == waves.Matrix && _rodPermittivity == rod && _corePermittivity == core;
        if (same && top <= _top)
            return true;
        (_k0, _ky, _matrixPermittivity, _rodPermittivity, _corePermittivity, _top) = (waves.K0, waves.Ky, waves.Matrix, rod, core, top);
        if (_answer.Length <= top)
        {
            _answer = new FieldPair[top + 1];
            _field = new FieldPair[top + 1];
            _flux = new FieldPair[top + 1];
            _coreField = new FieldPair[top + 1];
            _coreFlux = new FieldPair[top + 1];
        }
        Match(waves);
        return true;
    }

    /// <inheritdoc/>
    public Complex Answer(int to, int from, bool electricEven, int outgoing, int incoming)
    {
        if (outgoing != incoming)
            return Complex.Zero;
        FieldPair pair = _answer[incoming];
        if (to == from)
            return to == 0 ? pair.EE : pair.HH;
        // Turning the sign of one field exchanges the two halves.
        Complex cross = to == 0 ? pair.EH : pair.HE;
        return electricEven ? cross : -cross;
    }

    /// <inheritdoc/>
    public (double Body, double Core) PowerInto(GratingWaves waves, MirrorHalf half, int number)
    {
        ReadOnlySpan<Complex> incoming = half.Incoming(number);
        double body = 0, core = 0;
        for (int m = 0; m <= half.Top; m++)
        {
            Complex electric = Complex.Zero, magnetic = Complex.Zero;
            foreach (MirrorHalf.Part part in half.Parts)
            {
                if (m < part.Least)
                    continue;
                if (part.Field == 0)
                    electric = incoming[part.Start + m];
                else
                    magnetic = half.ElectricEven ? incoming[part.Start + m] : -incoming[part.Start + m];
            }
            double share = (m == 0 ? 2 : 1) * Math.PI;
            body -= share * Outward(_field[m], _flux[m], electric, magnetic);
            if (HasCore)
                core -= share * Outward(_coreField[m], _coreFlux[m], electric, magnetic);
        }
        return (body, core);
    }

    private static double Outward(in FieldPair field, in FieldPair flux, Complex electric, Complex magnetic)
    {
        Complex e = field.EE * electric + field.EH * magnetic, h = field.HE * electric + field.HH * magnetic;
        Complex eFlux = flux.EE * electric + flux.EH * magnetic, hFlux = flux.HE * electric + flux.HH * magnetic;
        return (Complex.Conjugate(e) * eFlux + Complex.Conjugate(h) * hFlux).Imaginary;
    }

    private void Match(GratingWaves waves)
    {
        Complex kMatrix = LatticeSums.WaveNumber(waves, _matrixPermittivity), kRod = LatticeSums.WaveNumber(waves, _rodPermittivity);
        RodMedium matrix = RodMedium.Of(waves, _matrixPermittivity, kMatrix), rod = RodMedium.Of(waves, _rodPermittivity, kRod);
        RodMedium core = rod;
        _outside.Set(kMatrix * radiusNm, _top);
        double carried = 1;
        if (HasCore)
        {
            Complex kCore = LatticeSums.WaveNumber(waves, _corePermittivity);
            core = RodMedium.Of(waves, _corePermittivity, kCore);
            _core.SetRegular(kCore * coreRadiusNm, _top);
            _rodAtCore.Set(kRod * coreRadiusNm, _top);
            _rod.Set(kRod * radiusNm, _top);
            carried = Math.Exp(-kRod.Imaginary * (radiusNm - coreRadiusNm));
        }
        else
        {
            _rod.SetRegular(kRod * radiusNm, _top);
        }
        // The tables of the matrix hold J exp(-Im z) and H exp(Im z); amplitudes are to go without.
        double growth = Math.Exp(_outside.Argument.Imaginary);
        for (int m = 0; m <= _top; m++)
        {
            if (waves.Ky == 0)
                MatchPlanar(m, matrix, rod, core, carried, growth);
            else
                MatchConical(m, matrix, rod, core, carried, growth);
            carried *= HasCore ? coreRadiusNm / radiusNm : 1;
        }
    }

    private void MatchConical(int m, in RodMedium matrix, in RodMedium rod, in RodMedium core, double carried, double growth)
    {
        FieldPair field, flux, coreField = default, coreFlux = default, coreAmplitude = default;
        if (HasCore)
        {
            coreField = FieldPair.Diagonal(_core.J[m], _core.J[m]);
            coreFlux = core.Flux(m, _core.J[m], _core.JSlope[m]);
            (FieldPair back, coreAmplitude) = Circle(coreField, coreFlux, rod, m, _rodAtCore);
            back = carried * carried * back;
            field = FieldPair.Diagonal(_rod.J[m], _rod.J[m]) + _rod.H[m] * back;
            flux = rod.Flux(m, _rod.J[m], _rod.JSlope[m]) + rod.Flux(m, _rod.H[m], _rod.HSlope[m]) * back;
        }
        else
        {
            field = FieldPair.Diagonal(_rod.J[m], _rod.J[m]);
            flux = rod.Flux(m, _rod.J[m], _rod.JSlope[m]);
        }
        (FieldPair answer, FieldPair amplitude) = Circle(field, flux, matrix, m, _outside);
        amplitude = growth * amplitude;
        _answer[m] = growth * growth * answer;
        _field[m] = field * amplitude;
        _flux[m] = flux * amplitude;
        if (HasCore)
        {
            coreAmplitude = coreAmplitude * (carried * amplitude);
            _coreField[m] = coreField * coreAmplitude;
            _coreFlux[m] = coreFlux * coreAmplitude;
        }
    }

    // Outgoing amplitude outside and amplitude inside, per incoming amplitude outside.
    private static (FieldPair Answer, FieldPair Amplitude) Circle(
        in FieldPair field, in FieldPair flux, in RodMedium outside, int m, CylinderFunctions functions)
    {
        Complex inverse = 1 / functions.H[m];
        FieldPair admittance = inverse * outside.Flux(m, functions.H[m], functions.HSlope[m]);
        FieldPair mismatch = flux - admittance * field;
        Complex drive = Wronskian * inverse;
        FieldPair amplitude = mismatch.Inverse() * FieldPair.Diagonal(outside.A * drive, outside.B * drive);
        FieldPair answer = inverse * (field * amplitude - FieldPair.Diagonal(functions.J[m], functions.J[m]));
        return (answer, amplitude);
    }

    private void MatchPlanar(int m, in RodMedium matrix, in RodMedium rod, in RodMedium core, double carried, double growth)
    {
        PlanarCircles electric = MatchField(m, Complex.One, Complex.One, Complex.One, carried);
        PlanarCircles magnetic = MatchField(m, matrix.B, rod.B, core.B, carried);
        _answer[m] = FieldPair.Diagonal(growth * growth * electric.Answer, growth * growth * magnetic.Answer);
        _field[m] = FieldPair.Diagonal(growth * electric.Field, growth * magnetic.Field);
        _flux[m] = FieldPair.Diagonal(growth * electric.Flux, growth * magnetic.Flux);
        _coreField[m] = FieldPair.Diagonal(growth * electric.CoreField, growth * magnetic.CoreField);
        _coreFlux[m] = FieldPair.Diagonal(growth * electric.CoreFlux, growth * magnetic.CoreFlux);
    }

    private readonly record struct PlanarCircles(Complex Answer, Complex Field, Complex Flux, Complex CoreField, Complex CoreFlux);

    // One field alone; its flux is its slope times 1 or times 1/e.
    private PlanarCircles MatchField(int m, Complex matrix, Complex rod, Complex core, double carried)
    {
        Complex field = _rod.J[m], flux = rod * _rod.JSlope[m];
        Complex coreField = Complex.Zero, coreFlux = Complex.Zero;
        if (HasCore)
        {
            coreField = _core.J[m];
            coreFlux = core * _core.JSlope[m];
            Complex j = _rodAtCore.J[m], jFlux = rod * _rodAtCore.JSlope[m], h = _rodAtCore.H[m], hFlux = rod * _rodAtCore.HSlope[m];
            Complex inner = carried / (h * coreFlux - hFlux * coreField);
            Complex back = carried * inner * (jFlux * coreField - j * coreFlux);
            field += back * _rod.H[m];
            flux += back * (rod * _rod.HSlope[m]);
            inner *= Wronskian * rod;
            coreField *= inner;
            coreFlux *= inner;
        }
        Complex outside = _outside.H[m], outsideFlux = matrix * _outside.HSlope[m];
        Complex scale = 1 / (outside * flux - outsideFlux * field);
        Complex answer = scale * (matrix * _outside.JSlope[m] * field - _outside.J[m] * flux);
        Complex amplitude = scale * Wronskian * matrix;
        return new PlanarCircles(answer, field * amplitude, flux * amplitude, coreField * amplitude, coreFlux * amplitude);
    }
}

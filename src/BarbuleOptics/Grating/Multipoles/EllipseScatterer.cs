using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>How a body with elliptical outline, and a concentric elliptical core if it has one, answers the multipoles that fall on it.</summary>
/// <remarks>
/// By fundamental solutions: line sources on a confocal ellipse inside each outline stand for the field outside it, sources outside for the
/// field inside; their strengths make both fields and both normal fluxes continuous at points of the outline, in the sense of least
/// squares. What a source sends out has multipoles in closed form. The four symmetries about the axes are solved apart.
/// The misfit falls exponentially with the number of sources, which is raised until it is below <see cref="MisfitWanted"/>.
/// Needs more sources the flatter the body: an aspect of 10 is solved, one of 80 refused. Takes milliseconds a wavelength and field (with both fields
/// three to five times as many), nothing for another direction.
/// Source: Fairweather and Karageorghis, Adv. Comput. Math. 9 (1998) 69 (from memory); the symmetry and the multipoles are our own.
/// </remarks>
internal sealed class EllipseScatterer : IRowBody
{
    /// <summary>Misfit on the outlines, relative to the incoming wave, at which no more sources are added. What the row sends out is then right
    /// to about 1e-8: its error is of second order in the misfit of waves that matter.</summary>
    public const double MisfitWanted = 1e-5;

    /// <summary>Misfit above which the body counts as not solved.</summary>
    private const double MisfitAllowed = 1e-3;

    private const int MostSources = 64;

    private readonly EllipseOutline _outline;
    private readonly EllipseOutline _core;
    private readonly int _material;
    private readonly int _coreMaterial;
    private readonly int _leastSources;
    private readonly ComplexMatrix[] _answers = new ComplexMatrix[8];
    private readonly bool[] _known = new bool[3];
    private readonly EllipseSolution?[] _solutions = new EllipseSolution?[12];
    private EllipseSystem? _system;
    private bool _isPrepared;
    private Complex _matrixPermittivity, _bodyPermittivity, _corePermittivity;
    private double _k0 = double.NaN, _ky;
    private int _top = -1;

    /// <summary>A body.</summary>
    /// <param name="outline">Its outline.</param>
    /// <param name="core">The core's outline; of no width without a core.</param>
    /// <param name="material">Number of its material.</param>
    /// <param name="coreMaterial">Number of its core's material.</param>
    /// <param name="leastSources">Sources on a quarter of each outline to begin with: as many as were enough at a neighboring wavelength.</param>
    public EllipseScatterer(EllipseOutline outline, EllipseOutline core, int material, int coreMaterial, int leastSources = 0)
        => (_outline, _core, _material, _coreMaterial, _leastSources) = (outline, core, material, coreMaterial, leastSources);

    /// <inheritdoc/>
    public double RadiusNm => Math.Max(_outline.HalfWidthNm, _outline.HalfHeightNm);

    /// <inheritdoc/>
    public bool IsRound => false;

    /// <inheritdoc/>
    public double LeastPlaneNm => _outline.HalfHeightNm > _outline.HalfWidthNm
        ? Math.Sqrt(_outline.HalfHeightNm * _outline.HalfHeightNm - _outline.HalfWidthNm * _outline.HalfWidthNm)
        : 0;

    /// <inheritdoc/>
    /// <remarks>On a flat body the multipoles of a fast wave cancel down to what it is there, which is far less than they are at the circle
    /// round the body: an incomplete sum is worse than none. Measured: 2.2 kx times the radius is enough for 1e-7.</remarks>
    public int MultipolesFor(double kx) => (int)Math.Ceiling(2.2 * Math.Abs(kx) * RadiusNm);

    /// <summary>The largest misfit on an outline of the last solution, relative to the incoming multipole.</summary>
    public double Misfit { get; private set; }

    /// <summary>Sources on a quarter of an outline in the last solution.</summary>
    public int SourceCount => _system?.SourceCount ?? 0;

    private bool HasCore => _core.HalfWidthNm > 0;

    /// <inheritdoc/>
    public bool TryPrepare(GratingWaves waves, int top)
    {
        Complex body = waves.Permittivities[_material], core = HasCore ? waves.Permittivities[_coreMaterial] : body;
        bool same = _k0 == waves.K0 && _ky == waves.Ky && _matrixPermittivity == waves.Matrix && _bodyPermittivity == body && _corePermittivity == core;
        if (!same || top > _top)
        {
            Array.Clear(_known);
            _isPrepared = false;
            (_k0, _ky, _matrixPermittivity, _bodyPermittivity, _corePermittivity, _top) = (waves.K0, waves.Ky, waves.Matrix, body, core, top);
        }
        else if (_known[(int)waves.Field])
        {
            return true;
        }
        return TrySolve(waves);
    }

    private bool TrySolve(GratingWaves waves)
    {
        int field = (int)waves.Field;
        Misfit = double.PositiveInfinity;
        int count = Math.Max(_system?.SourceCount ?? _leastSources, EllipseSystem.SourcesFor(_outline, _core, _top));
        for (; count <= MostSources; count += 1 + count / 4)
        {
            if (_system is null || _system.SourceCount != count || _system.Top < _top)
            {
                _system = new EllipseSystem(_outline, _core, _material, _coreMaterial, count, _top);
                _isPrepared = false;
                Array.Clear(_known);
            }
            if (!_isPrepared)
                _system.Prepare(waves);
            _isPrepared = true;
            if (TrySolveAll(waves) && Misfit < MisfitWanted)
                break;
        }
        _known[field] = Misfit < MisfitAllowed;
        if (_known[field])
            StoreAnswers(field);
        return _known[field];
    }

    private bool TrySolveAll(GratingWaves waves)
    {
        Misfit = 0;
        for (int i = 0; i < 4; i++)
        {
            EllipseSolution? solution = _system!.Solve(waves, i < 2, i % 2);
            _solutions[4 * (int)waves.Field + i] = solution;
            Misfit = Math.Max(Misfit, solution?.Misfit ?? double.PositiveInfinity);
        }
        return double.IsFinite(Misfit);
    }

    private void StoreAnswers(int field)
    {
        for (int i = 0; i < 4; i++)
        {
            EllipseSolution solution = _solutions[4 * field + i]!;
            for (int c = 0; c < solution.Columns.Length; c++)
            {
                foreach ((int to, int m) in solution.Columns)
                {
                    int place = Place(to, solution.Columns[c].Field, i < 2);
                    if (_answers[place] is null || _answers[place].Rows <= _top)
                        _answers[place] = new ComplexMatrix(_top + 1, _top + 1);
                    _answers[place][m, solution.Columns[c].Multipole] = _system!.Sent(solution, c, to, m, i < 2);
                }
            }
        }
    }

    /// <inheritdoc/>
    public Complex Answer(int to, int from, bool electricEven, int outgoing, int incoming) => _answers[Place(to, from, electricEven)][outgoing, incoming];

    private static int Place(int to, int from, bool electricEven) => (electricEven ? 0 : 4) + 2 * to + from;

    /// <inheritdoc/>
    public (double Body, double Core) PowerInto(GratingWaves waves, MirrorHalf half, int number)
    {
        bool matrixAbsorbs = waves.Matrix.Imaginary != 0 || waves.MatrixAcross.Real <= 0;
        double body = matrixAbsorbs ? FromOutline(waves, half, number, 0) : FromAmplitudes(waves, half, number);
        double core = HasCore && waves.Permittivities[_coreMaterial].Imaginary != 0 ? FromOutline(waves, half, number, 1) : 0;
        return (body, core);
    }

    private double FromOutline(GratingWaves waves, MirrorHalf half, int number, int outline)
    {
        ReadOnlySpan<Complex> incoming = half.Incoming(number);
        double sum = 0;
        for (int parity = 0; parity < 2; parity++)
        {
            EllipseSolution solution = _solutions[4 * (int)waves.Field + (half.ElectricEven ? 0 : 2) + parity]!;
            var amplitudes = new Complex[solution.Columns.Length];
            for (int c = 0; c < amplitudes.Length; c++)
            {
                (int field, int m) = solution.Columns[c];
                foreach (MirrorHalf.Part part in half.Parts)
                {
                    if (part.Field == field && m <= half.Top)
                        amplitudes[c] = incoming[part.Start + m];
                }
            }
            sum += _system!.PowerInto(solution, outline, amplitudes, half.ElectricEven, parity);
        }
        return sum;
    }

    // For real k the flux through the circle round the body follows from the Wronskian: -(2/pi) weight (|b|^2 + Re(conj(a) b)) for each multipole.
    private double FromAmplitudes(GratingWaves waves, MirrorHalf half, int number)
    {
        ReadOnlySpan<Complex> incoming = half.Incoming(number), outgoing = half.Outgoing(number);
        Complex k = LatticeSums.WaveNumber(waves, waves.Matrix);
        RodMedium matrix = RodMedium.Of(waves, waves.Matrix, k);
        double s = k.Real * RadiusNm / 2, sum = 0;
        foreach (MirrorHalf.Part part in half.Parts)
        {
            double weight = part.Field == 0 ? matrix.A.Real : matrix.B.Real, scale = 1;
            for (int m = part.Least; m <= half.Top; m++)
            {
                if (m > 0)
                    scale *= s * s / ((double)m * m);
                Complex a = incoming[part.Start + m], b = outgoing[part.Start + m];
                double power = scale * (b.Real * b.Real + b.Imaginary * b.Imaginary) + a.Real * b.Real + a.Imaginary * b.Imaginary;
                sum -= (m == 0 ? 2 : 1) * weight * 2 * power;
            }
        }
        return sum;
    }
}

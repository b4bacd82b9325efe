using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>One infinite row of rods, round or flattened, solid or with a concentric core, equal ones or several side by side in each cell, solved
/// by multipole expansion.</summary>
/// <remarks>
/// Each rod answers the multipoles that fall on it (<see cref="IRowBody"/>), plane waves and the other rods' fields arrive as
/// multipoles (<see cref="MultipoleWaves"/>, <see cref="LatticeSums"/>), and the equations fall into two halves by mirror symmetry
/// (<see cref="MirrorHalf"/>). The only approximation is the largest multipole L; the error falls like (2 radius/P)^(2L) and faster.
/// Several bodies in a cell lie at multiples of P/b, so that sums between them follow from those of the period P/b (<see cref="CellSums"/>).
/// The plane-wave expansion of what a row sends out holds anywhere off the line of centers, so planes may cut the rods
/// (those of tall bodies only beyond the foci, <see cref="IRowBody.LeastPlaneNm"/>; nearer ones are refused).
/// </remarks>
internal sealed class RodRow : IGratingElement
{
    /// <summary>Most multipoles taken for the sake of fast orders.</summary>
    private const int MostMultipoles = 40;

    private readonly double _xNm;
    private readonly double _topNm;
    private readonly double _bottomNm;
    private readonly LatticeSums _sums;
    private readonly RowMember[] _bodies;
    private readonly int _parts;
    private readonly CellSums? _cellSums;
    private readonly RowCoupling[] _couplings;
    private readonly int[] _grazingPlaces = new int[LatticeSums.MostGrazing];
    private MirrorHalf?[] _halves = [];
    private (RodField Field, int Top, int Orders) _shape = (RodField.Electric, -1, -1);
    private MirrorHalf? _first, _second;
    private Complex[] _gains = [];
    private Complex[] _fromTop = [], _toTop = [], _fromBottom = [], _toBottom = [];
    private Complex[] _coefficients = [], _sent = [], _below = [], _above = [];

    /// <summary>A row of rods.</summary>
    /// <param name="radiusNm">Radius of the rods, in nm; at most half the period.</param>
    /// <param name="coreRadiusNm">Radius of their cores, in nm; 0 for solid rods.</param>
    /// <param name="material">Number of the rods' material.</param>
    /// <param name="coreMaterial">Number of the cores' material; anything where there are none.</param>
    /// <param name="xNm">Place of a center along x, in nm.</param>
    /// <param name="topNm">Distance of the top plane above the centers, in nm; above 0, also less than the radius.</param>
    /// <param name="bottomNm">Distance of the bottom plane below the centers, in nm.</param>
    /// <param name="sums">Lattice sums, shared by all rows of one thread.</param>
    public RodRow(
        double radiusNm, double coreRadiusNm, int material, int coreMaterial, double xNm, double topNm, double bottomNm, LatticeSums sums)
        : this(new RodScatterer(radiusNm, coreRadiusNm, material, coreMaterial), coreRadiusNm > 0, material, coreMaterial, xNm, topNm, bottomNm, sums)
    {
    }

    /// <summary>A row of any bodies that the multipole expansion holds.</summary>
    /// <param name="body">One body.</param>
    /// <param name="hasCore">Whether it has a core.</param>
    /// <param name="material">Number of its material.</param>
    /// <param name="coreMaterial">Number of its core's material.</param>
    /// <param name="xNm">Place of a center along x, in nm.</param>
    /// <param name="topNm">Distance of the top plane above the centers, in nm.</param>
    /// <param name="bottomNm">Distance of the bottom plane below the centers, in nm.</param>
    /// <param name="sums">Lattice sums, shared by all rows of one thread.</param>
    public RodRow(
        IRowBody body, bool hasCore, int material, int coreMaterial, double xNm, double topNm, double bottomNm, LatticeSums sums)
        : this([new RowMember(body, 0, hasCore, material, coreMaterial)], 1, xNm, topNm, bottomNm, sums)
    {
    }

    /// <summary>A row with several bodies side by side in each cell.</summary>
    /// <param name="bodies">The bodies, at places of their own; their circles do not overlap.</param>
    /// <param name="parts">Parts of the period that places are counted in.</param>
    /// <param name="xNm">Place 0 along x, in nm.</param>
    /// <param name="topNm">Distance of the top plane above the centers, in nm.</param>
    /// <param name="bottomNm">Distance of the bottom plane below the centers, in nm.</param>
    /// <param name="sums">Lattice sums of the whole period, shared by all rows of one thread.</param>
    public RodRow(IReadOnlyList<RowMember> bodies, int parts, double xNm, double topNm, double bottomNm, LatticeSums sums)
    {
        _bodies = [.. bodies];
        (_parts, _xNm, _topNm, _bottomNm, _sums) = (parts, xNm, topNm, bottomNm, sums);
        if (_bodies.Length > 1)
            _cellSums = new CellSums(sums, parts, [.. bodies.Select(body => body.Place)]);
        _couplings = new RowCoupling[_bodies.Length * _bodies.Length];
    }

    /// <inheritdoc/>
    public double HeightNm => _topNm + _bottomNm;

    /// <inheritdoc/>
    public bool TryScatter(GratingWaves waves, in Resolution resolution, ScatteringBlock block)
    {
        int top = TopFor(waves, resolution);
        foreach (RowMember member in _bodies)
        {
            if (Math.Min(_topNm, _bottomNm) < member.Body.LeastPlaneNm || !member.Body.TryPrepare(waves, top))
                return false;
        }
        _sums.Prepare(waves, 2 * top);
        _cellSums?.Prepare(waves, 2 * top);
        Resize(waves, top);
        FillCouplings(waves);
        FillWaves(waves);
        _first = Half(waves.Field, electricEven: true);
        _second = Half(waves.Field, electricEven: false);
        ReadOnlySpan<int> places = _grazingPlaces.AsSpan(0, _sums.GrazingOrders.Length);
        if (!_first.TrySolve(_bodies, _couplings, _gains, places) || !_second.TrySolve(_bodies, _couplings, _gains, places))
            return false;
        FillPhases(waves);
        FillBlock(waves, block);
        return true;
    }

    // Multipoles asked for, and those that the orders asked for need.
    private int TopFor(GratingWaves waves, in Resolution resolution)
    {
        int needed = 0;
        foreach (RowMember member in _bodies)
            needed = Math.Max(needed, member.Body.MultipolesFor(Math.Max(-waves.Kx[0], waves.Kx[^1])));
        return Math.Max(Math.Max(1, resolution.Multipoles), Math.Min(needed, MostMultipoles));
    }

    private void Resize(GratingWaves waves, int top)
    {
        if (_shape == (waves.Field, top, waves.OrderCount))
            return;
        for (int i = 0; _shape.Top != top && i < _couplings.Length; i++)
            _couplings[i] = new RowCoupling(top);
        _shape = (waves.Field, top, waves.OrderCount);
        _halves = new MirrorHalf?[2 * (LatticeSums.MostGrazing + 1)];
        int orders = waves.OrderCount, channels = waves.ChannelCount, all = orders + LatticeSums.MostGrazing;
        foreach (RowMember member in _bodies)
            member.Resize(all, top);
        _gains = new Complex[all];
        (_fromTop, _toTop, _fromBottom, _toBottom) = (new Complex[orders], new Complex[orders], new Complex[orders], new Complex[orders]);
        (_coefficients, _sent, _below, _above) = (new Complex[channels], new Complex[channels], new Complex[channels], new Complex[channels]);
    }

    private MirrorHalf Half(RodField field, bool electricEven)
    {
        int grazing = _sums.GrazingOrders.Length;
        return _halves[2 * grazing + (electricEven ? 0 : 1)] ??= new MirrorHalf(field, electricEven, _shape.Top, _shape.Orders, grazing, _bodies.Length);
    }

    private double HalfPhase(RowMember member) => Complex.Abs(_sums.K) * member.Body.RadiusNm / 2;

    private void FillCouplings(GratingWaves waves)
    {
        for (int to = 0; to < _bodies.Length; to++)
        {
            for (int from = 0; from < _bodies.Length; from++)
            {
                double radiusTo = _bodies[to].Body.RadiusNm, radiusFrom = _bodies[from].Body.RadiusNm;
                int difference = _bodies[to].Place - _bodies[from].Place;
                double periodNm = waves.PeriodNm / (_cellSums?.PartsOf(difference) ?? 1);
                ReadOnlySpan<Complex> sums = _cellSums is null ? _sums.Sums : _cellSums.Of(difference);
                _couplings[to * _bodies.Length + from].Fill(
                    sums, radiusTo / periodNm, radiusFrom / periodNm, Math.Sqrt(HalfPhase(_bodies[to]) * HalfPhase(_bodies[from])));
            }
        }
    }

    // Tables of the orders kept, then of the grazing orders, kept or not; adds to the odd coupling what the lattice sums left out.
    private void FillWaves(GratingWaves waves)
    {
        for (int i = 0; i < waves.OrderCount; i++)
            FillWave(waves, i, i - waves.MostOrder, waves.Kx[i], waves.Kz[i]);
        ReadOnlySpan<int> grazing = _sums.GrazingOrders;
        for (int g = 0; g < grazing.Length; g++)
        {
            int wave = waves.OrderCount + g;
            FillWave(waves, wave, grazing[g], waves.KxOf(grazing[g]), waves.KzIn(waves.Matrix, grazing[g]));
            _grazingPlaces[g] = Math.Abs(grazing[g]) <= waves.MostOrder ? grazing[g] + waves.MostOrder : -1;
            for (int i = 0; i < _couplings.Length; i++)
            {
                ReadOnlySpan<Complex> arriving = _bodies[i / _bodies.Length].Arriving.Odd(wave), leaving = _bodies[i % _bodies.Length].Leaving.Odd(wave);
                for (int l = 1; l < arriving.Length; l++)
                    ComplexMatrix.SubtractScaled(_couplings[i].Odd.Row(l), -2 * _gains[wave] * arriving[l], leaving);
            }
        }
    }

    private void FillWave(GratingWaves waves, int wave, int order, double kx, Complex kz)
    {
        _gains[wave] = 2 / (waves.PeriodNm * kz);
        foreach (RowMember member in _bodies)
        {
            // An order too fast for the multipoles passes by the bodies, as orders beyond those kept do.
            if (member.Body.MultipolesFor(kx) > _shape.Top)
                member.Clear(wave);
            else
                member.Fill(wave, order, _parts, kx / _sums.K, kz / _sums.K, HalfPhase(member));
        }
    }

    // From the planes to the centers and back; sideways only the order's share of kx matters, since kx0 is common to all.
    private void FillPhases(GratingWaves waves)
    {
        for (int i = 0; i < waves.OrderCount; i++)
        {
            Complex depth = Complex.ImaginaryOne * waves.Kz[i];
            Complex side = Complex.FromPolarCoordinates(1, 2 * Math.PI * (i - waves.MostOrder) * _xNm / waves.PeriodNm);
            Complex top = Complex.Exp(depth * _topNm), bottom = Complex.Exp(depth * _bottomNm);
            (_fromTop[i], _toTop[i]) = (top * side, top * Complex.Conjugate(side));
            (_fromBottom[i], _toBottom[i]) = (bottom * side, bottom * Complex.Conjugate(side));
        }
    }

    private void FillBlock(GratingWaves waves, ScatteringBlock block)
    {
        int orders = waves.OrderCount;
        ReadOnlySpan<MirrorHalf.Part> parts = _first!.Parts;
        foreach (MirrorHalf.Part to in parts)
        {
            foreach (MirrorHalf.Part from in parts)
            {
                for (int n = 0; n < orders; n++)
                {
                    int row = to.Channel + n;
                    for (int i = 0; i < orders; i++)
                    {
                        int column = from.Channel + i;
                        Complex one = _first.Response[row, column], other = _second!.Response[row, column];
                        Complex same = one + other, turned = one - other;
                        if (row == column)
                            same += 1;
                        block.ReflectTop[row, column] = to.SignAbove * (_toTop[n] * _fromTop[i] * turned);
                        block.ReflectBottom[row, column] = from.SignAbove * (_toBottom[n] * _fromBottom[i] * turned);
                        block.TransmitDown[row, column] = _toBottom[n] * _fromTop[i] * same;
                        block.TransmitUp[row, column] = to.SignAbove * from.SignAbove * (_toTop[n] * _fromBottom[i] * same);
                    }
                }
            }
        }
    }

    /// <inheritdoc/>
    public void AddLoss(
        GratingWaves waves, in Resolution resolution, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up, Span<double> byMaterial)
    {
        bool matrixAbsorbs = waves.Matrix.Imaginary != 0, absorbs = matrixAbsorbs;
        foreach (RowMember member in _bodies)
            absorbs |= waves.Permittivities[member.Material].Imaginary != 0 || CoreAbsorbs(waves, member);
        if (!absorbs)
            return;
        // The direct waves, at the planes they leave through.
        for (int c = 0; c < waves.ChannelCount; c++)
        {
            int n = c % waves.OrderCount;
            _below[c] = _fromTop[n] * down[c];
            _above[c] = _fromBottom[n] * up[c];
        }
        double intoRods = AddHalf(waves, _first!, down, up, byMaterial) + AddHalf(waves, _second!, down, up, byMaterial);
        // Green's identity: what enters through the planes and not into the rods is lost between them.
        if (matrixAbsorbs)
            byMaterial[Section.Matrix] += IntoPlanes(waves, down, up) - intoRods;
    }

    private static bool CoreAbsorbs(GratingWaves waves, RowMember member)
        => member.HasCore && waves.Permittivities[member.CoreMaterial].Imaginary != 0;

    // Returns the power into all bodies.
    private double AddHalf(
        GratingWaves waves, MirrorHalf half, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up, Span<double> byMaterial)
    {
        foreach (MirrorHalf.Part part in half.Parts)
        {
            for (int n = 0; n < waves.OrderCount; n++)
            {
                int c = part.Channel + n;
                _coefficients[c] = _fromTop[n] * down[c] + part.SignAbove * (_fromBottom[n] * up[c]);
            }
        }
        half.Response.Apply(_coefficients, _sent);
        foreach (MirrorHalf.Part part in half.Parts)
        {
            for (int n = 0; n < waves.OrderCount; n++)
            {
                int c = part.Channel + n;
                _below[c] += _sent[c];
                _above[c] += part.SignAbove * _sent[c];
            }
        }
        half.SetWaves(_coefficients, _bodies, _couplings);
        double intoRods = 0;
        for (int i = 0; i < _bodies.Length; i++)
        {
            RowMember member = _bodies[i];
            (double body, double core) = member.Body.PowerInto(waves, half, i);
            bool coreAbsorbs = CoreAbsorbs(waves, member);
            if (waves.Permittivities[member.Material].Imaginary != 0)
                byMaterial[member.Material] += (coreAbsorbs ? body - core : body) / waves.PeriodNm;
            if (coreAbsorbs)
                byMaterial[member.CoreMaterial] += core / waves.PeriodNm;
            intoRods += body / waves.PeriodNm;
        }
        return intoRods;
    }

    private double IntoPlanes(GratingWaves waves, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up)
    {
        RodMedium matrix = RodMedium.Of(waves, waves.Matrix, _sums.K);
        double power = 0;
        for (int n = 0; n < waves.OrderCount; n++)
        {
            power += ThroughPlane(waves, matrix, n, down, _above, _toTop, above: true);
            power -= ThroughPlane(waves, matrix, n, up, _below, _toBottom, above: false);
        }
        return power;
    }

    // Power in +z of one order through a plane that waves come in through and leave by; those that leave still stand at the centers.
    private static double ThroughPlane(
        GratingWaves waves, in RodMedium matrix, int n, ReadOnlySpan<Complex> entering, ReadOnlySpan<Complex> leaving, ReadOnlySpan<Complex> toPlane,
        bool above)
    {
        Complex slope = Complex.ImaginaryOne * waves.Kz[n] * (above ? 1 : -1), across = Complex.ImaginaryOne * waves.Kx[n] * matrix.C;
        Complex enters = entering[n], leaves = toPlane[n] * leaving[n];
        if (waves.Field != RodField.Both)
        {
            Complex weight = waves.Field == RodField.Electric ? matrix.A : matrix.B;
            return (Complex.Conjugate(enters + leaves) * weight * slope * (enters - leaves)).Imaginary;
        }
        Complex entersH = entering[n + waves.OrderCount], leavesH = toPlane[n] * leaving[n + waves.OrderCount];
        Complex electric = enters + leaves, magnetic = entersH + leavesH;
        Complex electricFlux = matrix.A * slope * (enters - leaves) + across * magnetic;
        Complex magneticFlux = matrix.B * slope * (entersH - leavesH) - across * electric;
        return (Complex.Conjugate(electric) * electricFlux + Complex.Conjugate(magnetic) * magneticFlux).Imaginary;
    }
}

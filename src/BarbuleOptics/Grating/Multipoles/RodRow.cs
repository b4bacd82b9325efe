using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>One infinite row of equal rods, round or flattened, solid or with a concentric core, solved by multipole expansion.</summary>
/// <remarks>
/// Each rod answers the multipoles that fall on it (<see cref="IRowBody"/>), plane waves and the other rods' fields arrive as
/// multipoles (<see cref="MultipoleWaves"/>, <see cref="LatticeSums"/>), and the equations fall into two halves by mirror symmetry
/// (<see cref="MirrorHalf"/>). The only approximation is the largest multipole L; the error falls like (2 radius/P)^(2L) and faster.
/// The plane-wave expansion of what a row sends out holds anywhere off the line of centers, so planes may cut the rods
/// (those of tall bodies only beyond the foci, <see cref="IRowBody.LeastPlaneNm"/>; nearer ones are refused).
/// </remarks>
internal sealed class RodRow : IGratingElement
{
    /// <summary>Most multipoles taken for the sake of fast orders.</summary>
    private const int MostMultipoles = 40;

    private readonly bool _hasCore;
    private readonly int _material;
    private readonly int _coreMaterial;
    private readonly double _xNm;
    private readonly double _topNm;
    private readonly double _bottomNm;
    private readonly LatticeSums _sums;
    private readonly IRowBody _body;
    private readonly MultipoleWaves _waves = new();
    private readonly int[] _grazingPlaces = new int[LatticeSums.MostGrazing];
    private RowCoupling? _coupling;
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
    {
        (_body, _hasCore, _material, _coreMaterial) = (body, hasCore, material, coreMaterial);
        (_xNm, _topNm, _bottomNm, _sums) = (xNm, topNm, bottomNm, sums);
    }

    /// <inheritdoc/>
    public double HeightNm => _topNm + _bottomNm;

    /// <inheritdoc/>
    public bool TryScatter(GratingWaves waves, in Resolution resolution, ScatteringBlock block)
    {
        int top = TopFor(waves, resolution);
        if (Math.Min(_topNm, _bottomNm) < _body.LeastPlaneNm || !_body.TryPrepare(waves, top))
            return false;
        _sums.Prepare(waves, 2 * top);
        Resize(waves, top);
        double s = Complex.Abs(_sums.K) * _body.RadiusNm / 2;
        _coupling!.Fill(_sums.Sums, _body.RadiusNm / waves.PeriodNm, s);
        FillWaves(waves, s);
        _first = Half(waves.Field, electricEven: true);
        _second = Half(waves.Field, electricEven: false);
        ReadOnlySpan<int> places = _grazingPlaces.AsSpan(0, _sums.GrazingOrders.Length);
        if (!_first.TrySolve(_body, _coupling, _waves, _gains, places) || !_second.TrySolve(_body, _coupling, _waves, _gains, places))
            return false;
        FillPhases(waves);
        FillBlock(waves, block);
        return true;
    }

    // Multipoles asked for, and those that the orders asked for need.
    private int TopFor(GratingWaves waves, in Resolution resolution)
    {
        int needed = _body.MultipolesFor(Math.Max(-waves.Kx[0], waves.Kx[^1]));
        return Math.Max(Math.Max(1, resolution.Multipoles), Math.Min(needed, MostMultipoles));
    }

    private void Resize(GratingWaves waves, int top)
    {
        if (_shape == (waves.Field, top, waves.OrderCount))
            return;
        if (_shape.Top != top)
            _coupling = new RowCoupling(top);
        _shape = (waves.Field, top, waves.OrderCount);
        _halves = new MirrorHalf?[2 * (LatticeSums.MostGrazing + 1)];
        int orders = waves.OrderCount, channels = waves.ChannelCount, all = orders + LatticeSums.MostGrazing;
        _waves.Resize(all, top);
        _gains = new Complex[all];
        (_fromTop, _toTop, _fromBottom, _toBottom) = (new Complex[orders], new Complex[orders], new Complex[orders], new Complex[orders]);
        (_coefficients, _sent, _below, _above) = (new Complex[channels], new Complex[channels], new Complex[channels], new Complex[channels]);
    }

    private MirrorHalf Half(RodField field, bool electricEven)
    {
        int grazing = _sums.GrazingOrders.Length;
        return _halves[2 * grazing + (electricEven ? 0 : 1)] ??= new MirrorHalf(field, electricEven, _shape.Top, _shape.Orders, grazing);
    }

    // Tables of the orders kept, then of the grazing orders, kept or not; adds to the odd coupling what the lattice sums left out.
    private void FillWaves(GratingWaves waves, double s)
    {
        for (int i = 0; i < waves.OrderCount; i++)
            FillWave(waves, i, waves.Kx[i], waves.Kz[i], s);
        ReadOnlySpan<int> grazing = _sums.GrazingOrders;
        for (int g = 0; g < grazing.Length; g++)
        {
            int wave = waves.OrderCount + g;
            FillWave(waves, wave, waves.KxOf(grazing[g]), waves.KzIn(waves.Matrix, grazing[g]), s);
            _grazingPlaces[g] = Math.Abs(grazing[g]) <= waves.MostOrder ? grazing[g] + waves.MostOrder : -1;
            ReadOnlySpan<Complex> odd = _waves.Odd(wave);
            for (int l = 1; l < odd.Length; l++)
                ComplexMatrix.SubtractScaled(_coupling!.Odd.Row(l), -2 * _gains[wave] * odd[l], odd);
        }
    }

    private void FillWave(GratingWaves waves, int wave, double kx, Complex kz, double s)
    {
        _waves.Fill(wave, kx / _sums.K, kz / _sums.K, s);
        _gains[wave] = 2 / (waves.PeriodNm * kz);
        // An order too fast for the multipoles passes by the bodies, as orders beyond those kept do.
        if (_body.MultipolesFor(kx) > _shape.Top)
            _waves.Clear(wave);
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
        bool matrixAbsorbs = waves.Matrix.Imaginary != 0;
        bool rodAbsorbs = waves.Permittivities[_material].Imaginary != 0;
        bool coreAbsorbs = _hasCore && waves.Permittivities[_coreMaterial].Imaginary != 0;
        if (!matrixAbsorbs && !rodAbsorbs && !coreAbsorbs)
            return;
        // The direct waves, at the planes they leave through.
        for (int c = 0; c < waves.ChannelCount; c++)
        {
            int n = c % waves.OrderCount;
            _below[c] = _fromTop[n] * down[c];
            _above[c] = _fromBottom[n] * up[c];
        }
        double intoRods = 0, intoCores = 0;
        AddHalf(waves, _first!, down, up, ref intoRods, ref intoCores);
        AddHalf(waves, _second!, down, up, ref intoRods, ref intoCores);
        if (rodAbsorbs)
            byMaterial[_material] += coreAbsorbs ? intoRods - intoCores : intoRods;
        if (coreAbsorbs)
            byMaterial[_coreMaterial] += intoCores;
        // Green's identity: what enters through the planes and not into the rods is lost between them.
        if (matrixAbsorbs)
            byMaterial[Section.Matrix] += IntoPlanes(waves, down, up) - intoRods;
    }

    private void AddHalf(
        GratingWaves waves, MirrorHalf half, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up, ref double intoRods, ref double intoCores)
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
        half.SetWaves(_coefficients, _coupling!, _waves);
        (double body, double core) = _body.PowerInto(waves, half);
        intoRods += body / waves.PeriodNm;
        intoCores += core / waves.PeriodNm;
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

using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>How a body with elliptical outline, and a concentric elliptical core if it has one, answers multipoles, at several wavelengths side by side;
/// rods across the plane of incidence.</summary>
/// <remarks>
/// Null-field method (extended boundary condition). Notation: C the outline, c the core's, u the field and v its derivative along (dz/dt, -dx/dt); J and H the regular and
/// outgoing waves Z_m(kr) cos(m phi), or with sines; [f, g] = integral of f g' - f' g over t. Inside the body, where neither the light nor the
/// rod's own sources lie, Green's identity gives for all m
///   [u, H_m] on C = [u, H_m] on c and [u, J_m] on C = [u, J_m] on c, with waves of the body;
/// outside, with waves of the matrix and the flux made continuous, incoming a_m ~ [u, H_m] on C and outgoing b_m ~ -[u, J_m] on C. On C u and v
/// are Fourier series in t, on c the regular waves of the core. No series of outgoing waves is ever taken at an outline, which would diverge
/// on a flat one. Without a core u on C are regular waves of the body. The four symmetries are solved apart; s and p share all integrals.
/// Source: P. C. Waterman, Proc. IEEE 53 (1965) 805 (from memory); the three sets of conditions for a body with a core are our own.
/// </remarks>
internal sealed class EllipseLanes
{
    /// <summary>Multipoles beyond those asked for, which keep the last of those asked for right.</summary>
    private const int Margin = 2;

    private static readonly bool[] Both = [true, false];
    private static readonly WaveSet[] OnOutline = [WaveSet.Matrix, WaveSet.Body];

    private readonly EllipseOutline _outline;
    private readonly EllipseOutline _core;
    private readonly bool _hasCore;
    private EllipseQuadrature? _outer;
    private EllipseQuadrature? _inner;
    private int _top = -1, _inside, _width;
    private double[] _waves = [];
    private double[] _tables = [];
    private double[] _series = [];
    private double[] _system = [];
    private double[] _nodes = [];
    private double[] _answers = [];

    /// <summary>A body; <paramref name="core"/> of no width for one without a core.</summary>
    public EllipseLanes(EllipseOutline outline, EllipseOutline core) => (_outline, _core, _hasCore) = (outline, core, core.HalfWidthNm > 0);

    // Sets of waves at the points of an outline, each J and H of one wave number.
    private enum WaveSet
    {
        Matrix,
        Body,
        BodyAtCore,
        Core,
    }

    /// <summary>Outgoing amplitude b_m of i^m H_m cos(m phi) from an incoming one a_l of i^l J_l cos(l phi), or with sines, in each lane.</summary>
    /// <param name="magnetic">Whether the field is Hy.</param>
    /// <param name="sine">Whether the waves are sines.</param>
    /// <param name="outgoing">m.</param>
    /// <param name="incoming">l; of the parity of m, otherwise there is no answer.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> Answer<TLanes>(bool magnetic, bool sine, int outgoing, int incoming)
        where TLanes : struct, ILanes<TLanes>
        => ComplexLanes<TLanes>.Load(ref _answers[Place(magnetic, sine, outgoing, incoming) * ComplexLanes<TLanes>.Stride]);

    /// <summary>Finds the answers of multipoles 0 to <paramref name="top"/> for both fields.</summary>
    /// <param name="top">Largest multipole.</param>
    /// <param name="matrix">Wave number of the matrix, 1/nm.</param>
    /// <param name="body">That of the body.</param>
    /// <param name="core">That of the core; not used without one.</param>
    /// <returns>False where arguments are too large or equations have no solution.</returns>
    public bool TrySolve<TLanes>(int top, ComplexLanes<TLanes> matrix, ComplexLanes<TLanes> body, ComplexLanes<TLanes> core)
        where TLanes : struct, ILanes<TLanes>
    {
        Reserve(top, ComplexLanes<TLanes>.Stride);
        if (!TryFill(WaveSet.Matrix, matrix, _outer!, outgoing: true) || !TryFill(WaveSet.Body, body, _outer!, outgoing: _hasCore))
            return false;
        if (_hasCore && (!TryFill(WaveSet.BodyAtCore, body, _inner!, outgoing: true) || !TryFill(WaveSet.Core, core, _inner!, outgoing: false)))
            return false;
        // The flux is u'/permittivity for Hy: ratios of permittivities, on the outside and on the inside of the body.
        ComplexLanes<TLanes> bodySquare = body * body, one = ComplexLanes<TLanes>.Broadcast(1);
        ComplexLanes<TLanes> outside = matrix * matrix * bodySquare.Reciprocal();
        ComplexLanes<TLanes> inside = _hasCore ? bodySquare * (core * core).Reciprocal() : one;
        for (int symmetry = 0; symmetry < 4; symmetry++)
        {
            var of = new EllipseSymmetry(symmetry, _inside);
            Integrate(of, matrix, body, core);
            if (!TryAnswer(of, magnetic: false, one, one) || !TryAnswer(of, magnetic: true, outside, inside))
                return false;
        }
        return true;
    }

    private void Reserve(int top, int stride)
    {
        if (_top == top && _width == stride)
            return;
        (_top, _inside, _width) = (top, top + Margin, stride);
        _outer = new EllipseQuadrature(_outline, _inside + 1, EllipseQuadrature.CountFor(_outline, _inside));
        _inner = _hasCore ? new EllipseQuadrature(_core, _inside + 1, EllipseQuadrature.CountFor(_core, _inside)) : null;
        int points = Math.Max(_outer.Count, _inner?.Count ?? 0), orders = _inside + 2, most = _inside / 2 + 1;
        _waves = new double[8 * orders * points * stride];
        _tables = new double[12 * most * most * stride];
        _series = new double[2 * most * most * stride];
        _nodes = new double[4 * most * points * stride];
        _system = new double[6 * most * most * stride];
        _answers = new double[4 * (top + 1) * (top + 1) * stride];
    }

    private int Place(bool magnetic, bool sine, int outgoing, int incoming)
        => (((magnetic ? 2 : 0) + (sine ? 1 : 0)) * (_top + 1) + outgoing) * (_top + 1) + incoming;

    // Waves of orders 0 to inside + 1 at all points: order after order, point after point.
    private ref double Waves(WaveSet set, bool outgoing)
        => ref _waves[_waves.Length / 8 * (2 * (int)set + (outgoing ? 1 : 0))];

    private ref double Table(WaveSet set, bool outgoing, bool slope)
        => ref _tables[_tables.Length / 12 * (4 * (int)set + (outgoing ? 2 : 0) + (slope ? 1 : 0))];

    private ref double Nodes(int number) => ref _nodes[_nodes.Length / 4 * number];

    private bool TryFill<TLanes>(WaveSet set, ComplexLanes<TLanes> k, EllipseQuadrature points, bool outgoing)
        where TLanes : struct, ILanes<TLanes>
    {
        int orders = _inside + 2;
        double largest = Math.Max(points.RadiiNm[0], points.RadiiNm[^1]);
        if (!BesselLanes.Covers(TLanes.Broadcast(largest) * k))
            return false;
        Span<double> norms = stackalloc double[TLanes.Count];
        TLanes.Store(k.Norm, ref norms[0]);
        double most = 0;
        foreach (double norm in norms)
            most = Math.Max(most, norm);
        for (int q = 0; q < points.Count; q++)
        {
            ref double j = ref Unsafe.Add(ref Waves(set, outgoing: false), q * orders * _width);
            ref double h = ref outgoing ? ref Unsafe.Add(ref Waves(set, outgoing: true), q * orders * _width) : ref Unsafe.NullRef<double>();
            BesselLanes.Fill(TLanes.Broadcast(points.RadiiNm[q]) * k, Math.Sqrt(most) * points.RadiiNm[q], orders - 1, ref j, ref h);
        }
        return true;
    }

    // Tables of integrals, see TableOf: with a core of a Fourier term on the outline with a wave; without one of the body's regular waves with a wave.
    private void Integrate<TLanes>(in EllipseSymmetry of, ComplexLanes<TLanes> matrix, ComplexLanes<TLanes> body, ComplexLanes<TLanes> core)
        where TLanes : struct, ILanes<TLanes>
    {
        if (!_hasCore)
        {
            SetNodes(of, WaveSet.Body, outgoing: false, body, _outer!, 2);
            foreach (bool outgoing in Both)
            {
                SetNodes(of, WaveSet.Matrix, outgoing, matrix, _outer!, 0);
                EllipseSums.Products<TLanes>(of.Count, _outer!.Weights, ref Nodes(1), ref Nodes(2), ref Table(WaveSet.Matrix, outgoing, slope: true));
                EllipseSums.Products<TLanes>(of.Count, _outer!.Weights, ref Nodes(0), ref Nodes(3), ref Table(WaveSet.Matrix, outgoing, slope: false));
            }
            return;
        }
        SetNodes(of, WaveSet.Core, outgoing: false, core, _inner!, 2);
        foreach (bool outgoing in Both)
        {
            foreach (WaveSet set in OnOutline)
            {
                SetNodes(of, set, outgoing, set == WaveSet.Matrix ? matrix : body, _outer!, 0);
                EllipseSums.WithSeries<TLanes>(of, _outer!, ref Nodes(1), ref Table(set, outgoing, slope: true));
                EllipseSums.WithSeries<TLanes>(of, _outer!, ref Nodes(0), ref Table(set, outgoing, slope: false));
            }
            SetNodes(of, WaveSet.BodyAtCore, outgoing, body, _inner!, 0);
            EllipseSums.Products<TLanes>(of.Count, _inner!.Weights, ref Nodes(1), ref Nodes(2), ref Table(WaveSet.BodyAtCore, outgoing, slope: true));
            EllipseSums.Products<TLanes>(of.Count, _inner!.Weights, ref Nodes(0), ref Nodes(3), ref Table(WaveSet.BodyAtCore, outgoing, slope: false));
        }
    }

    // Values to one set of nodes and derivatives to the next.
    private void SetNodes<TLanes>(in EllipseSymmetry of, WaveSet set, bool outgoing, ComplexLanes<TLanes> k, EllipseQuadrature points, int number)
        where TLanes : struct, ILanes<TLanes>
        => EllipseSums.SetNodes(of, points, k, _inside + 2, ref Waves(set, outgoing), ref Nodes(number), ref Nodes(number + 1));

    private bool TryAnswer<TLanes>(in EllipseSymmetry of, bool magnetic, ComplexLanes<TLanes> outside, ComplexLanes<TLanes> inside)
        where TLanes : struct, ILanes<TLanes>
    {
        int count = of.Count;
        if (_hasCore && !TryOutline(count, inside))
            return false;
        // Rows are the unknown waves inside, columns the conditions: Q and R transposed, so that what is solved for is R/Q.
        FillConditions(count, outside, outgoing: true, 0);
        FillConditions(count, outside, outgoing: false, count);
        EllipseSums.ScaleRows<TLanes>(ref _system[0], count, count, 2 * count);
        if (!LaneEquations.TrySolve<TLanes>(ref _system[0], count, count))
            return false;
        for (int outgoing = 0; outgoing < count && of.Order(outgoing) <= _top; outgoing++)
        {
            for (int incoming = 0; incoming < count && of.Order(incoming) <= _top; incoming++)
            {
                // The integral of cos^2 over phi is twice as large for order 0; i^(l - m) turns what i^m H_m and i^l J_l are counted in.
                double weight = (of.Order(outgoing) == 0 ? 0.5 : 1) * (of.Order(incoming) == 0 ? 2 : 1) * ((incoming - outgoing) % 2 == 0 ? -1 : 1);
                ComplexLanes<TLanes> quotient = ComplexLanes<TLanes>.Load(ref _system[(incoming * 2 * count + count + outgoing) * _width]);
                ComplexLanes<TLanes>.Store(
                    TLanes.Broadcast(weight) * quotient, ref _answers[Place(magnetic, of.IsSine, of.Order(outgoing), of.Order(incoming)) * _width]);
            }
        }
        return true;
    }

    // Series of u and v on the outline from each regular wave of the core: rows of D and -V, for H and J, against the core's integrals.
    private bool TryOutline<TLanes>(int count, ComplexLanes<TLanes> inside)
        where TLanes : struct, ILanes<TLanes>
    {
        int width = 3 * count;
        for (int row = 0; row < 2 * count; row++)
        {
            bool outgoing = row < count;
            int of = (outgoing ? row : row - count) * count * _width;
            ref double at = ref _system[row * width * _width];
            Unsafe.CopyBlockUnaligned(
                ref Unsafe.As<double, byte>(ref at), ref Unsafe.As<double, byte>(ref Unsafe.Add(ref Table(WaveSet.Body, outgoing, slope: true), of)),
                (uint)(count * _width * sizeof(double)));
            ref double values = ref Unsafe.Add(ref Table(WaveSet.Body, outgoing, slope: false), of);
            for (int i = 0; i < count * _width; i++)
                Unsafe.Add(ref at, count * _width + i) = -Unsafe.Add(ref values, i);
            EllipseSums.Combine(
                count, inside, ref Unsafe.Add(ref Table(WaveSet.BodyAtCore, outgoing, slope: true), of),
                ref Unsafe.Add(ref Table(WaveSet.BodyAtCore, outgoing, slope: false), of), ref Unsafe.Add(ref at, 2 * count * _width));
        }
        EllipseSums.ScaleRows<TLanes>(ref _system[0], 2 * count, 2 * count, width);
        if (!LaneEquations.TrySolve<TLanes>(ref _system[0], 2 * count, count))
            return false;
        for (int row = 0; row < 2 * count; row++)
            _system.AsSpan((row * width + 2 * count) * _width, count * _width).CopyTo(_series.AsSpan(row * count * _width));
        return true;
    }

    // The conditions on H or on J of the matrix, as columns behind the first ones.
    private void FillConditions<TLanes>(int count, ComplexLanes<TLanes> outside, bool outgoing, int column)
        where TLanes : struct, ILanes<TLanes>
    {
        ref double slopes = ref Table(WaveSet.Matrix, outgoing, slope: true), values = ref Table(WaveSet.Matrix, outgoing, slope: false);
        for (int condition = 0; condition < count; condition++)
        {
            for (int wave = 0; wave < count; wave++)
            {
                ComplexLanes<TLanes> slope, value;
                if (_hasCore)
                {
                    slope = EllipseSums.Product<TLanes>(count, ref Unsafe.Add(ref slopes, condition * count * _width), ref _series[wave * _width]);
                    value = EllipseSums.Product<TLanes>(
                        count, ref Unsafe.Add(ref values, condition * count * _width), ref _series[(count * count + wave) * _width]);
                }
                else
                {
                    slope = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref slopes, (condition * count + wave) * _width));
                    value = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref values, (condition * count + wave) * _width));
                }
                ComplexLanes<TLanes>.Store(
                    ComplexLanes<TLanes>.SubtractProduct(outside, value, slope), ref _system[(wave * 2 * count + column + condition) * _width]);
            }
        }
    }
}

using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>The equations of a row, of one body or several a cell, for fields of one mirror symmetry about the plane of the rods' centers, which bodies symmetric about it never mix
/// with the other: Ey even and Hy odd in z, or Ey odd and Hy even.</summary>
/// <remarks>
/// Unknowns are the outgoing amplitudes b of the bodies of one cell, b = Answer (a + coupling b), a from the plane waves. The amplitude w of an
/// order that grazes the row is an unknown of its own, P kz/2 w = sum of cos(m a) b_m over the bodies, and falls back on them as w eps_m cos(m a):
/// so nothing large is formed, and the outgoing amplitude of that order is w, where 2/(P kz) times a sum would lose all digits.
/// </remarks>
internal sealed class MirrorHalf
{
    private readonly int _top;
    private readonly int _orders;
    private readonly int _grazing;
    private readonly int _bodies;
    private readonly int _stride;
    private readonly Part[] _parts;
    private readonly ComplexMatrix _matrix;
    private readonly ComplexMatrix _solution;
    private readonly LinearSolver _solver;
    private readonly Complex[] _incoming;
    private readonly Complex[] _outgoing;

    /// <summary>Room for one half.</summary>
    /// <param name="field">Which fields are followed.</param>
    /// <param name="electricEven">Whether Ey is even and Hy odd in z, or the other way round; with one field, whether that is even.</param>
    /// <param name="top">Largest multipole.</param>
    /// <param name="orders">Number of plane-wave orders.</param>
    /// <param name="grazing">Number of grazing orders.</param>
    /// <param name="bodies">Number of bodies a cell.</param>
    public MirrorHalf(RodField field, bool electricEven, int top, int orders, int grazing, int bodies)
    {
        (_top, _orders, _grazing, _bodies) = (top, orders, grazing, bodies);
        int size = 0;
        _parts = field switch
        {
            RodField.Electric => [MakePart(0, electricEven, 0, ref size)],
            RodField.Magnetic => [MakePart(1, electricEven, 0, ref size)],
            _ => [MakePart(0, electricEven, 0, ref size), MakePart(1, !electricEven, orders, ref size)],
        };
        ElectricEven = electricEven;
        _stride = size;
        size *= bodies;
        BorderStart = size;
        if (HasEven)
            size += grazing;
        _matrix = new ComplexMatrix(size, size);
        _solution = new ComplexMatrix(size, orders * _parts.Length);
        _solver = new LinearSolver(size);
        Response = new ComplexMatrix(orders * _parts.Length, orders * _parts.Length);
        _incoming = new Complex[size];
        _outgoing = new Complex[size];
    }

    /// <summary>One field of the half.</summary>
    /// <param name="Field">0 for Ey, 1 for Hy.</param>
    /// <param name="IsEven">Whether it is even in z.</param>
    /// <param name="Start">Number of the unknown that multipole 0 of a body has, or would have, counted from the body's first.</param>
    /// <param name="Channel">Its first channel.</param>
    public readonly record struct Part(int Field, bool IsEven, int Start, int Channel)
    {
        /// <summary>The least multipole: a sine of order 0 does not exist.</summary>
        public int Least => IsEven ? 0 : 1;

        /// <summary>The sign above the row of what has the sign + below it.</summary>
        public int SignAbove => IsEven ? 1 : -1;
    }

    /// <summary>The fields.</summary>
    public ReadOnlySpan<Part> Parts => _parts;

    /// <summary>Outgoing amplitudes below the row, channel by channel, from incoming ones, all at the plane of the centers.</summary>
    public ComplexMatrix Response { get; }

    /// <summary>Whether Ey is even and Hy odd in z; with one field, whether that is even.</summary>
    public bool ElectricEven { get; }

    /// <summary>Largest multipole.</summary>
    public int Top => _top;

    /// <summary>Incoming amplitudes on a body, by unknown, of the waves last set.</summary>
    public ReadOnlySpan<Complex> Incoming(int body) => _incoming.AsSpan(body * _stride, _stride);

    /// <summary>Outgoing amplitudes of a body, by unknown, of the waves last set.</summary>
    public ReadOnlySpan<Complex> Outgoing(int body) => _outgoing.AsSpan(body * _stride, _stride);

    private int BorderStart { get; }

    private bool HasEven => Array.Exists(_parts, part => part.IsEven);

    /// <summary>Solves for all incoming waves at once.</summary>
    /// <param name="bodies">The bodies, ready; plane waves as multipoles: the orders, then the grazing ones.</param>
    /// <param name="couplings">The couplings, ready: to the first body from each, then to the second.</param>
    /// <param name="gains">2/(P kz) by wave.</param>
    /// <param name="grazingOrders">For each grazing wave its place among the orders; negative where it is not kept.</param>
    /// <returns>False where the equations have no solution.</returns>
    public bool TrySolve(
        ReadOnlySpan<RowMember> bodies, ReadOnlySpan<RowCoupling> couplings, ReadOnlySpan<Complex> gains, ReadOnlySpan<int> grazingOrders)
    {
        _matrix.SetIdentity();
        _solution.Clear();
        for (int body = 0; body < _bodies; body++)
        {
            foreach (Part to in _parts)
            {
                foreach (Part from in _parts)
                    FillBlock(to, from, body, bodies[body], couplings.Slice(body * _bodies, _bodies));
                if (to.IsEven)
                    FillBorder(to, body, bodies[body].Leaving);
            }
        }
        for (int g = 0; BorderStart + g < _matrix.Rows; g++)
            _matrix[BorderStart + g, BorderStart + g] = 1 / gains[_orders + g];
        if (!_solver.TryFactor(_matrix))
            return false;
        _solver.Solve(_solution);
        Response.Clear();
        foreach (Part part in _parts)
        {
            for (int n = 0; n < _orders; n++)
                FillResponse(part, n, part.IsEven ? grazingOrders.IndexOf(n) : -1, bodies, gains[n]);
        }
        return AreFinite(Response);
    }

    private void FillBlock(in Part to, in Part from, int body, RowMember member, ReadOnlySpan<RowCoupling> couplings)
    {
        int start = body * _stride;
        MultipoleWaves waves = member.Arriving;
        for (int outgoing = to.Least; outgoing <= _top; outgoing++)
        {
            Span<Complex> row = _matrix.Row(start + to.Start + outgoing), right = _solution.Row(start + to.Start + outgoing);
            int first = member.Body.IsRound ? outgoing : outgoing % 2, last = member.Body.IsRound ? outgoing : _top;
            for (int l = first; l <= last; l += 2)
            {
                if (l < from.Least)
                    continue;
                Complex twice = (l == 0 ? 1 : 2) * member.Body.Answer(to.Field, from.Field, ElectricEven, outgoing, l);
                for (int other = 0; other < couplings.Length; other++)
                {
                    ComplexMatrix lattice = from.IsEven ? couplings[other].Even : couplings[other].Odd;
                    ComplexMatrix.SubtractScaled(
                        row.Slice(other * _stride + from.Start + from.Least, _top + 1 - from.Least), 0.5 * twice, lattice.Row(l)[from.Least..]);
                }
                for (int n = 0; n < _orders; n++)
                    right[from.Channel + n] += twice * Table(waves, from, n)[l];
                for (int g = 0; from.IsEven && g < _grazing; g++)
                    row[BorderStart + g] -= twice * waves.Even(_orders + g)[l];
            }
        }
    }

    private void FillBorder(in Part part, int body, MultipoleWaves leaving)
    {
        for (int g = 0; g < _grazing; g++)
        {
            Span<Complex> row = _matrix.Row(BorderStart + g).Slice(body * _stride, _stride);
            for (int m = 0; m <= _top; m++)
                row[part.Start + m] = -leaving.Even(_orders + g)[m];
        }
    }

    private void FillResponse(in Part part, int order, int grazing, ReadOnlySpan<RowMember> bodies, Complex gain)
    {
        Span<Complex> response = Response.Row(part.Channel + order);
        if (grazing >= 0)
        {
            _solution.Row(BorderStart + grazing).CopyTo(response);
            return;
        }
        for (int body = 0; body < _bodies; body++)
        {
            ReadOnlySpan<Complex> table = Table(bodies[body].Leaving, part, order);
            for (int m = part.Least; m <= _top; m++)
                ComplexMatrix.SubtractScaled(response, -gain * table[m], _solution.Row(body * _stride + part.Start + m));
        }
    }

    /// <summary>Finds <see cref="Incoming"/> and <see cref="Outgoing"/> for given plane waves.</summary>
    /// <param name="coefficients">Amplitudes of the waves of this symmetry, by channel.</param>
    /// <param name="bodies">The bodies of the last solution.</param>
    /// <param name="couplings">The couplings of the last solution.</param>
    public void SetWaves(ReadOnlySpan<Complex> coefficients, ReadOnlySpan<RowMember> bodies, ReadOnlySpan<RowCoupling> couplings)
    {
        _solution.Apply(coefficients, _outgoing);
        for (int body = 0; body < _bodies; body++)
        {
            foreach (Part part in _parts)
            {
                for (int l = part.Least; l <= _top; l++)
                {
                    Complex sum = 0.5 * FromBodies(part, l, couplings.Slice(body * _bodies, _bodies));
                    for (int n = 0; n < _orders; n++)
                        sum += Table(bodies[body].Arriving, part, n)[l] * coefficients[part.Channel + n];
                    for (int g = 0; part.IsEven && g < _grazing; g++)
                        sum += bodies[body].Arriving.Even(_orders + g)[l] * _outgoing[BorderStart + g];
                    _incoming[body * _stride + part.Start + l] = (l == 0 ? 1 : 2) * sum;
                }
            }
        }
    }

    private Complex FromBodies(in Part part, int l, ReadOnlySpan<RowCoupling> couplings)
    {
        Complex sum = Complex.Zero;
        for (int other = 0; other < couplings.Length; other++)
        {
            ReadOnlySpan<Complex> lattice = (part.IsEven ? couplings[other].Even : couplings[other].Odd).Row(l);
            for (int m = part.Least; m <= _top; m++)
                sum += lattice[m] * _outgoing[other * _stride + part.Start + m];
        }
        return sum;
    }

    private Part MakePart(int field, bool even, int channel, ref int size)
    {
        var part = new Part(field, even, even ? size : size - 1, channel);
        size += even ? _top + 1 : _top;
        return part;
    }

    private static ReadOnlySpan<Complex> Table(MultipoleWaves waves, in Part part, int wave) => part.IsEven ? waves.Even(wave) : waves.Odd(wave);

    private static bool AreFinite(ComplexMatrix matrix)
    {
        foreach (Complex element in matrix.Elements)
        {
            if (!Complex.IsFinite(element))
                return false;
        }
        return true;
    }
}

using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>Joins the pieces of a slab from the top plane down, for one sector: what is left couples the planes.</summary>
/// <remarks>
/// The whole system is A u = s, block tridiagonal over the depths, with the terms of outgoing waves at the planes and
/// s = -2 i kz a on the orders that come in. Unknowns are removed depth by depth; columns of the unit matrix for the incoming
/// orders are carried along, so that in the end the negative inverse of A between those orders stands in their place.
/// Starting from an open plane no partial system is a closed resonator, which could be singular.
/// </remarks>
internal sealed class SlabChain
{
    private readonly ModalSector _sector;
    private readonly int _size;
    private readonly int[] _ports;
    private readonly CrowdedPlanes? _planes;
    private readonly ComplexMatrix? _orders;
    private readonly ComplexMatrix _system;
    private readonly ComplexMatrix _last;

    /// <summary>Scratch for a sector whose incoming orders run from -M to M.</summary>
    /// <param name="sector">The sector.</param>
    /// <param name="mostOrder">Largest incoming order, M.</param>
    /// <param name="planes">What plane waves are in crowded harmonics; null where harmonics are plane waves.</param>
    public SlabChain(in ModalSector sector, int mostOrder, CrowdedPlanes? planes)
    {
        _sector = sector;
        _planes = planes;
        _size = sector.Size;
        ModalSector copy = sector;
        _ports = [.. Enumerable.Range(0, _size).Where(unknown => Math.Abs(PlaneTerms.Unknown(copy, unknown).Harmonic) <= mostOrder)];
        if (planes is not null)
        {
            _orders = new ComplexMatrix(_size, _size);
            FieldBasis e = sector.Electric, h = sector.Magnetic;
            FieldBasis.AddBetween(e, e, planes.Orders, 1, [], [], _orders, 0, 0);
            FieldBasis.AddBetween(h, h, planes.Orders, 1, [], [], _orders, e.Count, e.Count);
        }
        int all = _size + Math.Max(_size + _ports.Length, 2 * _ports.Length);
        _system = new ComplexMatrix(all, all);
        _last = new ComplexMatrix(_size + _ports.Length, _size + _ports.Length);
    }

    /// <summary>Unknowns of the sector that incoming orders reach.</summary>
    public ReadOnlySpan<int> Ports => _ports;

    /// <summary>Whether the equations are symmetric.</summary>
    public bool IsSymmetric { get; set; }

    /// <summary>A row of the unknowns removed last: its factors for them, for those that follow and for the ports.</summary>
    public ReadOnlySpan<Complex> Removed(int row) => _system.Row(row);

    /// <summary>Starts at the top plane.</summary>
    public void Begin(ModalWaves waves, Complex matrix)
    {
        _last.Clear();
        AddOutgoing(waves, matrix, true);
        AddPorts(_last, _size);
    }

    /// <summary>Joins a piece by its Dirichlet-to-Neumann matrix.</summary>
    public bool TryAppend(ComplexMatrix piece)
    {
        int all = 2 * _size + _ports.Length;
        for (int row = 0; row < _size; row++)
        {
            Span<Complex> upper = _system.Row(row), lower = _system.Row(_size + row);
            ReadOnlySpan<Complex> last = _last.Row(row), top = piece.Row(row), bottom = piece.Row(_size + row);
            for (int column = 0; column < _size; column++)
                upper[column] = last[column] + top[column];
            top[_size..].CopyTo(upper[_size..]);
            last[_size..].CopyTo(upper[(2 * _size)..]);
            bottom.CopyTo(lower);
            lower[(2 * _size)..all].Clear();
        }
        for (int port = 0; port < _ports.Length; port++)
        {
            Span<Complex> row = _system.Row(2 * _size + port);
            ReadOnlySpan<Complex> last = _last.Row(_size + port);
            last[.._size].CopyTo(row);
            row.Slice(_size, _size).Clear();
            last[_size..].CopyTo(row[(2 * _size)..]);
        }
        if (!TryReduce(_system, _size, all))
            return false;
        for (int row = 0; row < _last.Rows; row++)
            _system.Row(_size + row).Slice(_size, _last.Columns).CopyTo(_last.Row(row));
        return true;
    }

    /// <summary>Ends at the bottom plane: <paramref name="between"/> receives the inverse between the ports of the top plane (first)
    /// and of the bottom plane.</summary>
    public bool TryEnd(ModalWaves waves, Complex matrix, ComplexMatrix between)
    {
        int ports = _ports.Length, all = _size + 2 * ports;
        AddOutgoing(waves, matrix, false);
        _system.Clear();
        for (int row = 0; row < _last.Rows; row++)
            _last.Row(row).CopyTo(_system.Row(row));
        AddPorts(_system, _size + ports);
        return TryReduce(_system, _size, all) && Extract(_size, 2 * ports, between);
    }

    /// <summary>Ends at a mirror plane half way down where <paramref name="electricEven"/> says whether E is even there (H then odd) or
    /// odd (H even); <paramref name="between"/> receives the inverse between the ports of the top plane.</summary>
    public bool TryEndAtMirror(bool electricEven, ComplexMatrix between)
    {
        // An odd field is zero at the mirror; an even one has no flux through it.
        int first = electricEven ? 0 : _sector.Electric.Count;
        int count = electricEven ? _sector.Electric.Count : _sector.Magnetic.Count;
        int ports = _ports.Length;
        for (int row = 0; row < count + ports; row++)
        {
            ReadOnlySpan<Complex> from = _last.Row(row < count ? first + row : _size + row - count);
            Span<Complex> to = _system.Row(row);
            from.Slice(first, count).CopyTo(to);
            from.Slice(_size, ports).CopyTo(to[count..]);
        }
        return TryReduce(_system, count, count + ports) && Extract(count, ports, between);
    }

    private void AddOutgoing(ModalWaves waves, Complex matrix, bool isTop)
    {
        if (_planes is null)
            PlaneTerms.AddOutgoing(waves, _sector, matrix, isTop, _last);
        else
            _planes.AddOutgoing(waves, _sector, matrix, isTop, _last);
    }

    // What an incoming order does to the unknowns, and what of the order they make.
    private void AddPorts(ComplexMatrix system, int first)
    {
        for (int port = 0; port < _ports.Length; port++)
        {
            if (_orders is null)
            {
                system[_ports[port], first + port] = system[first + port, _ports[port]] = Complex.One;
                continue;
            }
            ReadOnlySpan<Complex> order = _orders.Row(_ports[port]);
            for (int unknown = 0; unknown < _size; unknown++)
            {
                system[first + port, unknown] = order[unknown];
                system[unknown, first + port] = Complex.Conjugate(order[unknown]);
            }
        }
    }

    private bool TryReduce(ComplexMatrix system, int count, int all)
    {
        if (!IsSymmetric)
            return Elimination.TryReduce(system, count, all);
        if (!Elimination.TryReduceSymmetric(system, count, all))
            return false;
        Elimination.MirrorUpper(system, count, all);
        return true;
    }

    private bool Extract(int first, int count, ComplexMatrix between)
    {
        for (int row = 0; row < count; row++)
        {
            for (int column = 0; column < count; column++)
            {
                Complex element = -_system[first + row, first + column];
                if (!Complex.IsFinite(element))
                    return false;
                between[row, column] = element;
            }
        }
        return true;
    }
}

using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>One infinite row of equal round rods at the wavelengths of a pack.</summary>
/// <remarks>
/// The equations of <see cref="MirrorHalf"/> in symmetric form: (1/(e_l T_l) - C_lm/2) b_m = sum of W_nl c_n, W the plane waves as multipoles, and what an
/// order sends out is 2/(P kz) W b. With A = L D L' and V = inverse(L) W the answer of a half is V' inverse(D) V, so that only forward elimination of [A W]
/// and half a product are needed. Amplitudes stand at the plane of the centers: with E and O the answers of the fields even and odd in
/// z, a row reflects E - O and transmits 1 + E + O.
/// </remarks>
internal sealed class RowLanes<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    private readonly double _radiusNm;
    private readonly CouplingShares _shares;
    private readonly Half _even = new();
    private readonly Half _odd = new();
    private readonly LaneBuffer<TLanes> _gains = new();
    private readonly LaneBuffer<TLanes> _amplitudes = new();
    private RodLanes<TLanes>? _rod;
    private FlatRodLanes<TLanes>? _flat;
    private TLanes _square, _flux;
    private RodField _field;
    private int _top;
    private int _orders;

    /// <summary>A row.</summary>
    /// <param name="radiusNm">Radius of its rods, in nm.</param>
    /// <param name="periodNm">Their distance, in nm.</param>
    public RowLanes(double radiusNm, double periodNm)
    {
        _radiusNm = radiusNm;
        _shares = new CouplingShares(radiusNm / periodNm);
        PeriodNm = periodNm;
    }

    /// <summary>Distance of the rods, in nm.</summary>
    public double PeriodNm { get; }

    /// <summary>What the row reflects, from above and from below alike, by order.</summary>
    public LaneBuffer<TLanes> Reflect { get; } = new();

    /// <summary>What it transmits.</summary>
    public LaneBuffer<TLanes> Transmit { get; } = new();

    /// <summary>Least square of a pivot, compared with that of the element it came from: how many digits elimination kept.</summary>
    public TLanes LeastPivot { get; private set; }

    /// <summary>Prepares what both fields share, for round rods.</summary>
    public void SetDirection(RodLanes<TLanes> rod, ChannelLanes<TLanes> channels, LatticeLanes<TLanes> sums, int top)
    {
        (_rod, _flat) = (rod, null);
        SetDirection(channels, sums, top);
    }

    /// <summary>The same for flattened ones.</summary>
    public void SetDirection(FlatRodLanes<TLanes> rod, ChannelLanes<TLanes> channels, LatticeLanes<TLanes> sums, int top)
    {
        (_rod, _flat) = (null, rod);
        SetDirection(channels, sums, top);
    }

    /// <summary>As if there were nothing, not even what lets waves through: for rods without an answer.</summary>
    public void Clear(int orders)
    {
        Reflect.Reserve(orders * orders);
        Transmit.Reserve(orders * orders);
        Reflect.Clear(orders * orders);
        Transmit.Clear(orders * orders);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void SetDirection(ChannelLanes<TLanes> channels, LatticeLanes<TLanes> sums, int top)
    {
        (_top, _orders) = (top, channels.Orders);
        _shares.Reserve(top);
        Reflect.Reserve(_orders * _orders);
        Transmit.Reserve(_orders * _orders);
        _gains.Reserve(_orders);
        _amplitudes.Reserve(2 * _orders + 2 * (top + 1));
        _even.Reserve(top + 1, _orders);
        _odd.Reserve(top, _orders);
        ComplexLanes<TLanes> k = channels.Pack.WaveNumber(Layering.Section.Matrix), inverse = k.Reciprocal();
        TLanes s = TLanes.Broadcast(_radiusNm / 2) * TLanes.Sqrt(k.Norm), square = s * s;
        _square = square;
        _flux = channels.Pack.Permittivity(Layering.Section.Matrix).Reciprocal().Real;
        FillCouplings(sums, square);
        for (int place = 0; place < _orders; place++)
        {
            ComplexLanes<TLanes> kz = channels.Kz(Layering.Section.Matrix, place);
            _gains[place] = TLanes.Broadcast(2 / PeriodNm) * kz.Reciprocal();
            FillWave(place, s, square, channels.Kx(place) * inverse, inverse * kz);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void FillCouplings(LatticeLanes<TLanes> sums, TLanes square)
    {
        TLanes power = TLanes.Broadcast(-0.5);
        for (int l = 0; l <= _top; l++, power *= square)
        {
            for (int m = l; m <= _top; m++)
            {
                ComplexLanes<TLanes> sum = TLanes.Broadcast(-0.5 * _shares.Sum(l, m)) * sums.Sum(m + l);
                ComplexLanes<TLanes> difference = TLanes.Broadcast(_shares.Difference(l, m)) * power * sums.Sum(m - l);
                _even.Set(l, m, difference + sum);
                if (l > 0)
                    _odd.Set(l - 1, m - 1, difference - sum);
            }
        }
    }

    // cos(m a) s^m/m! and sin(m a) s^m/m!.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void FillWave(int place, TLanes s, TLanes square, ComplexLanes<TLanes> cosine, ComplexLanes<TLanes> sine)
    {
        ComplexLanes<TLanes> even = s * cosine, odd = s * sine, evenBefore = ComplexLanes<TLanes>.Broadcast(1), oddBefore = ComplexLanes<TLanes>.Broadcast(0);
        ComplexLanes<TLanes> step = TLanes.Broadcast(2) * s * cosine;
        _even.Set(0, _top + 1 + place, evenBefore);
        for (int m = 1; m <= _top; m++)
        {
            _even.Set(m, _top + 1 + place, even);
            _odd.Set(m - 1, _top + place, odd);
            TLanes next = TLanes.Broadcast(1.0 / (m + 1)), back = TLanes.Broadcast(1 / (m * (m + 1.0))) * square;
            (evenBefore, even) = (even, next * (step * even) - back * evenBefore);
            (oddBefore, odd) = (odd, next * (step * odd) - back * oddBefore);
        }
    }

    /// <summary>Finds <see cref="Reflect"/> and <see cref="Transmit"/> for one field along the rods.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Solve(RodField field)
    {
        _field = field;
        if (_rod is not null)
        {
            LeastPivot = TLanes.Min(_even.Eliminate(_rod, field, 0), _odd.Eliminate(_rod, field, 1));
            _even.FillAnswer();
            _odd.FillAnswer();
        }
        else
        {
            LeastPivot = TLanes.Min(_even.SolveDense(_flat!, field, 0), _odd.SolveDense(_flat!, field, 1));
        }
        ComplexLanes<TLanes> one = ComplexLanes<TLanes>.Broadcast(1);
        for (int row = 0; row < _orders; row++)
        {
            ComplexLanes<TLanes> gain = _gains[row];
            for (int column = row; column < _orders; column++)
            {
                ComplexLanes<TLanes> even = _even.Answer(row, column), odd = _odd.Answer(row, column);
                Reflect[row * _orders + column] = gain * (even - odd);
                Transmit[row * _orders + column] = gain * (even + odd);
                if (_flat is not null)
                    (even, odd) = (_even.Answer(column, row), _odd.Answer(column, row));
                Reflect[column * _orders + row] = _gains[column] * (even - odd);
                Transmit[column * _orders + row] = _gains[column] * (even + odd);
            }
            Transmit[row * _orders + row] += one;
        }
    }

    /// <summary>Power into the rods and into their cores, times the period, from the waves that arrive at the plane of the centers.</summary>
    /// <param name="down">Downward amplitudes, by order.</param>
    /// <param name="up">Upward amplitudes.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public (TLanes Rod, TLanes Core) PowerInto(LaneBuffer<TLanes> down, LaneBuffer<TLanes> up)
    {
        TLanes rod = TLanes.Broadcast(0), core = rod;
        for (int which = 0; which < 2; which++)
        {
            for (int place = 0; place < _orders; place++)
                _amplitudes[place] = which == 0 ? down[place] + up[place] : down[place] - up[place];
            Half half = which == 0 ? _even : _odd;
            if (_rod is null)
            {
                rod += half.PowerInto(_amplitudes, _orders, which, _square, _field == RodField.Electric ? TLanes.Broadcast(1) : _flux);
                continue;
            }
            half.SolveFor(_amplitudes, 2 * _orders);
            for (int m = which; m <= _top; m++)
            {
                TLanes norm = _amplitudes[2 * _orders + m - which].Norm;
                rod = TLanes.MultiplyAdd(_rod.Power(_field, m), norm, rod);
                core = TLanes.MultiplyAdd(_rod.CorePower(_field, m), norm, core);
            }
        }
        return (rod, core);
    }

    /// <summary>The equations of one mirror symmetry, with the waves as right sides behind the unknowns.</summary>
    private sealed class Half
    {
        private readonly LaneBuffer<TLanes> _base = new();
        private readonly LaneBuffer<TLanes> _upper = new();
        private readonly LaneBuffer<TLanes> _scaled = new();
        private readonly LaneBuffer<TLanes> _answer = new();
        private readonly LaneBuffer<TLanes> _sent = new();
        private int _size;
        private int _orders;
        private int _width;

        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        public void Reserve(int size, int orders)
        {
            (_size, _orders, _width) = (size, orders, size + orders);
            _base.Reserve(size * _width);
            _upper.Reserve(size * _width);
            _scaled.Reserve(size * _width);
            _answer.Reserve(orders * orders);
        }

        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        public void Set(int row, int column, ComplexLanes<TLanes> value) => _base[row * _width + column] = value;

        /// <summary>Of the answer to round rods, which is symmetric, only what stands on and right of the diagonal.</summary>
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        public ComplexLanes<TLanes> Answer(int row, int column) => -_answer[row * _orders + column];

        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        public TLanes Eliminate(RodLanes<TLanes> rod, RodField field, int least)
        {
            TLanes leastPivot = TLanes.Broadcast(double.MaxValue);
            int step = _width * ComplexLanes<TLanes>.Stride;
            for (int row = 0; row < _size; row++)
            {
                int start = row * _width;
                ComplexLanes<TLanes> own = _base[start + row] + rod.Inverse(field, row + least);
                _upper[start + row] = own;
                for (int column = row + 1; column < _width; column++)
                    _upper[start + column] = _base[start + column];
                LaneAlgebra<TLanes>.Add(ref _upper.At(start + row), ref _scaled.At(row), step, ref _upper.At(row), step, row, _width - row);
                ComplexLanes<TLanes> pivot = _upper[start + row];
                TLanes norm = pivot.Norm, inverse = TLanes.Broadcast(-1) / norm;
                leastPivot = TLanes.Min(leastPivot, norm / own.Norm);
                ComplexLanes<TLanes> factor = inverse * pivot.Conjugate;
                for (int column = row + 1; column < _width; column++)
                    _scaled[start + column] = factor * _upper[start + column];
            }
            return leastPivot;
        }

        /// <summary>(1 - P C/2) b = P W c for bodies whose answer P couples multipoles of equal parity: b by wave is left behind.</summary>
        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        public TLanes SolveDense(FlatRodLanes<TLanes> rod, RodField field, int least)
        {
            int stride = ComplexLanes<TLanes>.Stride;
            for (int row = 0; row < _size; row++)
            {
                for (int column = 0; column < row; column++)
                    _base[row * _width + column] = _base[column * _width + row];
            }
            _sent.Reserve(_size * _orders);
            _upper.Clear(_size * _size);
            _sent.Clear(_size * _orders);
            for (int row = 0; row < _size; row++)
            {
                // Multipoles of the row's parity alone answer.
                int first = row % 2, terms = (_size - first + 1) / 2;
                ref double answers = ref rod.Answers(field, least, row + least, first + least);
                LaneAlgebra<TLanes>.Add(ref _upper.At(row * _size), ref answers, 2 * stride, ref _base.At(first * _width), 2 * _width * stride, terms, _size);
                LaneAlgebra<TLanes>.Add(ref _sent.At(row * _orders), ref answers, 2 * stride, ref _base.At(first * _width + _size), 2 * _width * stride, terms, _orders);
                _upper[row * _size + row] += ComplexLanes<TLanes>.Broadcast(1);
            }
            TLanes leastPivot = LaneAlgebra<TLanes>.Solve(_upper, _size, _sent, _orders);
            _answer.Clear(_orders * _orders);
            for (int row = 0; row < _orders; row++)
            {
                LaneAlgebra<TLanes>.Add(
                    ref _answer.At(row * _orders), ref _base.At(_size + row), _width * stride, ref _sent.At(0), _orders * stride, _size, _orders);
                for (int column = 0; column < _orders; column++)
                    _answer[row * _orders + column] = -_answer[row * _orders + column];
            }
            return leastPivot;
        }

        /// <summary>Power into a body, times the period, for a real wave number: by the Wronskian -(2/pi) weight (|b|^2 + Re(conj(a) b)) for each
        /// multipole.</summary>
        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        public TLanes PowerInto(LaneBuffer<TLanes> amplitudes, int orders, int least, TLanes square, TLanes flux)
        {
            int outgoing = 2 * orders;
            for (int row = 0; row < _size; row++)
            {
                ComplexLanes<TLanes> sent = ComplexLanes<TLanes>.Broadcast(0);
                for (int place = 0; place < orders; place++)
                    sent = ComplexLanes<TLanes>.MultiplyAdd(_sent[row * orders + place], amplitudes[place], sent);
                amplitudes[outgoing + row] = sent;
            }
            TLanes total = TLanes.Broadcast(0), scale = TLanes.Broadcast(1);
            for (int row = 0; row < _size; row++)
            {
                int m = row + least;
                if (m > 0)
                    scale *= square * TLanes.Broadcast(1 / ((double)m * m));
                ComplexLanes<TLanes> arriving = ComplexLanes<TLanes>.Broadcast(0), sent = amplitudes[outgoing + row];
                for (int place = 0; place < orders; place++)
                    arriving = ComplexLanes<TLanes>.MultiplyAdd(_base[row * _width + _size + place], amplitudes[place], arriving);
                for (int column = 0; column < _size; column++)
                    arriving = ComplexLanes<TLanes>.SubtractProduct(_base[row * _width + column], amplitudes[outgoing + column], arriving);
                arriving = TLanes.Broadcast(m == 0 ? 1 : 2) * arriving;
                TLanes power = TLanes.MultiplyAdd(scale, sent.Norm, (arriving.Conjugate * sent).Real);
                total = TLanes.SubtractProduct(TLanes.Broadcast(m == 0 ? 4 : 2) * flux, power, total);
            }
            return total;
        }

        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        public void FillAnswer()
        {
            _answer.Clear(_orders * _orders);
            int step = _width * ComplexLanes<TLanes>.Stride;
            for (int row = 0; row < _orders; row++)
            {
                LaneAlgebra<TLanes>.Add(
                    ref _answer.At(row * _orders + row), ref _scaled.At(_size + row), step, ref _upper.At(_size + row), step, _size, _orders - row);
            }
        }

        // Outgoing amplitudes, from what the first elements of the buffer send; they are put behind.
        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        public void SolveFor(LaneBuffer<TLanes> amplitudes, int to)
        {
            for (int row = _size - 1; row >= 0; row--)
            {
                ComplexLanes<TLanes> sum = ComplexLanes<TLanes>.Broadcast(0);
                for (int place = 0; place < _orders; place++)
                    sum = ComplexLanes<TLanes>.SubtractProduct(_scaled[row * _width + _size + place], amplitudes[place], sum);
                for (int column = row + 1; column < _size; column++)
                    sum = ComplexLanes<TLanes>.MultiplyAdd(_scaled[row * _width + column], amplitudes[to + column], sum);
                amplitudes[to + row] = sum;
            }
        }
    }
}

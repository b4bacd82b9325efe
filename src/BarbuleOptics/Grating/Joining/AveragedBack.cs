using System.Numerics;
using static BarbuleOptics.Multilayer.StableFunctions;

namespace BarbuleOptics.Grating.Joining;

/// <summary>The backing as a slab of no certain thickness: powers averaged over the phases of its round trips.</summary>
/// <remarks>
/// Down waves D and up waves U at the slab's upper face: U = b g X D, with b the reflection of the lower face, g the decay and X the phase
/// of a round trip, and D = t + r U, with t what comes through the rows and r what they reflect to below. With Q = r b g the mean of D D* is
/// C = t t* + Q C Q* within each order, whose s and p share their phase; different orders run apart, and only their powers add:
/// between orders C is zero. With one order this is the same average as that of the multilayer solver.
/// The mean of D D* X* needed for the power lost is C Q*, and waves that enter the rows from above and from below
/// add their powers. Orders that fade in the slab before they turn do not come back: the slab takes them.
/// </remarks>
internal sealed class AveragedBack(StackSolver stack)
{
    private Complex[] _below = [];
    private Complex[] _passed = [];
    private Complex[] _entering = [];
    private Complex[] _leaving = [];
    private Complex[] _mean = [];
    private double[] _lost = [];
    private int[] _orders = [];
    private int _count;
    private LinearSolver? _solver;
    private ComplexMatrix? _system;
    private int _size;

    private StackPlan Plan => stack.Plan;

    private ChannelTable Table => stack.Bottom;

    private int Channels => Table.Channels;

    // One polarization an order, or two.
    private int Width => Channels / Table.Orders;

    /// <summary>Whether the zeroth order turns faster than it fades, so that there is something to average.</summary>
    public static bool HasFringes(in PointLight light, Complex permittivity, double thicknessNm)
    {
        Complex squared = light.ZerothDepthSquared(permittivity);
        return HasFringes(UpperSqrt(squared.Real, squared.Imaginary) * light.K0, thicknessNm);
    }

    /// <summary>Finds what the rows reflect to below, and solves for all paths in the slab.</summary>
    /// <returns>False where there is no finite solution.</returns>
    public bool TryPrepare()
    {
        if (!stack.TryClimb(fromBelow: true))
            return false;
        Reserve();
        for (int to = 0; to < Channels; to++)
        {
            for (int from = 0; from < Channels; from++)
                _below[to * Channels + from] = stack.Total[to, from];
        }
        _count = 0;
        for (int order = 0; order < Table.Orders; order++)
        {
            if (HasFringes(Table.Kz(Plan.Backing)[order], ThicknessNm))
                _orders[_count++] = order;
        }
        return TryFactor();
    }

    /// <summary>Takes what came through the rows over.</summary>
    public void Take(ReadOnlySpan<Complex> leaving, int polarization) => leaving.CopyTo(_passed.AsSpan(polarization * Channels));

    /// <summary>Adds what the slab lets through, takes, and sends back.</summary>
    /// <returns>False where there is no finite solution.</returns>
    public bool TryAdd(in OutcomeLayout layout, Span<double> outcome, int polarization, double orderPeriodNm)
    {
        SolveMean(_passed.AsSpan(polarization * Channels, Channels));
        double incident = stack.Top.Eta(Plan.Surround)[stack.Top.Incident(polarization == 1)].Real;
        Array.Clear(_lost);
        int cells = PointSolver.CellsOf(Table, orderPeriodNm);
        double lost = Faded(polarization);
        for (int at = 0; at < _count; at++)
        {
            for (int i = 0; i < Width; i++)
            {
                int channel = ChannelOf(at, i);
                layout.AddTransmitted(outcome, Table.OrderOf(channel) * cells, Behind(at, i) / incident);
                lost += LostIn(at, i);
            }
        }
        _lost[^1] = lost;
        layout.AddLost(outcome, _lost, incident);
        return TrySendBack(layout, outcome, incident, orderPeriodNm);
    }

    private double ThicknessNm => Plan.Section.Back!.Thickness.CentralNm;

    private static bool HasFringes(Complex kz, double thicknessNm) => kz.Real > kz.Imaginary && (kz.Imaginary == 0 || kz.Real * thicknessNm >= 1);

    private int ChannelOf(int at, int polarization) => _orders[at] + polarization * Table.Orders;

    private Complex Face(int channel)
    {
        Complex own = Table.Eta(Plan.Backing)[channel], behind = Table.Eta(Plan.Behind)[channel];
        return own == behind ? Complex.Zero : (own - behind) / (own + behind);
    }

    // exp(-2 k'' d): what a power keeps on one way, an amplitude on a round trip.
    private double Kept(int channel) => Math.Exp(-2 * Table.Kz(Plan.Backing)[channel % Table.Orders].Imaginary * ThicknessNm);

    private Complex RoundTrip(int to, int from) => _below[to * Channels + from] * Face(from) * Kept(from);

    private Complex Mean(int at, int i, int j) => _mean[(at * Width + i) * Width + j];

    private bool TryFactor()
    {
        int width = Width, size = _count * width * width;
        if (size != _size || _solver is null)
        {
            _solver = new LinearSolver(size);
            _system = new ComplexMatrix(size, size);
            _size = size;
        }
        for (int row = 0; row < size; row++)
        {
            int i = ChannelOf(row / (width * width), row / width % width), j = ChannelOf(row / (width * width), row % width);
            for (int column = 0; column < size; column++)
            {
                int k = ChannelOf(column / (width * width), column / width % width), l = ChannelOf(column / (width * width), column % width);
                _system![row, column] = -RoundTrip(i, k) * Complex.Conjugate(RoundTrip(j, l));
            }
            // The last digit keeps apart from zero what is shut in altogether; nothing gets in there either.
            _system![row, row] += 1 + 1e-15;
        }
        return size == 0 || _solver.TryFactor(_system!);
    }

    private void SolveMean(ReadOnlySpan<Complex> passed)
    {
        int width = Width;
        for (int row = 0; row < _size; row++)
        {
            int i = ChannelOf(row / (width * width), row / width % width), j = ChannelOf(row / (width * width), row % width);
            _mean[row] = passed[i] * Complex.Conjugate(passed[j]);
        }
        if (_size > 0)
            _solver!.Solve(_mean.AsSpan(0, _size));
    }

    private double Behind(int at, int i)
    {
        int channel = ChannelOf(at, i);
        Complex own = Table.Eta(Plan.Backing)[channel], behind = Table.Eta(Plan.Behind)[channel];
        return behind.Real * Mean(at, i, i).Real * Kept(channel) * 4 * Norm(own) / Norm(own + behind);
    }

    private double LostIn(int at, int i)
    {
        int channel = ChannelOf(at, i);
        Complex permittivity = Table.Permittivity(Plan.Backing), kz = Table.Kz(Plan.Backing)[_orders[at]], face = Face(channel);
        if (permittivity.Imaginary == 0)
            return 0;
        double own = Mean(at, i, i).Real, kept = Kept(channel);
        Complex turned = Complex.Zero;
        for (int k = 0; k < Width; k++)
            turned += Mean(at, i, k) * Complex.Conjugate(RoundTrip(channel, ChannelOf(at, k)));
        double depthNm = kz.Imaginary == 0 ? ThicknessNm : Decay(2 * kz.Imaginary * ThicknessNm).Faded / (2 * kz.Imaginary);
        double direct = own * depthNm * (1 + Norm(face) * kept);
        double cross = kept * (face * (turned - own)).Imaginary / kz.Real;
        double psi = Norm(Table.Eta(Plan.Backing)[channel]) * (direct - cross);
        double phi = direct + cross;
        return Table.Waves.K0 * permittivity.Imaginary
            * (Table.IsP(channel) ? Table.LateralSquared(channel) / Norm(permittivity) * phi + psi : phi);
    }

    // Mean of U U*, within one order.
    private Complex Up(int at, int i, int j)
    {
        int one = ChannelOf(at, i), other = ChannelOf(at, j);
        return Face(one) * Complex.Conjugate(Face(other)) * Kept(one) * Kept(other) * Mean(at, i, j);
    }

    private double Faded(int polarization)
    {
        double lost = 0;
        for (int channel = 0; channel < Channels; channel++)
        {
            if (_orders.AsSpan(0, _count).Contains(channel % Table.Orders))
                continue;
            double size = Norm(_passed[polarization * Channels + channel]);
            for (int at = 0; at < _count; at++)
            {
                for (int i = 0; i < Width; i++)
                {
                    for (int j = 0; j < Width; j++)
                    {
                        Complex one = _below[channel * Channels + ChannelOf(at, i)], other = _below[channel * Channels + ChannelOf(at, j)];
                        size += (one * Up(at, i, j) * Complex.Conjugate(other)).Real;
                    }
                }
            }
            lost += Table.Eta(Plan.Backing)[channel].Real * size;
        }
        return lost;
    }

    // Each order's mean is a sum of at most two coherent waves (its Cholesky factor), which are sent up one by one.
    private bool TrySendBack(in OutcomeLayout layout, Span<double> outcome, double incident, double orderPeriodNm)
    {
        if (!stack.TryClimb(fromBelow: true))
            return false;
        for (int at = 0; at < _count; at++)
        {
            double first = Math.Sqrt(Math.Max(0, Up(at, 0, 0).Real));
            if (Width == 1)
            {
                if (first > 0 && !TrySend(at, first, Complex.Zero, layout, outcome, incident, orderPeriodNm))
                    return false;
                continue;
            }
            Complex along = first > 0 ? Up(at, 1, 0) / first : Complex.Zero;
            double second = Math.Sqrt(Math.Max(0, Up(at, 1, 1).Real - Norm(along)));
            if (first > 0 && !TrySend(at, first, along, layout, outcome, incident, orderPeriodNm))
                return false;
            if (second > 0 && !TrySend(at, Complex.Zero, second, layout, outcome, incident, orderPeriodNm))
                return false;
        }
        return true;
    }

    private bool TrySend(int at, Complex s, Complex p, in OutcomeLayout layout, Span<double> outcome, double incident, double orderPeriodNm)
    {
        Span<Complex> entering = _entering.AsSpan(0, Channels), leaving = _leaving.AsSpan(0, Channels);
        entering.Clear();
        entering[ChannelOf(at, 0)] = s;
        if (Width > 1)
            entering[ChannelOf(at, 1)] = p;
        Array.Clear(_lost);
        if (!stack.TryDescend(entering, leaving, _lost))
            return false;
        layout.AddLost(outcome, _lost, incident);
        ReadOnlySpan<Complex> eta = stack.Top.Eta(Plan.Surround);
        int cells = PointSolver.CellsOf(stack.Top, orderPeriodNm);
        for (int channel = 0; channel < Channels; channel++)
        {
            double power = eta[channel].Real / incident * Norm(leaving[channel]);
            if (power > 0)
                layout.AddReflected(outcome, stack.Top.OrderOf(channel) * cells, power);
        }
        return true;
    }

    private void Reserve()
    {
        if (_entering.Length < Channels)
        {
            _below = new Complex[Channels * Channels];
            _passed = new Complex[2 * Channels];
            _entering = new Complex[Channels];
            _leaving = new Complex[Channels];
            _mean = new Complex[Table.Orders * 4];
            _orders = new int[Table.Orders];
        }
        if (_lost.Length == 0)
            _lost = new double[Plan.Section.Materials.Count + 1];
    }
}

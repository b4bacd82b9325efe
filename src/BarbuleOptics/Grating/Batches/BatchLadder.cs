using System.Runtime.CompilerServices;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Batches;

/// <summary>The resolutions that a block climbs through: multipoles rise by two, harmonics of slabs and orders with them as in
/// <see cref="ResolutionLadder"/>.</summary>
internal sealed class BatchLadder
{
    /// <summary>Most steps.</summary>
    public const int MostSteps = 12;

    private const int MostMultipoles = 22;

    /// <summary>Harmonics of a slab by the step.</summary>
    private static readonly int[] Harmonics = [2, 3, 5, 7, 10, 14, 20, 28, 40, 56, 80];

    /// <summary>Beyond, one wavelength at a time costs no more.</summary>
    private const int MostOrders = 16;

    private const double MostGrowth = 1e6;
    private const double Rounding = 1e-12;

    /// <summary>R, T and A with two numbers of multipoles differ by up to 6e-6 at aspect 3 with a wide core, where orders stay the same.</summary>
    private const double FlatRodError = 1e-5;

    /// <summary>Distance in depth, in periods, below which slabs count as touching.</summary>
    private const double Touching = 0.02;

    private readonly PlanGroup _group;
    private readonly bool _hasFlatRods;
    private readonly int _most;

    public BatchLadder(StackPlan plan)
    {
        _group = plan.Groups[0];
        _hasFlatRods = plan.Kinds.Any(kind => kind is RodKind rods && !rods.Rods[0].IsRound);
        _most = MostMultipoles;
        while (_most > 7 && 2 * _most * Math.Log(_group.Overlap) > Math.Log(MostGrowth))
            _most--;
    }

    /// <summary>What is made of errors: those of slabs fall unevenly, and slowly where rows touch in depth.</summary>
    public ProbeErrors NewErrors()
        => !_group.HasSlabs ? new(1.4, 0.01, isEven: true, LeastError)
            : _group.HasCuts || _group.ClearNm < Touching * _group.PeriodNm ? new(4, 0.3, isEven: false, LeastError)
            : new(2, 0.08, isEven: false, LeastError);

    /// <summary>Errors that no step shows: rounding, and what the answers of flattened rods leave.</summary>
    public double LeastError => _hasFlatRods ? FlatRodError : Rounding;

    /// <summary>Whether there is a step after one.</summary>
    public bool HasNext(int start, int step, int leastOrders)
    {
        int next = start + 2 * (step + 1);
        return step + 1 < MostSteps && next <= _most && At(next, leastOrders).Orders <= MostOrders;
    }

    /// <summary>Multipoles to begin with: the step after them is mostly enough. Errors of usual rods at short waves fall tenfold with each
    /// multipole, from 0.03 with one.</summary>
    public int StartFor(double accuracy) => _group.HasSlabs
        ? Math.Clamp(2 * (int)Math.Floor(-Math.Log10(accuracy) + 0.1) - 3, 3, 9)
        : Math.Clamp((int)Math.Round(-Math.Log10(accuracy)) - 2, 1, 9);

    /// <summary>One step.</summary>
    /// <param name="multipoles">Largest multipole.</param>
    /// <param name="leastOrders">Largest order that travels in any medium.</param>
    public Resolution At(int multipoles, int leastOrders)
    {
        int orders = Math.Max(1 + (multipoles + 1) / 4, Math.Max(1, leastOrders));
        // Multipoles of flat rods follow from the orders, which rise one by one.
        if (_hasFlatRods)
            orders = Math.Max(1, leastOrders) + (multipoles - 1) / 2;
        else if (_group.HasRods)
            orders = Math.Max(orders, (int)Math.Ceiling(1.3 * multipoles * _group.PeriodNm / (Math.PI * _group.NearestNm)));
        if (!_group.HasSlabs)
            return new Resolution(orders, multipoles, 0, 0);
        int harmonics = Harmonics[(multipoles - 1) / 2] + leastOrders;
        // Steps whose orders stood still would not show what the orders left out carry, exp(-2 k g) over a gap g and back.
        double needed = _group.PeriodNm * Math.Log(30.0 * harmonics * harmonics) / (4 * Math.PI * Math.Max(_group.ClearNm, 1e-3 * _group.PeriodNm));
        orders = Math.Max(orders, _group.HasCuts ? harmonics : (int)Math.Min(harmonics, Math.Ceiling(needed)));
        return new Resolution(Math.Max(orders, 1 + (multipoles + 3) / 4), multipoles, harmonics, 0);
    }

    /// <summary>Largest order that travels in any medium at a wavelength.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static int LeastOrders(SectionPermittivities structure, int wavelength, double sine, double periodNm)
    {
        double index = structure.SurroundIndex[wavelength], largest = Math.Max(index * index, structure.Backing[wavelength].Real);
        foreach (System.Numerics.Complex permittivity in structure.Inside(wavelength))
            largest = Math.Max(largest, permittivity.Real);
        if (!structure.Behind.IsEmpty)
            largest = Math.Max(largest, structure.Behind[wavelength].Real);
        return largest <= 0 ? 0 : (int)Math.Floor((Math.Sqrt(largest) + index * sine) * periodNm / structure.WavelengthsNm[wavelength]);
    }
}

using System.Numerics;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>The orders that propagate on one side of a section at one angle of incidence.</summary>
/// <remarks>Order n propagates where (k0 n_s sin a cos b + 2 pi n/P)^2 + (k0 n_s sin a sin b)^2 lies below k0^2 times the real part of the medium's
/// permittivity: in a medium that absorbs, the orders that would without its losses.</remarks>
internal sealed class OrderFan
{
    private readonly bool[] _propagates;
    private readonly int _count;

    /// <summary>Finds the orders.</summary>
    /// <param name="side">Which side it is.</param>
    /// <param name="periodNm">The period, in nm; 0 where there is none, and with it no order but the zeroth.</param>
    /// <param name="grid">The wavelengths.</param>
    /// <param name="transverse">Wave vector of the incident light over k0, across the rods and along them, at each wavelength.</param>
    /// <param name="permittivities">Permittivity of the medium, at each wavelength.</param>
    public OrderFan(OrderSide side, double periodNm, WavelengthGrid grid, IReadOnlyList<(double Across, double Along)> transverse, ReadOnlySpan<Complex> permittivities)
    {
        (Side, PeriodNm, _count) = (side, periodNm, grid.Count);
        Most = 0;
        for (int w = 0; w < grid.Count && periodNm > 0; w++)
        {
            double reach = Math.Sqrt(Math.Max(0, permittivities[w].Real)) + Math.Abs(transverse[w].Across);
            Most = Math.Max(Most, (int)Math.Floor(reach * periodNm / grid.Nanometres[w] + 1e-9));
        }
        _propagates = new bool[(2 * Most + 1) * grid.Count];
        for (int order = -Most; order <= Most; order++)
        {
            for (int w = 0; w < grid.Count; w++)
            {
                double across = transverse[w].Across + (order == 0 ? 0 : order * grid.Nanometres[w] / periodNm), along = transverse[w].Along;
                _propagates[(order + Most) * grid.Count + w] = across * across + along * along < permittivities[w].Real;
            }
        }
    }

    /// <summary>Which side it is.</summary>
    public OrderSide Side { get; }

    /// <summary>The period, in nm.</summary>
    public double PeriodNm { get; }

    /// <summary>The largest number, either sign, of an order that propagates at some wavelength.</summary>
    public int Most { get; }

    /// <summary>Number of orders from -<see cref="Most"/> to <see cref="Most"/>.</summary>
    public int Count => 2 * Most + 1;

    /// <summary>Whether an order propagates, at each wavelength.</summary>
    public ReadOnlySpan<bool> Propagates(int order) => _propagates.AsSpan((order + Most) * _count, _count);
}

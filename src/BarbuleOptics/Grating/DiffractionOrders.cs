using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating;

/// <summary>Which orders of diffraction travel outside a section.</summary>
public static class DiffractionOrders
{
    /// <summary>The largest orders at any of the wavelengths and angles.</summary>
    /// <param name="structure">The section at its wavelengths.</param>
    /// <param name="incidences">Angles of incidence in the surround, 0 to below 90 degrees.</param>
    /// <remarks>Order n travels in a medium of index n_m where |(kx0 + 2 pi n/P, ky)| &lt; k0 n_m; in an absorbing one
    /// the real part of the permittivity decides.</remarks>
    public static OrderExtent Of(SectionPermittivities structure, IReadOnlyList<Angle> incidences)
    {
        ArgumentNullException.ThrowIfNull(structure);
        ArgumentNullException.ThrowIfNull(incidences);
        if (SpacingPlan.Of(structure.Section).PeriodNm is not double periodNm)
            return new OrderExtent(0, 0, null);
        int reflected = 0, transmitted = 0;
        ReadOnlySpan<Complex> last = structure.Behind.IsEmpty ? structure.Backing : structure.Behind;
        foreach (Angle incidence in incidences)
        {
            (double across, double along) = Incident(structure.Section, incidence);
            for (int w = 0; w < structure.WavelengthsNm.Length; w++)
            {
                double step = structure.WavelengthsNm[w] / periodNm, index = structure.SurroundIndex[w];
                reflected = Math.Max(reflected, Most(index * index, index * across, index * along, step));
                transmitted = Math.Max(transmitted, Most(last[w].Real, index * across, index * along, step));
            }
        }
        return new OrderExtent(reflected, transmitted, periodNm);
    }

    /// <summary>Direction of the incident wave along the surface, as parts of its wave number across and along the rods.</summary>
    internal static (double Across, double Along) Incident(Section section, Angle incidence)
    {
        double sine = Math.Sin(incidence.Radians);
        // Exact zeros where the rods lie exactly across or along.
        if (section.IsAcross)
            return (sine, 0);
        return section.IsAlong ? (0, sine) : (sine * Math.Cos(section.Axis.Radians), sine * Math.Sin(section.Axis.Radians));
    }

    // All in units of k0: |across + n step| < sqrt(permittivity - along^2).
    private static int Most(double permittivity, double across, double along, double step)
    {
        double reach = permittivity - along * along;
        return reach <= 0 ? 0 : Math.Max(0, (int)Math.Floor((Math.Sqrt(reach) + Math.Abs(across)) / step));
    }
}

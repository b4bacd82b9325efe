using BarbuleOptics.Layering;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating;

/// <summary>Direction of the incident wave as the rods see it.</summary>
internal static class IncidentDirection
{
    /// <summary>Its wave vector along the surface, as shares of its wave number across and along the rods.</summary>
    public static (double Across, double Along) Of(Section section, Angle incidence)
    {
        double sine = Math.Sin(incidence.Radians);
        // Exact zeros where the rods lie exactly across or along.
        if (section.IsAcross)
            return (sine, 0);
        return section.IsAlong ? (0, sine) : (sine * Math.Cos(section.Axis.Radians), sine * Math.Sin(section.Axis.Radians));
    }
}

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>The incident plane wave.</summary>
/// <param name="WavelengthNm">Vacuum wavelength, in nm.</param>
/// <param name="IncidenceDeg">Angle of incidence in the surround, in degrees.</param>
/// <param name="IsP">Whether the magnetic field (true) or the electric one is normal to the plane of incidence.</param>
/// <param name="AxisDeg">Angle from the normal of the plane of incidence to the rods, in degrees: 0 across, 90 along.</param>
internal readonly record struct PlainLight(double WavelengthNm, double IncidenceDeg, bool IsP, double AxisDeg = 0)
{
    public double K0 => 2 * Math.PI / WavelengthNm;

    /// <summary>Sine of the angle of incidence.</summary>
    public double Sine => Math.Sin(double.DegreesToRadians(IncidenceDeg));

    /// <summary>Share of the wave vector's part along the surface that lies across the rods.</summary>
    public double Across => Math.Cos(double.DegreesToRadians(AxisDeg));

    /// <summary>Share of the wave vector's part along the surface that lies along the rods; exactly 0 at 0 degrees.</summary>
    public double Along => Math.Sin(double.DegreesToRadians(AxisDeg));
}

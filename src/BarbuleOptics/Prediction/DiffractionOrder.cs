using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>The power that one incident beam sends into one direction.</summary>
/// <param name="Incidence">Angle of incidence in the surround.</param>
/// <param name="Polarization">Polarization of the incident light; both outgoing ones are counted.</param>
/// <param name="Side">Where the order leaves.</param>
/// <param name="Order">Its number n: the wave vector across the rods is that of the incident light plus 2 pi n / period; 0 is the mirror's direction.</param>
/// <param name="PeriodNm">The period it belongs to, in nm.</param>
/// <param name="Propagates">Whether it does, at each wavelength; elsewhere its efficiency is 0.</param>
/// <param name="Efficiency">Its share of the incident power.</param>
public sealed record DiffractionOrder(
    Angle Incidence, Polarizations Polarization, OrderSide Side, int Order, double PeriodNm, ValueList<bool> Propagates, Spectrum Efficiency);

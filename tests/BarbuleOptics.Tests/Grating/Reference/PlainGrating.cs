using System.Numerics;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>Slices between two half-spaces, one period along x.</summary>
/// <param name="PeriodNm">The period, in nm.</param>
/// <param name="SurroundIndex">Real index of the half-space the light comes from.</param>
/// <param name="Slices">In the order in which the light meets them.</param>
/// <param name="Backing">Permittivity of the half-space below.</param>
internal sealed record PlainGrating(double PeriodNm, double SurroundIndex, IReadOnlyList<PlainSlice> Slices, Complex Backing);

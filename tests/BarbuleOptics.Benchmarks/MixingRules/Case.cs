using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Benchmarks.MixingRules;

/// <summary>One structure at one angle in one polarization by one rule.</summary>
internal sealed record Case(string Structure, string Form, double IncidenceDeg, Polarizations Polarization, IMixingRule Rule, bool OrdersInMatrix, Distance Distance);

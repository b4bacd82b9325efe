using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra.Instruments;

namespace BarbuleOptics.Prediction;

/// <summary>What diffracted orders add to a signal: light of all facets whose order falls into the collection cone.</summary>
/// <remarks>
/// An order leaves a facet with the share across the rods u' = -u + n wavelength/(index P), light arriving from u, and the share along v' = -v. Directions of light and facets are taken on
/// fixed grids, efficiencies interpolated between few directions; the error estimate is the change when every second direction of light is left out.
/// </remarks>
internal sealed class CollectedOrders
{
    private const int SineLevel = 3;
    private const int AcrossLevel = 1;

    private readonly Section _section;
    private readonly PredictionConditions _conditions;
    private readonly double[] _surroundIndex;
    private readonly double? _periodNm;

    /// <summary>Orders of a section.</summary>
    public CollectedOrders(Section section, SolverPlan plan, PredictionConditions conditions, IMaterialCatalog catalog)
    {
        (_section, _conditions) = (section, conditions);
        _surroundIndex = new SectionPermittivities(section, catalog, conditions.Wavelengths.Nanometres).SurroundIndex.ToArray();
        _periodNm = plan.IsRigorous ? SpacingPlan.Of(section).PeriodNm : null;
    }

    /// <summary>The signal of the orders, against a perfect mirror that faces the arms, and its error estimate.</summary>
    public (double[] Signal, double Error) At(Instrument instrument, Angle angle, SignalSpectra spectra)
    {
        var none = new double[_conditions.Wavelengths.Count];
        // In no direction does an order travel with waves longer than twice the period.
        if (_periodNm is not double periodNm || _conditions.Wavelengths.StartNm >= 2 * periodNm * _surroundIndex.Max())
            return (none, 0);
        List<Ray> rays = Rays(instrument, angle);
        if (rays.Count == 0)
            return (none, 0);
        (_, Direction collector) = instrument.Arms.At(angle);
        var box = new DirectionBox(rays.Select(ray => (ray.SineSquared, ray.AcrossShare)));
        GridDirection[] nodes = [.. box.Nodes(SineLevel, AcrossLevel)];
        spectra.Prepare(nodes);
        double[] all = new double[none.Length], half = new double[none.Length];
        double least = Math.Cos(instrument.Collection.Radians);
        Parallel.For(0, none.Length, new ParallelOptions { MaxDegreeOfParallelism = _conditions.Threads }, w =>
        {
            double step = _conditions.Wavelengths.Nanometres[w] / (_surroundIndex[w] * periodNm);
            var weights = new double[nodes.Length];
            foreach (Ray ray in rays)
            {
                int most = (int)Math.Floor((1 + Math.Abs(ray.U)) / step);
                for (int order = -most; order <= most; order++)
                {
                    double u = order * step - ray.U, rest = 1 - u * u - ray.V * ray.V;
                    if (order == 0 || rest <= 0 || ray.Out(u, Math.Sqrt(rest)).Dot(collector) < least)
                        continue;
                    // Solvers count orders along the way the light goes, here they are counted along the direction across.
                    int seen = ray.U >= 0 ? -order : order;
                    box.Fill(ray.SineSquared, ray.AcrossShare, SineLevel, AcrossLevel, weights);
                    double efficiency = 0;
                    for (int node = 0; node < nodes.Length; node++)
                        efficiency += weights[node] * (spectra.At(nodes[node]).Orders.TryGetValue(seen, out double[]? values) ? values[w] : 0);
                    all[w] += ray.Weight * Math.Max(0, efficiency);
                    if (ray.IsEven)
                        half[w] += 2 * ray.Weight * Math.Max(0, efficiency);
                }
            }
        });
        double error = 0;
        for (int w = 0; w < all.Length; w++)
            error = Math.Max(error, Math.Abs(all[w] - half[w]));
        return (all, error);
    }

    private List<Ray> Rays(Instrument instrument, Angle angle)
    {
        (Direction light, _) = instrument.Arms.At(angle);
        double half = Math.Max(instrument.Light.Radians, 1e-5), collection = Math.Max(instrument.Collection.Radians, 1e-5);
        double mirror = 4 * Math.PI * Math.Pow(Math.Sin(Math.Min(half, collection) / 2), 2);
        var cone = new CapOverlap();
        cone.Set(light, half, light, half);
        var rays = new List<Ray>();
        foreach (FacetFrame facet in FacetFrame.All(instrument, _section.Axis))
        {
            for (int i = 0; i < cone.Samples.Count; i++)
            {
                (Direction at, double weight) = cone.Samples[i];
                if (at.Dot(facet.Normal) > 0)
                    rays.Add(new Ray(facet, at, facet.Weight * weight / mirror, i % 2 == 0));
            }
        }
        return rays;
    }

    // Light on a facet, by its shares across and along the rods.
    private sealed class Ray
    {
        private readonly FacetFrame _facet;
        private readonly Direction _along;

        public Ray(FacetFrame facet, Direction at, double weight, bool isEven)
        {
            _facet = facet;
            _along = new Direction(
                facet.Normal.Y * facet.Across.Z - facet.Normal.Z * facet.Across.Y, facet.Normal.Z * facet.Across.X - facet.Normal.X * facet.Across.Z,
                facet.Normal.X * facet.Across.Y - facet.Normal.Y * facet.Across.X);
            (U, V, Weight, IsEven) = (at.Dot(facet.Across), at.Dot(_along), weight, isEven);
            SineSquared = Math.Min(1, U * U + V * V);
            AcrossShare = SineSquared > 0 ? U * U / (U * U + V * V) : 1;
        }

        public double U { get; }

        public double V { get; }

        public double Weight { get; }

        public bool IsEven { get; }

        public double SineSquared { get; }

        public double AcrossShare { get; }

        // Where light leaves that has the share u across the rods.
        public Direction Out(double u, double up) => new(
            u * _facet.Across.X - V * _along.X + up * _facet.Normal.X, u * _facet.Across.Y - V * _along.Y + up * _facet.Normal.Y,
            u * _facet.Across.Z - V * _along.Z + up * _facet.Normal.Z);
    }
}

using System.Numerics;
using BarbuleOptics.Layering.Mixing;

namespace BarbuleOptics.Layering;

/// <summary>One slice: its cuts, their weights (sum 1) and places (share of the thickness from the middle, -1/2 to 1/2).</summary>
internal sealed class DepthSlice(double thicknessNm, SectionCut[] cuts, double[] weights, double[] places)
{
    // Gauss-Legendre nodes and weights on [-1, 1], five points (Abramowitz and Stegun 1964, table 25.4).
    private static readonly double[] Nodes = [-0.906179845938664, -0.538469310105683, 0, 0.538469310105683, 0.906179845938664];
    private static readonly double[] Weights = [0.236926885056189, 0.478628670499366, 0.568888888888889, 0.478628670499366, 0.236926885056189];

    /// <summary>Thickness, in nm.</summary>
    public double ThicknessNm => thicknessNm;

    /// <summary>Films that stand for it: one where every cut is the same, otherwise two.</summary>
    public int FilmCount => cuts.Length == 1 ? 1 : 2;

    /// <summary>The slices of an interval, from the top; a uniform one is one slice whatever the count.</summary>
    public static IEnumerable<DepthSlice> Of(DepthInterval interval, int count, int materialCount)
    {
        if (interval.IsUniform)
        {
            yield return new DepthSlice(interval.ThicknessNm, [interval.CutAt(interval.ThicknessNm / 2, materialCount)], [1], [0]);
            yield break;
        }
        double half = interval.ThicknessNm / 2;
        for (int slice = 0; slice < count; slice++)
        {
            double psi0 = Math.PI * slice / count, psi1 = Math.PI * (slice + 1) / count;
            double topNm = half * (1 - Math.Cos(psi0)), bottomNm = half * (1 - Math.Cos(psi1));
            var cuts = new SectionCut[Nodes.Length];
            var weights = new double[Nodes.Length];
            var places = new double[Nodes.Length];
            for (int i = 0; i < Nodes.Length; i++)
            {
                double psi = (psi0 + psi1) / 2 + Nodes[i] * (psi1 - psi0) / 2;
                double depthNm = half * (1 - Math.Cos(psi));
                cuts[i] = interval.CutAt(depthNm, materialCount);
                weights[i] = Weights[i] * Math.Sin(psi);
                places[i] = (depthNm - (topNm + bottomNm) / 2) / (bottomNm - topNm);
            }
            double sum = weights.Sum();
            for (int i = 0; i < weights.Length; i++)
                weights[i] /= sum;
            yield return new DepthSlice(bottomNm - topNm, cuts, weights, places);
        }
    }

    /// <summary>Fills the permittivities of its films, from medium number <paramref name="medium"/> on.</summary>
    public void Fill(OpticalComponents components, int medium, SectionPermittivities permittivities, IMixingRule rule, bool along)
    {
        for (int w = 0; w < components.WavelengthCount; w++)
        {
            ReadOnlySpan<Complex> inside = permittivities.Inside(w);
            double wavelengthNm = permittivities.WavelengthsNm[w];
            DepthMoments x = default, y = default, inverseZ = default;
            for (int i = 0; i < cuts.Length; i++)
            {
                DiagonalPermittivity mixed = rule.Mix(cuts[i], inside, wavelengthNm);
                x.Add(along ? mixed.Y : mixed.X, weights[i], places[i]);
                y.Add(along ? mixed.X : mixed.Y, weights[i], places[i]);
                inverseZ.Add(Complex.Conjugate(Complex.Reciprocal(mixed.Z)), weights[i], places[i]);
            }
            if (FilmCount == 1)
            {
                components.Set(medium, w, new(x.Mean, y.Mean, DepthOf(inverseZ.Mean)));
                continue;
            }
            components.Set(medium, w, new(x.Upper, y.Upper, DepthOf(inverseZ.Upper)));
            components.Set(medium + 1, w, new(x.Lower, y.Lower, DepthOf(inverseZ.Lower)));
        }
    }

    /// <summary>ez from the conjugate of 1/ez, whose imaginary part is 0 or above like that of a permittivity.</summary>
    private static Complex DepthOf(Complex conjugateInverse)
        => PassiveRoot.Passive(Complex.Reciprocal(Complex.Conjugate(conjugateInverse)));
}

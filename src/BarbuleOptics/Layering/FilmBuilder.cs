using System.Numerics;
using BarbuleOptics.Layering.Mixing;

namespace BarbuleOptics.Layering;

/// <summary>Replaces the section by films: slices it in depth, averages each cut by a mixing rule and each slice over its depth.</summary>
/// <remarks>
/// Maxwell's equations for a layered medium depend on depth through ex, ey and 1/ez alone (s: ey; p: ex and 1/ez), linearly. A slice
/// becomes two films of half its thickness whose values have the slice's own mean and first moment of these three. That makes the
/// product of transfer matrices right to fourth order in the slice's thickness, as in a commutator-free Magnus integrator
/// (Blanes and Moan 2006, Appl. Numer. Math. 56:1519), where plain averages are of second order. Within an interval, slices are equal in
/// psi, depth = (1 - cos psi) x thickness / 2: they crowd towards the ends, where the chord of a round body grows like a square root,
/// and in psi it is smooth. Five Gauss points in psi a slice give a slice's areas to 1e-7 of the interval with one slice, 1e-9 with two or more.
/// </remarks>
public static class FilmBuilder
{
    // Gauss-Legendre nodes and weights on [-1, 1], five points (Abramowitz and Stegun 1964, table 25.4).
    private static readonly double[] Nodes = [-0.906179845938664, -0.538469310105683, 0, 0.538469310105683, 0.906179845938664];
    private static readonly double[] Weights = [0.236926885056189, 0.478628670499366, 0.568888888888889, 0.478628670499366, 0.236926885056189];

    /// <summary>The films of a section.</summary>
    /// <param name="profile">Its intervals.</param>
    /// <param name="slices">Number of slices of each kind of interval, 1 or above; uniform kinds stay one film.</param>
    /// <param name="permittivities">The materials at the wavelengths wanted.</param>
    /// <param name="rule">How a cut is averaged.</param>
    /// <exception cref="ArgumentException">The rods lie neither across nor along the plane of incidence: films have no such axis.</exception>
    public static FilmStack Build(DepthProfile profile, ReadOnlySpan<int> slices, SectionPermittivities permittivities, IMixingRule rule)
    {
        ArgumentNullException.ThrowIfNull(profile);
        ArgumentNullException.ThrowIfNull(permittivities);
        ArgumentNullException.ThrowIfNull(rule);
        Section section = profile.Section;
        if (!section.IsAcross && !section.IsAlong)
            throw new ArgumentException(FormattableString.Invariant($"Films stand for rods across or along the plane of incidence, not at {section.Axis.Degrees} degrees to it."), nameof(profile));

        var first = new int[profile.KindCount];
        var media = new List<Slice>();
        for (int kind = 0; kind < first.Length; kind++)
        {
            first[kind] = media.Count;
            media.AddRange(SlicesOf(profile.Kinds[kind], slices[kind], permittivities.MaterialCount));
        }

        bool coherentBack = section.Back is { Coherent: true };
        int mediaCount = media.Sum(slice => slice.FilmCount) + (coherentBack ? 1 : 0);
        var components = new OpticalComponents(mediaCount, permittivities.WavelengthsNm.Length);
        var medium = new int[media.Count];
        for (int i = 0, next = 0; i < media.Count; next += media[i].FilmCount, i++)
        {
            medium[i] = next;
            media[i].Fill(components, next, permittivities, rule, section.IsAlong);
        }

        var mediumOfFilm = new List<int>();
        var thicknessesNm = new List<double>();
        foreach (int kind in profile.Order)
        {
            int end = kind + 1 < first.Length ? first[kind + 1] : media.Count;
            for (int i = first[kind]; i < end; i++)
            {
                for (int half = 0; half < media[i].FilmCount; half++)
                {
                    mediumOfFilm.Add(medium[i] + half);
                    thicknessesNm.Add(media[i].ThicknessNm / media[i].FilmCount);
                }
            }
        }
        return Assemble(section, permittivities, components, mediumOfFilm, thicknessesNm);
    }

    private static FilmStack Assemble(Section section, SectionPermittivities permittivities, OpticalComponents components, List<int> mediumOfFilm, List<double> thicknessesNm)
    {
        ReadOnlySpan<Complex> backing = permittivities.Backing;
        IncoherentBack? back = null;
        if (section.Back is { Coherent: true })
        {
            for (int w = 0; w < backing.Length; w++)
                components.Set(components.MediumCount - 1, w, DiagonalPermittivity.Isotropic(backing[w]));
            mediumOfFilm.Add(components.MediumCount - 1);
            thicknessesNm.Add(section.Back.Thickness.CentralNm);
            backing = permittivities.Behind;
        }
        else if (section.Back is not null)
        {
            back = new IncoherentBack(Quantities.Length.FromNanometres(section.Back.Thickness.CentralNm), permittivities.Behind);
        }
        return new FilmStack(
            permittivities.WavelengthsNm, components, [.. mediumOfFilm], [.. thicknessesNm], permittivities.SurroundIndex, backing, back);
    }

    private static IEnumerable<Slice> SlicesOf(DepthInterval interval, int count, int materialCount)
    {
        if (interval.IsUniform)
        {
            yield return new Slice(interval.ThicknessNm, [interval.CutAt(interval.ThicknessNm / 2, materialCount)], [1], [0]);
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
            yield return new Slice(bottomNm - topNm, cuts, weights, places);
        }
    }

    /// <summary>One slice: its cuts, their weights (sum 1) and places (share of the thickness from the middle, -1/2 to 1/2).</summary>
    private sealed class Slice(double thicknessNm, SectionCut[] cuts, double[] weights, double[] places)
    {
        public double ThicknessNm => thicknessNm;

        public int FilmCount => cuts.Length == 1 ? 1 : 2;

        public void Fill(OpticalComponents components, int medium, SectionPermittivities permittivities, IMixingRule rule, bool along)
        {
            for (int w = 0; w < components.WavelengthCount; w++)
            {
                ReadOnlySpan<Complex> inside = permittivities.Inside(w);
                double wavelengthNm = permittivities.WavelengthsNm[w];
                Moments x = default, y = default, inverseZ = default;
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

    /// <summary>Mean and first moment of one component, and the two halves that have both.</summary>
    private struct Moments
    {
        private Complex _mean;
        private Complex _moment;

        public readonly Complex Mean => _mean;

        /// <summary>Value of the upper half, with the lower one's of equal mean; halves that would amplify fall back to the mean.</summary>
        public readonly Complex Upper => IsPassive ? PassiveRoot.Passive(_mean - 4 * _moment) : _mean;

        public readonly Complex Lower => IsPassive ? PassiveRoot.Passive(_mean + 4 * _moment) : _mean;

        private readonly bool IsPassive => Math.Abs(4 * _moment.Imaginary) <= _mean.Imaginary * (1 + 1e-12) + 1e-15;

        public void Add(Complex value, double weight, double place)
        {
            _mean += weight * value;
            _moment += weight * place * value;
        }
    }
}

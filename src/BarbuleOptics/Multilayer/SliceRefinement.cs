using BarbuleOptics.Layering;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>Chooses how many slices each kind of interval needs: halves the slices of one kind after another at some of the
/// wavelengths and angles, and refines the kinds whose halving still moves reflectance, transmittance or absorptance.</summary>
internal sealed class SliceRefinement<TWorkspace>
{
    /// <summary>Wavelengths tried; the largest change between them exceeds the largest among them by less than the margin allows for.</summary>
    private const int ProbeWavelengths = 25;

    /// <summary>Angles tried.</summary>
    private const int ProbeAngles = 3;

    /// <summary>Part of a tolerance that the change at the probes may use.</summary>
    private const double Margin = 0.7;

    /// <summary>Groups of kinds that are judged together; with many kinds those of like thickness share one.</summary>
    private const int MostGroups = 12;

    /// <summary>Slices of one kind beyond which refinement stops, and the error reached is reported as it is.</summary>
    private const int MostSlices = 512;

    private readonly DepthProfile _profile;
    private readonly IMixingRule _rule;
    private readonly SectionPermittivities _permittivities;
    private readonly Angle[] _incidences;
    private readonly ISpectralSolver<FilmStack, TWorkspace> _solver;

    public SliceRefinement(
        DepthProfile profile, IMaterialCatalog catalog, IMixingRule rule, WavelengthGrid grid, IReadOnlyList<Angle> incidences,
        ISpectralSolver<FilmStack, TWorkspace> solver)
    {
        _profile = profile;
        _rule = rule;
        _solver = solver;
        _permittivities = new SectionPermittivities(profile.Section, catalog, Spread(grid.Nanometres.ToArray(), ProbeWavelengths));
        _incidences = Spread([.. incidences], ProbeAngles);
    }

    /// <summary>The slices of each kind, and the largest change of R, T or A at the probes when all are halved.</summary>
    /// <param name="ofReflectance">Largest change of R allowed.</param>
    /// <param name="ofAny">Largest change of T and A allowed.</param>
    /// <param name="cancellation">Ends the search early.</param>
    public (int[] Slices, double Change) Find(double ofReflectance, double ofAny, CancellationToken cancellation)
    {
        int[] slices = new int[_profile.KindCount];
        Array.Fill(slices, 1);
        int[] uneven = [.. Enumerable.Range(0, slices.Length).Where(kind => !_profile.Kinds[kind].IsUniform)];
        if (uneven.Length == 0)
            return (slices, 0);
        int[][] groups = Groups(uneven);

        while (true)
        {
            cancellation.ThrowIfCancellationRequested();
            Probe[] probes = Solve(slices);
            Probe change = Probe.LargestChange(probes, Solve(Halved(slices, uneven)));
            if (Excess(change) <= Margin || uneven.Any(kind => slices[kind] >= MostSlices))
                return (slices, change.Largest);
            Refine(slices, groups, probes, Excess);
        }

        double Excess(Probe change) => Math.Max(change.Reflected / ofReflectance, change.Largest / ofAny);
    }

    /// <summary>Gives each group of kinds the slices that its own share of the tolerance asks for, by the fourth order of the method.</summary>
    private void Refine(int[] slices, int[][] groups, Probe[] probes, Func<Probe, double> excess)
    {
        int[] before = [.. slices];
        double share = Margin / groups.Length;
        foreach (int[] group in groups)
        {
            double change = excess(Probe.LargestChange(probes, Solve(Halved(before, group))));
            double growth = Math.Clamp(Math.Pow(change / share, 0.25), 1, 2);
            foreach (int kind in group)
                slices[kind] = Math.Min((int)Math.Ceiling(before[kind] * growth - 1e-9), MostSlices);
        }
        // Changes of different kinds may add up although each keeps its share.
        if (slices.AsSpan().SequenceEqual(before))
        {
            foreach (int kind in groups.SelectMany(group => group))
                slices[kind]++;
        }
    }

    private int[][] Groups(int[] kinds)
    {
        int[] ordered = [.. kinds.OrderBy(kind => _profile.Kinds[kind].ThicknessNm)];
        return [.. ordered.Chunk((ordered.Length + MostGroups - 1) / MostGroups)];
    }

    private Probe[] Solve(int[] slices)
    {
        FilmStack films = FilmBuilder.Build(_profile, slices, _permittivities, _rule);
        TWorkspace workspace = _solver.CreateWorkspace(films);
        int count = films.WavelengthsNm.Length;
        double[] reflectance = new double[count], transmittance = new double[count];
        var probes = new List<Probe>(2 * _incidences.Length * count);
        foreach (Angle incidence in _incidences)
        {
            Add(incidence, Polarizations.S);
            Add(incidence, Polarizations.P);
        }
        return [.. probes];

        void Add(Angle incidence, Polarizations polarization)
        {
            _solver.Solve(
                films, new SolverRequest(0, count, incidence, polarization, SolverOutputs.Transmittance), workspace,
                new SolverResponse { Reflectance = reflectance, Transmittance = transmittance });
            probes.AddRange(reflectance.Zip(transmittance, (reflected, transmitted) => new Probe(reflected, transmitted)));
        }
    }

    private static int[] Halved(int[] slices, int[] kinds)
    {
        int[] halved = [.. slices];
        foreach (int kind in kinds)
            halved[kind] *= 2;
        return halved;
    }

    private static T[] Spread<T>(T[] all, int most)
        => all.Length <= most ? all : [.. Enumerable.Range(0, most).Select(i => all[(int)((long)i * (all.Length - 1) / (most - 1))])];

    /// <summary>R and T at one wavelength, direction and polarization, or how far they and A = 1 - R - T moved.</summary>
    private readonly record struct Probe(double Reflected, double Transmitted, double Absorbed = 0)
    {
        public double Largest => Math.Max(Reflected, Math.Max(Transmitted, Absorbed));

        public static Probe LargestChange(Probe[] before, Probe[] after)
        {
            double reflected = 0, transmitted = 0, absorbed = 0;
            for (int i = 0; i < before.Length; i++)
            {
                double r = after[i].Reflected - before[i].Reflected, t = after[i].Transmitted - before[i].Transmitted;
                (reflected, transmitted, absorbed) = (Math.Max(reflected, Math.Abs(r)), Math.Max(transmitted, Math.Abs(t)), Math.Max(absorbed, Math.Abs(r + t)));
            }
            return new Probe(reflected, transmitted, absorbed);
        }
    }
}

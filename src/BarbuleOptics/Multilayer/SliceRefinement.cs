using BarbuleOptics.Layering;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>Chooses how many slices each kind of interval needs: halves the slices of one kind after another at some of the
/// wavelengths and angles, and refines the kinds whose halving still moves the reflectance.</summary>
internal sealed class SliceRefinement<TWorkspace>
{
    /// <summary>Wavelengths tried; the largest change between them exceeds the largest among them by less than the margin allows for.</summary>
    private const int ProbeWavelengths = 25;

    /// <summary>Angles tried.</summary>
    private const int ProbeAngles = 3;

    /// <summary>Part of the tolerance that the change at the probes may use.</summary>
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

    /// <summary>The slices of each kind, and the largest change of R at the probes when all are halved.</summary>
    public (int[] Slices, double Change) Find(double tolerance, CancellationToken cancellation)
    {
        double allowed = Margin * tolerance;
        int[] slices = new int[_profile.KindCount];
        Array.Fill(slices, 1);
        int[] uneven = [.. Enumerable.Range(0, slices.Length).Where(kind => !_profile.Kinds[kind].IsUniform)];
        if (uneven.Length == 0)
            return (slices, 0);
        int[][] groups = Groups(uneven);

        while (true)
        {
            cancellation.ThrowIfCancellationRequested();
            double[] reflectance = Reflectances(slices);
            double change = LargestChange(reflectance, Reflectances(Halved(slices, uneven)));
            if (change <= allowed || uneven.Any(kind => slices[kind] >= MostSlices))
                return (slices, change);
            Refine(slices, groups, reflectance, allowed / groups.Length);
        }
    }

    /// <summary>Gives each group of kinds the slices that its own share of the tolerance asks for, by the fourth order of the method.</summary>
    private void Refine(int[] slices, int[][] groups, double[] reflectance, double share)
    {
        int[] before = [.. slices];
        foreach (int[] group in groups)
        {
            double change = LargestChange(reflectance, Reflectances(Halved(before, group)));
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

    private double[] Reflectances(int[] slices)
    {
        FilmStack films = FilmBuilder.Build(_profile, slices, _permittivities, _rule);
        TWorkspace workspace = _solver.CreateWorkspace(films);
        int count = films.WavelengthsNm.Length;
        var reflectance = new double[2 * _incidences.Length * count];
        for (int i = 0; i < _incidences.Length; i++)
        {
            Solve(Polarizations.S, reflectance.AsSpan(2 * i * count, count));
            Solve(Polarizations.P, reflectance.AsSpan((2 * i + 1) * count, count));

            void Solve(Polarizations polarization, Span<double> into) => _solver.Solve(
                films, new SolverRequest(0, count, _incidences[i], polarization, SolverOutputs.Reflectance), workspace,
                new SolverResponse { Reflectance = into });
        }
        return reflectance;
    }

    private static int[] Halved(int[] slices, int[] kinds)
    {
        int[] halved = [.. slices];
        foreach (int kind in kinds)
            halved[kind] *= 2;
        return halved;
    }

    private static double LargestChange(double[] before, double[] after)
    {
        double largest = 0;
        for (int i = 0; i < before.Length; i++)
            largest = Math.Max(largest, Math.Abs(after[i] - before[i]));
        return largest;
    }

    private static T[] Spread<T>(T[] all, int most)
        => all.Length <= most ? all : [.. Enumerable.Range(0, most).Select(i => all[(int)((long)i * (all.Length - 1) / (most - 1))])];
}

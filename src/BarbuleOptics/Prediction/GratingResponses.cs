using System.Collections.Concurrent;
using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Prediction;

/// <summary>A section as it is, solved for all angles and polarizations on several threads.</summary>
internal sealed class GratingResponses
{
    /// <summary>From this number of blocks on, a piece has all angles of its wavelengths, otherwise one.</summary>
    private const int LeastPieces = 12;

    /// <summary>Largest error estimate that an answer may have anywhere.</summary>
    public const double MostError = 0.05;

    private readonly Section _section;
    private readonly PredictionConditions _conditions;
    private readonly IMaterialCatalog _catalog;
    private readonly GratingSolver _solver;
    private readonly BeamAccount[] _beams;

    private GratingResponses(Section section, PredictionConditions conditions, IMaterialCatalog catalog)
    {
        (_section, _conditions, _catalog) = (section, conditions, catalog);
        _solver = new GratingSolver(conditions.Accuracy);
        Powers = new PowerTable(conditions);
        var fans = new OrderFans(section, conditions, catalog);
        _beams = [.. from angle in Enumerable.Range(0, conditions.Incidences.Count)
                     from polarization in PowerTable.Solved(conditions)
                     select new BeamAccount(angle, polarization, fans.Reflected(angle), fans.Transmitted(angle), section.Materials.Count, conditions.Wavelengths.Count)];
    }

    /// <summary>Where the power goes.</summary>
    public PowerTable Powers { get; }

    /// <summary>Whether the result is too uncertain to be an answer.</summary>
    public bool IsUnreliable => ErrorEstimate > MostError;

    /// <summary>The largest error estimate, where it is found.</summary>
    public (Angle Incidence, double WavelengthNm, double Error) Worst => Errors.MaxBy(sample => sample.Error);

    /// <summary>The largest error estimate of all.</summary>
    public double ErrorEstimate => _beams.Max(beam => beam.Errors.Max());

    /// <summary>The error estimate of each beam at each wavelength.</summary>
    public IEnumerable<(Angle Incidence, double WavelengthNm, double Error)> Errors
        => _beams.SelectMany(beam => beam.Errors.Select((error, w) => (_conditions.Incidences[beam.Angle], _conditions.Wavelengths.Nanometres[w], error)));

    /// <summary>For each angle and polarization that is written, the orders that propagate anywhere.</summary>
    public IEnumerable<DiffractionOrder> Orders => ByResponse((angle, polarization, s, p) =>
        s.Sides.Zip(p.Sides, (one, other) => (one.Fan, One: one.Efficiencies, Other: other.Efficiencies)).SelectMany(side =>
            Enumerable.Range(-side.Fan.Most, side.Fan.Count).Where(order => side.Fan.Propagates(order).Contains(true)).Select(order => new DiffractionOrder(
                _conditions.Incidences[angle], polarization, side.Fan.Side, order, side.Fan.PeriodNm, ValueList.Create(side.Fan.Propagates(order)),
                PowerTable.Of(_conditions.Wavelengths, polarization, side.One[order + side.Fan.Most], side.Other[order + side.Fan.Most])))));

    /// <summary>For each angle and polarization that is written, the materials that lose power anywhere.</summary>
    public IEnumerable<MaterialLoss> Losses => ByResponse((angle, polarization, s, p) =>
        Enumerable.Range(0, _section.Materials.Count).Where(material => s.Losses[material].Any(IsLoss) || p.Losses[material].Any(IsLoss)).Select(material => new MaterialLoss(
            _conditions.Incidences[angle], polarization, NameOf(_section.Materials[material]),
            PowerTable.Of(_conditions.Wavelengths, polarization, s.Losses[material], p.Losses[material]))));

    /// <summary>Solves all beams.</summary>
    public static GratingResponses Solve(
        Section section, PredictionConditions conditions, IMaterialCatalog catalog, IProgress<double>? progress, CancellationToken cancellation)
    {
        var responses = new GratingResponses(section, conditions, catalog);
        responses.Solve(progress, cancellation);
        return responses;
    }

    private static bool IsLoss(double value) => value != 0;

    private void Solve(IProgress<double>? progress, CancellationToken cancellation)
    {
        // Pieces of work do not depend on the number of threads.
        int block = GratingSolver.BlockOf(_section);
        int blocks = (_conditions.Wavelengths.Count + block - 1) / block, angles = _conditions.Incidences.Count, done = 0;
        var permittivities = new SectionPermittivities(_section, _catalog, _conditions.Wavelengths.Nanometres);
        // What depends on the wavelength alone is kept for the next angle, where there are enough blocks to go round.
        int together = blocks >= LeastPieces ? angles : 1, pieces = blocks * (angles / together);
        var options = new ParallelOptions { MaxDegreeOfParallelism = _conditions.Threads, CancellationToken = cancellation };
        // Short wavelengths, which take longest, come first, and pieces are handed out one by one.
        Parallel.ForEach(
            Partitioner.Create(Enumerable.Range(0, pieces), EnumerablePartitionerOptions.NoBuffering), options,
            () => _solver.CreateWorkspace(permittivities),
            (piece, _, workspace) =>
            {
                int firstAngle = piece % (angles / together) * together, first = piece / (angles / together) * block;
                int length = Math.Min(block, _conditions.Wavelengths.Count - first);
                for (int angle = firstAngle; angle < firstAngle + together; angle++)
                    SolveBlock(permittivities, workspace, angle, first, length, Report, cancellation);
                return workspace;
            },
            _ => { });

        void Report() => progress?.Report((double)Interlocked.Increment(ref done) / (blocks * _beams.Length));
    }

    private void SolveBlock(
        SectionPermittivities permittivities, GratingWorkspace workspace, int angle, int first, int length, Action report, CancellationToken cancellation)
    {
        BeamAccount[] beams = [.. _beams.Where(beam => beam.Angle == angle)];
        // Both polarizations at once share what depends on the direction; the workspace then knows each.
        if (beams.Length > 1)
        {
            _solver.Solve(
                permittivities, RequestFor(angle, Polarizations.Unpolarized, first, length), workspace,
                new BeamScratch(beams[0], length).Within(OnlyReflectance(new double[length])));
        }
        foreach (BeamAccount beam in beams)
        {
            cancellation.ThrowIfCancellationRequested();
            var scratch = new BeamScratch(beam, length);
            _solver.Solve(
                permittivities, RequestFor(angle, beam.Polarization, first, length), workspace,
                scratch.Within(Powers.Block(angle, beam.Polarization, first, length)));
            scratch.CopyTo(beam, first);
            report();
        }
    }

    private static SolverResponse OnlyReflectance(Span<double> reflectance)
        => new() { Reflectance = reflectance, Transmittance = reflectance, Absorptance = reflectance, DiffractedReflectance = reflectance };

    private SolverRequest RequestFor(int angle, Polarizations polarization, int first, int length)
        => new(first, length, _conditions.Incidences[angle], polarization, SolverOutputs.Transmittance | SolverOutputs.Absorptance);

    private IEnumerable<T> ByResponse<T>(Func<int, Polarizations, BeamAccount, BeamAccount, IEnumerable<T>> make)
    {
        for (int angle = 0; angle < _conditions.Incidences.Count; angle++)
        {
            BeamAccount[] beams = [.. _beams.Where(beam => beam.Angle == angle)];
            foreach (Polarizations polarization in PowerTable.Written(_conditions))
            {
                foreach (T item in make(angle, polarization, beams[0], beams[^1]))
                    yield return item;
            }
        }
    }

    private string NameOf(SectionMaterial material)
    {
        string main = Name(material.Main);
        return material.Filler is null ? main : FormattableString.Invariant($"{main} with {100 * material.FillerShare:0.###} % {Name(material.Filler)}");

        string Name(MaterialReference reference) => _catalog.TryFind(reference, out Material? found) ? found.Name : reference.ToString()!;
    }
}

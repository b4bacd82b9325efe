using System.Collections.Concurrent;
using BarbuleOptics.Ensembles.Spreads;
using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Ensembles.Draws;

/// <summary>Solves many sections that differ from one in their lengths alone: by the same solver, with materials looked up once and slices found once.</summary>
/// <remarks>Safe to share between threads.</remarks>
internal sealed class DrawSolver
{
    private readonly PredictionConditions _conditions;
    private readonly IMaterialCatalog _catalog;
    private readonly SampledMaterials _materials;
    private readonly GratingSolver? _grating;
    private readonly LayerModel? _model;
    private readonly ConcurrentBag<VectorFilmWorkspace> _workspaces = [];
    private readonly bool _thinBack;
    private readonly bool _isFilms;

    /// <param name="mean">The section of the mean geometry, for whose materials there are constants.</param>
    /// <param name="conditions">How it is looked at.</param>
    /// <param name="catalog">Where its materials are.</param>
    /// <param name="cancellation">Ends the search for slices early.</param>
    public DrawSolver(Section mean, PredictionConditions conditions, IMaterialCatalog catalog, CancellationToken cancellation)
    {
        _conditions = conditions;
        _catalog = catalog;
        _materials = new SampledMaterials(catalog, conditions.Wavelengths.Nanometres);
        _thinBack = Predictor.HoldsNoFringe(mean, conditions.Wavelengths, catalog);
        _isFilms = mean.IsFilms;
        Plan = SolverPlan.Of(mean, conditions);
        if (Plan.IsRigorous)
            _grating = new GratingSolver(conditions.Accuracy);
        else
            _model = LayerModelResponses.Fine(Prepared(mean), Plan, conditions, catalog, cancellation);
    }

    /// <summary>The solver for draws of the same geometry in other materials.</summary>
    public DrawSolver For(DrawPlan plan, CancellationToken cancellation)
    {
        double[] lengthsNm = new double[plan.Slots.Length];
        int[] rows = new int[plan.Barbule.Layers.Count];
        plan.Center(lengthsNm, rows);
        return new DrawSolver(new SectionDrawer(plan.Barbule, plan.Slots, plan.SeparateRows).Draw(lengthsNm, rows), _conditions, _catalog, cancellation);
    }

    /// <summary>What is solved.</summary>
    public SolverPlan Plan { get; }

    /// <summary>Reflectance at every angle.</summary>
    /// <param name="section">A section of the same materials.</param>
    /// <param name="reflectances">Receives angle after angle one value a wavelength.</param>
    /// <returns>Estimate of the largest error.</returns>
    /// <exception cref="ArithmeticException">There is no finite solution.</exception>
    public double Solve(Section section, Span<double> reflectances)
    {
        if (_grating is not null)
        {
            var structure = new SectionPermittivities(Prepared(section), _materials);
            return Solve(_grating, structure, _grating.CreateWorkspace(structure), reflectances);
        }
        FilmStack films = _model!.Like(Prepared(section)).FilmsOf(_materials);
        if (!_workspaces.TryTake(out VectorFilmWorkspace? workspace) || !workspace.Holds(films))
            workspace = LayerModelResponses.Solver.CreateWorkspace(films);
        double error = Solve(LayerModelResponses.Solver, films, workspace, reflectances);
        _workspaces.Add(workspace);
        return error;
    }

    private double Solve<TStructure, TWorkspace>(ISpectralSolver<TStructure, TWorkspace> solver, TStructure structure, TWorkspace workspace, Span<double> reflectances)
    {
        int count = _conditions.Wavelengths.Count;
        double error = 0;
        for (int angle = 0; angle < _conditions.Incidences.Count; angle++)
        {
            var request = new SolverRequest(0, count, _conditions.Incidences[angle], _conditions.Polarization, SolverOutputs.Reflectance);
            error = Math.Max(error, solver.Solve(structure, request, workspace, new SolverResponse { Reflectance = reflectances.Slice(angle * count, count) }));
        }
        return error;
    }

    private Section Prepared(Section section)
    {
        // Films have no direction, whatever the file says of one.
        if (_isFilms && !section.IsAcross)
            section = section with { Axis = Angle.FromDegrees(0) };
        return _thinBack ? section with { Back = section.Back! with { Coherent = true } } : section;
    }
}

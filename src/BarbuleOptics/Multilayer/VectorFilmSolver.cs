using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer.Kernels;

namespace BarbuleOptics.Multilayer;

/// <summary>The film solver at full speed: several wavelengths side by side in vectors, tables kept from call to call.</summary>
/// <remarks>
/// Answers as <see cref="ReferenceFilmSolver"/> does. Reflectance alone goes through <see cref="AmplitudeKernel"/>, whose error bound is checked at
/// each wavelength; what it does not cover, and every call that asks for transmittance or absorptance, goes through <see cref="FieldKernel"/>;
/// what leaves the range of that, a back averaged over thickness, and the absorptance of each film go through the reference.
/// Found against the reference over random stacks: within 1e-12.
/// </remarks>
public sealed class VectorFilmSolver : ISpectralSolver<FilmStack, VectorFilmWorkspace>
{
    /// <summary>Largest error of the amplitude kernel by its bound; the errors found are a hundred times smaller.</summary>
    private const double MostError = 5e-11;

    /// <summary>Of the field kernel, as of the reference.</summary>
    private const double FieldError = 1e-11;

    private static readonly ReferenceFilmSolver Reference = new();

    private readonly LaneWidth _width;

    /// <summary>The solver at the processor's widest vectors.</summary>
    public VectorFilmSolver()
        : this(LaneWidth.Default)
    {
    }

    internal VectorFilmSolver(LaneWidth width) => _width = width;

    /// <inheritdoc/>
    public VectorFilmWorkspace CreateWorkspace(FilmStack structure)
    {
        ArgumentNullException.ThrowIfNull(structure);
        return new VectorFilmWorkspace(structure, _width);
    }

    /// <inheritdoc/>
    /// <exception cref="ArgumentException">A span that is to be filled has the wrong length, no polarization is asked for, the workspace
    /// is too small, or a permittivity is zero (a medium never filled) or beyond 1e-100 to 1e100.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The block lies outside the stack's wavelengths, or the angle outside 0 to below
    /// 90 degrees.</exception>
    public double Solve(FilmStack structure, in SolverRequest request, VectorFilmWorkspace workspace, in SolverResponse response)
    {
        ArgumentNullException.ThrowIfNull(structure);
        ArgumentNullException.ThrowIfNull(workspace);
        if (!workspace.Holds(structure))
            throw new ArgumentException(FilmRequestCheck.TooSmall, nameof(workspace));
        FilmRequestCheck.CheckCall(structure, request, response);
        if (structure.Back is not null || !response.FilmAbsorptance.IsEmpty)
            return Reference.Solve(structure, request, workspace.Reference, response);
        workspace.Take(structure, request.First, request.Count);
        FilmRequestCheck.Clear(request, response);
        return request.Count == 0 ? 0 : workspace.Width.Invoke<Call, double>(new Call(structure, request, workspace, response));
    }

    private readonly ref struct Call(FilmStack stack, SolverRequest request, VectorFilmWorkspace work, SolverResponse response) : ILaneAction<double>
    {
        private readonly SolverResponse _response = response;
        private readonly (double Sine, double Cosine) _direction = PlaneWave.Direction(request.Incidence);

        public double Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            if (request.Outputs != SolverOutputs.Reflectance)
            {
                SolveFields<TLanes>(doubtful: false);
                return FieldError;
            }
            Span<bool> doubtful = work.Doubtful.AsSpan(0, LaneBlock.Vectors(request.Count, TLanes.Count));
            doubtful.Clear();
            double error = SolveAmplitudes<TLanes>(doubtful);
            if (doubtful.Contains(true))
                SolveFields<TLanes>(doubtful: true);
            return error;
        }

        private double SolveAmplitudes<TLanes>(Span<bool> doubtful)
            where TLanes : struct, ILanes<TLanes>
        {
            Polarizations polarization = request.Polarization;
            DirectionTable table = work.TableOf<TLanes>(stack, request.First, request.Count, request.Incidence.Degrees, _direction.Sine, _direction.Cosine);
            var plan = AmplitudePlan.Of(work, table);
            table.FillFaces<TLanes>(work.Pairs);
            double bound = plan.ErrorBound(work, table);
            double least = bound / MostError;
            var run = new AmplitudeRun
            {
                Table = table, Steps = work.Steps.AsSpan(0, work.Films.Count), Top = plan.Top, Vectors = doubtful.Length,
                LeastNorm = least * least, Reflectance = _response.Reflectance, Doubtful = doubtful,
            };
            if (work.Films.Count == 0 || !double.IsFinite(run.LeastNorm))
                doubtful.Fill(true);
            else if (_direction.Sine == 0 && work.Facts.IsUpright)
                AmplitudeKernel.One<TLanes>(run, isP: false, 1);
            else if (polarization != Polarizations.Unpolarized)
                AmplitudeKernel.One<TLanes>(run, polarization == Polarizations.P, 1);
            else if (work.Facts.IsIsotropic)
                AmplitudeKernel.Both<TLanes>(run);
            else
            {
                AmplitudeKernel.One<TLanes>(run, isP: false, 0.5);
                AmplitudeKernel.One<TLanes>(run, isP: true, 0.5);
            }
            return MostError;
        }

        private void SolveFields<TLanes>(bool doubtful)
            where TLanes : struct, ILanes<TLanes>
        {
            work.Films.FindDistinct();
            int vectors = LaneBlock.Vectors(request.Count, TLanes.Count);
            var run = new FieldRun
            {
                Stack = stack, Films = work.Films, First = request.First, Count = request.Count, Sine = _direction.Sine, Cosine = _direction.Cosine,
                MostImbalance = FieldError,
                Reflectance = _response.Reflectance,
                Transmittance = (request.Outputs & SolverOutputs.Transmittance) != 0 ? _response.Transmittance : [],
                Absorptance = (request.Outputs & SolverOutputs.Absorptance) != 0 ? _response.Absorptance : [],
            };
            Span<bool> failed = work.Failed.AsSpan(0, vectors);
            failed.Clear();
            Span<int> group = stackalloc int[FieldKernel.Group];
            int taken = 0;
            for (int vector = 0; vector < vectors; vector++)
            {
                if (!doubtful || work.Doubtful[vector])
                    group[taken++] = vector;
                if (doubtful && work.Doubtful[vector])
                    Clear<TLanes>(run, vector);
                if (taken == FieldKernel.Group || (taken > 0 && vector == vectors - 1))
                {
                    SolveGroup<TLanes>(run, group[..taken], failed);
                    taken = 0;
                }
            }
            for (int vector = 0; vector < vectors; vector++)
            {
                if (failed[vector])
                    AskReference<TLanes>(run, vector);
            }
        }

        private void SolveGroup<TLanes>(in FieldRun run, ReadOnlySpan<int> vectors, Span<bool> failed)
            where TLanes : struct, ILanes<TLanes>
        {
            double weight = request.Polarization == Polarizations.Unpolarized ? 0.5 : 1;
            if ((request.Polarization & Polarizations.S) != 0)
                work.Fields.Solve<TLanes>(run, vectors, isP: false, weight, failed);
            if ((request.Polarization & Polarizations.P) != 0)
                work.Fields.Solve<TLanes>(run, vectors, isP: true, weight, failed);
        }

        private void AskReference<TLanes>(in FieldRun run, int vector)
            where TLanes : struct, ILanes<TLanes>
        {
            (int from, int length) = Part<TLanes>(vector);
            Reference.Solve(
                stack, request with { First = request.First + from, Count = length }, work.Reference, new SolverResponse
                {
                    Reflectance = run.Reflectance.Slice(from, length),
                    Transmittance = run.Transmittance.IsEmpty ? [] : run.Transmittance.Slice(from, length),
                    Absorptance = run.Absorptance.IsEmpty ? [] : run.Absorptance.Slice(from, length),
                });
        }

        private void Clear<TLanes>(in FieldRun run, int vector)
            where TLanes : struct, ILanes<TLanes>
        {
            (int from, int length) = Part<TLanes>(vector);
            run.Reflectance.Slice(from, length).Clear();
        }

        private (int From, int Length) Part<TLanes>(int vector)
            where TLanes : struct, ILanes<TLanes>
            => (vector * TLanes.Count, Math.Min(TLanes.Count, request.Count - vector * TLanes.Count));
    }
}

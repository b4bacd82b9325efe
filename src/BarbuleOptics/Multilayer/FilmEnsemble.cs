using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer.Kernels;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>Reflectance of many stacks that differ in their thicknesses alone, as draws of measured lengths do.</summary>
/// <remarks>
/// All stacks go through one vector of wavelengths before the next, so that what depends on the media is at hand; factors exp(2 i kz d) are
/// tabulated against thickness for each vector (<see cref="FactorNodes"/>). Answers have the bound of <see cref="VectorFilmSolver"/>; what it does not cover, a back
/// averaged over thickness, and ensembles too small to pay for tables are solved stack by stack.
/// Not to be shared between threads.
/// </remarks>
public sealed class FilmEnsemble
{
    /// <summary>Fewest stacks, and most nodes of all media together.</summary>
    private const int LeastStacks = 16, MostNodes = 16_384;

    /// <summary>Rounding errors that a factor from nodes has beyond one computed by itself.</summary>
    private const double ErrorOfNode = 8;

    private const double MostError = 5e-11;

    private readonly FilmStack _template;
    private readonly VectorFilmSolver _solver;
    private readonly VectorFilmWorkspace _work;
    private readonly EnsembleStep[] _steps;
    private readonly int _mostStacks;
    private readonly ThicknessPlace[] _places;
    private readonly bool[] _doubtful;
    private FactorNodes? _nodes;

    /// <summary>An ensemble of the films of <paramref name="template"/>, whatever its thicknesses.</summary>
    /// <param name="template">Media, surround and backing of all stacks.</param>
    /// <param name="mostStacks">Most stacks of a call.</param>
    public FilmEnsemble(FilmStack template, int mostStacks)
        : this(template, mostStacks, LaneWidth.Default)
    {
    }

    internal FilmEnsemble(FilmStack template, int mostStacks, LaneWidth width)
    {
        ArgumentNullException.ThrowIfNull(template);
        ArgumentOutOfRangeException.ThrowIfNegative(mostStacks);
        _template = template;
        _solver = new VectorFilmSolver(width);
        _work = _solver.CreateWorkspace(template);
        _steps = new EnsembleStep[template.FilmCount];
        _mostStacks = mostStacks;
        _places = new ThicknessPlace[checked(mostStacks * template.FilmCount)];
        _doubtful = new bool[mostStacks];
    }

    /// <summary>Fills the reflectances of all stacks.</summary>
    /// <param name="incidence">Angle of incidence, 0 to below 90 degrees.</param>
    /// <param name="polarization">S, P, or both for their mean.</param>
    /// <param name="thicknessesNm">Thickness of each film, 0 or above, stack after stack.</param>
    /// <param name="reflectance">Receives fractions 0 to 1, stack after stack: element s * L + w for L wavelengths.</param>
    /// <returns>An estimate of the largest absolute error.</returns>
    /// <exception cref="ArgumentException">A length does not fit, there are more stacks than there is room for, or a value lies outside its range.</exception>
    public double Solve(Angle incidence, Polarizations polarization, ReadOnlySpan<double> thicknessesNm, Span<double> reflectance)
    {
        int films = _template.FilmCount, wavelengths = _template.WavelengthsNm.Length;
        int stacks = films == 0 ? reflectance.Length / wavelengths : thicknessesNm.Length / films;
        ArgumentOutOfRangeException.ThrowIfGreaterThan(stacks, _mostStacks, nameof(thicknessesNm));
        Guard.SameLength(checked(stacks * films), thicknessesNm.Length, nameof(thicknessesNm));
        Guard.SameLength(checked(stacks * wavelengths), reflectance.Length, nameof(reflectance));
        foreach (double thicknessNm in thicknessesNm)
            Guard.NotNegative(thicknessNm, nameof(thicknessesNm));
        var request = new SolverRequest(0, wavelengths, incidence, polarization, SolverOutputs.Reflectance);
        SolverRequestCheck.Check(request, wavelengths, "stack");

        _doubtful.AsSpan(0, stacks).Fill(true);
        if (stacks >= LeastStacks && films > 0 && _template.Back is null)
        {
            _work.Take(_template, 0, wavelengths);
            reflectance.Clear();
            _work.Width.Invoke<Call, bool>(new Call(this, request, thicknessesNm, reflectance));
        }
        double error = MostError;
        for (int stack = 0; stack < stacks; stack++)
        {
            if (_doubtful[stack])
            {
                FilmStack one = _template.WithThicknesses(thicknessesNm.Slice(stack * films, films));
                error = Math.Max(error, _solver.Solve(one, request, _work, new SolverResponse { Reflectance = reflectance.Slice(stack * wavelengths, wavelengths) }));
            }
        }
        return error;
    }

    private readonly ref struct Call(FilmEnsemble owner, SolverRequest request, ReadOnlySpan<double> thicknessesNm, Span<double> reflectance) : ILaneAction<bool>
    {
        private readonly ReadOnlySpan<double> _thicknessesNm = thicknessesNm;
        private readonly Span<double> _reflectance = reflectance;

        public bool Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            (double sine, double cosine) = PlaneWave.Direction(request.Incidence);
            DirectionTable table = owner._work.TableOf<TLanes>(owner._template, 0, request.Count, request.Incidence.Degrees, sine, cosine);
            double stepNm = Math.ScaleB(1, Math.ILogB(FactorNodes.MostStep / table.MostSteepness));
            double nodes = Math.Ceiling(Largest(_thicknessesNm) / stepNm) + 2;
            int media = owner._template.Media.MediumCount;
            if (!(nodes * media <= MostNodes))
                return false;
            if (owner._nodes is null || owner._nodes.Nodes < nodes)
                owner._nodes = new FactorNodes(TLanes.Count, media, (int)nodes);
            bool isOne = sine == 0 && owner._work.Facts.IsUpright;
            owner.Place(_thicknessesNm, stepNm);
            int top = owner.MakeSteps(table);
            table.FillFaces<TLanes>(owner._work.Pairs);
            owner._doubtful.AsSpan(0, _thicknessesNm.Length / owner._steps.Length).Clear();
            var run = new EnsembleRun
            {
                Nodes = owner._nodes, Steps = owner._steps, Places = owner._places, Top = top * DirectionTable.Values * TLanes.Count,
                Stacks = _thicknessesNm.Length / owner._steps.Length, Wavelengths = request.Count, Reflectance = _reflectance, Doubtful = owner._doubtful,
                LeastNorm = owner.LeastNorm(table, top, _thicknessesNm), Weight = !isOne && request.Polarization == Polarizations.Unpolarized ? 0.5 : 1,
            };
            if (isOne || (request.Polarization & Polarizations.S) != 0)
                Solve<TLanes>(run, table, stepNm, isP: false);
            if (!isOne && (request.Polarization & Polarizations.P) != 0)
                Solve<TLanes>(run, table, stepNm, isP: true);
            return true;
        }

        private static void Solve<TLanes>(in EnsembleRun run, DirectionTable table, double stepNm, bool isP)
            where TLanes : struct, ILanes<TLanes>
        {
            int skipped = isP ? ComplexLanes<TLanes>.Stride : 0;
            for (int vector = 0; vector < LaneBlock.Vectors(run.Wavelengths, TLanes.Count); vector++)
            {
                run.Nodes.Fill<TLanes>(ref table.Rates[vector * table.RateStride + skipped], stepNm);
                EnsembleKernel.Solve<TLanes>(run, vector, ref table.Faces[vector * table.FaceStride + skipped]);
            }
        }
    }

    // Nearest node and what is left of every thickness.
    private void Place(ReadOnlySpan<double> thicknessesNm, double stepNm)
    {
        for (int i = 0; i < thicknessesNm.Length; i++)
        {
            double node = Math.Round(thicknessesNm[i] / stepNm);
            _places[i] = new ThicknessPlace(thicknessesNm[i] - node * stepNm, _nodes!.ValueAt(_template.MediumOfFilm[i % _steps.Length], (int)node));
        }
    }

    // Returns the number of the uppermost face.
    private int MakeSteps(DirectionTable table)
    {
        if (_work.Pairs.Count > 0)
            _work.ForgetFaces();
        ReadOnlySpan<int> media = _template.MediumOfFilm;
        int top = _work.Pairs.NumberOf(table.Surround, media[0]);
        for (int film = 0; film < media.Length; film++)
        {
            int face = _work.Pairs.NumberOf(media[film], film + 1 < media.Length ? media[film + 1] : table.Backing);
            _steps[film] = new EnsembleStep(_nodes!.CoefficientAt(media[film]), face * DirectionTable.Values * _work.Width.Count);
        }
        return top;
    }

    /// <summary>The bound of <see cref="AmplitudeKernel"/> for the thickest films, as the least |a + rho b|^2 that keeps it; infinite where none does.</summary>
    private double LeastNorm(DirectionTable table, int top, ReadOnlySpan<double> thicknessesNm)
    {
        double growth = table.GrowthOf(top), radians = 0;
        foreach (EnsembleStep step in _steps)
            growth *= table.GrowthOf(step.Face / (DirectionTable.Values * _work.Width.Count));
        for (int film = 0; film < _steps.Length; film++)
        {
            double thickestNm = 0;
            for (int i = film; i < thicknessesNm.Length; i += _steps.Length)
                thickestNm = Math.Max(thickestNm, thicknessesNm[i]);
            radians += thickestNm * table.Steepness[_template.MediumOfFilm[film]];
        }
        double roundings = (AmplitudeKernel.ErrorOfFilm + ErrorOfNode) * (_steps.Length + 1) + AmplitudeKernel.ErrorOfRadian * radians;
        double least = AmplitudeKernel.ErrorOfReflectance * growth * AmplitudePlan.Rounding * roundings / MostError;
        return least * least;
    }

    private static double Largest(ReadOnlySpan<double> values)
    {
        double largest = 0;
        foreach (double value in values)
            largest = Math.Max(largest, value);
        return largest;
    }
}

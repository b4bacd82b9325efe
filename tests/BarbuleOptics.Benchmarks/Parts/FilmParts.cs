using System.Runtime.CompilerServices;
using BarbuleOptics.Benchmarks.Kernels;
using BarbuleOptics.Color;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using BenchmarkDotNet.Attributes;

namespace BarbuleOptics.Benchmarks.Parts;

/// <summary>The film exponential, one stack at one angle, and a color.</summary>
[MemoryDiagnoser]
public class FilmParts
{
    private const int Values = 4096;

    private readonly FilmStack _stack = FilmCase.Stack(new PlainRandom());
    private readonly double[] _lengths = new PlainRandom().ThicknessesNm(Values);
    private readonly double[] _factors = new double[2 * Values];
    private readonly double[] _reflectance = new double[FilmCase.WavelengthsNm.Length];
    private readonly double[] _transmittance = new double[FilmCase.WavelengthsNm.Length];
    private readonly double[] _absorptance = new double[FilmCase.WavelengthsNm.Length];
    private readonly Colorimeter _colorimeter = new(
        WavelengthGrid.FromRange(Length.FromNanometres(300), Length.FromNanometres(780), Length.FromNanometres(1)), Illuminant.D65, StandardObserver.Cie1931TwoDegree);
    private readonly VectorFilmSolver _vector = new();
    private readonly ReferenceFilmSolver _reference = new();
    private readonly VectorFilmWorkspace _vectorWorkspace;
    private readonly FilmWorkspace _referenceWorkspace;

    /// <summary>Makes the workspaces.</summary>
    public FilmParts()
    {
        _vectorWorkspace = _vector.CreateWorkspace(_stack);
        _referenceWorkspace = _reference.CreateWorkspace(_stack);
    }

    /// <summary>exp(2 i kz d) of an absorbing film, 4,096 of them.</summary>
    [Benchmark(OperationsPerInvoke = Values)]
    public double Exponential() => LaneWidth.Default.Invoke<Exponentials, double>(new Exponentials(_lengths, _factors));

    /// <summary>R of 24 films, 481 wavelengths, s and p, with tables known.</summary>
    [Benchmark]
    public double Amplitudes()
        => _vector.Solve(_stack, FilmCase.Request(30, Polarizations.Unpolarized, SolverOutputs.Reflectance), _vectorWorkspace, new SolverResponse { Reflectance = _reflectance });

    /// <summary>R, T and A of the same.</summary>
    [Benchmark]
    public double Fields()
        => _vector.Solve(_stack, FilmCase.Request(30, Polarizations.Unpolarized, SolverOutputs.Transmittance | SolverOutputs.Absorptance), _vectorWorkspace, Response);

    /// <summary>The same by the reference solver.</summary>
    [Benchmark(Baseline = true)]
    public double Reference()
        => _reference.Solve(_stack, FilmCase.Request(30, Polarizations.Unpolarized, SolverOutputs.Transmittance | SolverOutputs.Absorptance), _referenceWorkspace, Response);

    /// <summary>X, Y, Z of one spectrum.</summary>
    [Benchmark]
    public double Color() => _colorimeter.MeasureTristimulus(_reflectance).Y;

    private SolverResponse Response => new() { Reflectance = _reflectance, Transmittance = _transmittance, Absorptance = _absorptance };

    private readonly struct Exponentials(double[] lengths, double[] factors) : ILaneAction<double>
    {
        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        public double Invoke<TLanes>()
            where TLanes : struct, ILanes<TLanes>
        {
            TLanes phase = TLanes.Broadcast(0.0071), decay = TLanes.Broadcast(-0.0013);
            for (int i = 0; i < lengths.Length; i += TLanes.Count)
            {
                TLanes length = TLanes.Load(in lengths[i]);
                ComplexLanes<TLanes>.Store(TLanes.PowerOfTwo(decay, length) * TLanes.Turn(phase, length), ref factors[2 * i]);
            }
            return factors[^1];
        }
    }
}

using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Benchmarks.Kernels;

/// <summary>Stacks that the film workloads share: 24 films, keratin and eumelanin by turns, on keratin, in air, 300 to 780 nm at 1 nm.</summary>
internal static class FilmCase
{
    /// <summary>Films of a stack.</summary>
    public const int Films = 24;

    /// <summary>Vacuum wavelengths.</summary>
    public static double[] WavelengthsNm { get; } = [.. Enumerable.Range(300, 481).Select(l => (double)l)];

    /// <summary>A stack of films of random thicknesses.</summary>
    public static FilmStack Stack(PlainRandom random)
    {
        var media = new OpticalComponents(2, WavelengthsNm.Length);
        for (int w = 0; w < WavelengthsNm.Length; w++)
        {
            media.Set(0, w, DiagonalPermittivity.Isotropic(Keratin(WavelengthsNm[w])));
            media.Set(1, w, DiagonalPermittivity.Isotropic(Eumelanin(WavelengthsNm[w])));
        }
        return new FilmStack(
            WavelengthsNm, media, [.. Enumerable.Range(0, Films).Select(film => film % 2)], random.ThicknessesNm(Films),
            [.. WavelengthsNm.Select(_ => 1.0)], [.. WavelengthsNm.Select(Keratin)]);
    }

    /// <summary>Largest difference between two solvers' answers to one request.</summary>
    public static double Difference<TOne, TOther>(
        ISpectralSolver<FilmStack, TOne> one, ISpectralSolver<FilmStack, TOther> other, FilmStack stack, SolverRequest request)
    {
        double[] first = Solve(one, stack, request), second = Solve(other, stack, request);
        return first.Zip(second, (a, b) => Math.Abs(a - b)).Max();
    }

    /// <summary>A request for all wavelengths.</summary>
    public static SolverRequest Request(double degrees, Polarizations polarization, SolverOutputs outputs)
        => new(0, WavelengthsNm.Length, Angle.FromDegrees(degrees), polarization, outputs);

    private static Complex Keratin(double wavelengthNm) => Math.Pow(1.532 + 5890 / (wavelengthNm * wavelengthNm), 2);

    private static Complex Eumelanin(double wavelengthNm)
    {
        var index = new Complex(1.648 + 23700 / (wavelengthNm * wavelengthNm), 0.56 * Math.Exp(-wavelengthNm / 270));
        return index * index;
    }

    private static double[] Solve<TWorkspace>(ISpectralSolver<FilmStack, TWorkspace> solver, FilmStack stack, SolverRequest request)
    {
        var answers = new double[3 * request.Count];
        solver.Solve(stack, request, solver.CreateWorkspace(stack), new SolverResponse
        {
            Reflectance = answers.AsSpan(0, request.Count),
            Transmittance = answers.AsSpan(request.Count, request.Count),
            Absorptance = answers.AsSpan(2 * request.Count),
        });
        return answers;
    }
}

using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>A stack at one wavelength, and the call on the solver that goes with it.</summary>
internal sealed record TestStack(double SurroundIndex, IReadOnlyList<Film> Films, Complex Backing)
{
    public double WavelengthNm { get; init; } = 500;

    public double? SlabThicknessNm { get; init; }

    public Complex Behind { get; init; } = 1;

    /// <summary>A backing of complex index <paramref name="backingIndex"/>.</summary>
    public static TestStack OnIndex(double surroundIndex, Complex backingIndex, params Film[] films)
        => new(surroundIndex, films, backingIndex * backingIndex);

    public TestStack At(double wavelengthNm) => this with { WavelengthNm = wavelengthNm };

    public FilmStack Build()
    {
        var media = new OpticalComponents(Films.Count, 1);
        for (int film = 0; film < Films.Count; film++)
            media.Set(film, 0, Films[film].Permittivity);
        IncoherentBack? back = SlabThicknessNm is double thickness ? new IncoherentBack(Length.FromNanometres(thickness), [Behind]) : null;
        return new FilmStack(
            [WavelengthNm], media, [.. Enumerable.Range(0, Films.Count)], [.. Films.Select(f => f.ThicknessNm)], [SurroundIndex], [Backing], back);
    }

    public Powers Solve(double degrees, Polarizations polarization)
    {
        FilmStack stack = Build();
        var solver = new ReferenceFilmSolver();
        double[] answer = new double[3];
        double[] films = new double[Films.Count];
        solver.Solve(
            stack,
            new SolverRequest(0, 1, Angle.FromDegrees(degrees), polarization, SolverOutputs.Transmittance | SolverOutputs.Absorptance),
            solver.CreateWorkspace(stack),
            new SolverResponse
            {
                Reflectance = answer.AsSpan(0, 1),
                Transmittance = answer.AsSpan(1, 1),
                Absorptance = answer.AsSpan(2, 1),
                FilmAbsorptance = films,
            });
        return new Powers(answer[0], answer[1], answer[2], films);
    }
}

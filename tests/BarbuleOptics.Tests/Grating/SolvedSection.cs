using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Tests.Grating;

/// <summary>The product's answer for one section at one wavelength.</summary>
internal sealed class SolvedSection
{
    /// <summary>Room for orders -Most to Most.</summary>
    private const int Most = 8;

    private readonly double[] _reflected = new double[2 * Most + 1];
    private readonly double[] _transmitted = new double[2 * Most + 1];

    private SolvedSection()
    {
    }

    public double Specular { get; private init; }

    public double Diffracted { get; private init; }

    public double Transmittance { get; private init; }

    public double Absorptance { get; private init; }

    /// <summary>The product's estimate of its largest error.</summary>
    public double Estimate { get; private init; }

    public double ReflectedInto(int order) => _reflected[order + Most];

    public double TransmittedInto(int order) => _transmitted[order + Most];

    public static SolvedSection Of(SectionPermittivities section, double degrees, Polarizations polarization, double accuracy)
    {
        var solver = new GratingSolver(accuracy);
        double[] powers = new double[4], reflected = new double[2 * Most + 1], transmitted = new double[2 * Most + 1];
        double estimate = solver.Solve(
            section,
            new SolverRequest(0, 1, Angle.FromDegrees(degrees), polarization, SolverOutputs.Transmittance | SolverOutputs.Absorptance),
            solver.CreateWorkspace(section),
            new SolverResponse
            {
                Reflectance = powers.AsSpan(0, 1),
                DiffractedReflectance = powers.AsSpan(1, 1),
                Transmittance = powers.AsSpan(2, 1),
                Absorptance = powers.AsSpan(3, 1),
                ReflectedOrders = reflected,
                TransmittedOrders = transmitted,
            });
        var answer = new SolvedSection
        {
            Specular = powers[0],
            Diffracted = powers[1],
            Transmittance = powers[2],
            Absorptance = powers[3],
            Estimate = estimate,
        };
        reflected.CopyTo(answer._reflected, 0);
        transmitted.CopyTo(answer._transmitted, 0);
        return answer;
    }
}

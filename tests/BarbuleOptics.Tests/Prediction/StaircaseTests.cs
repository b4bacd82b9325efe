using System.Numerics;
using BarbuleOptics.Files;
using BarbuleOptics.Layering.Mixing;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Prediction;

/// <summary>The layer model agrees with a plain staircase: thin uniform slices, the chord at the middle of each, characteristic matrices.</summary>
/// <remarks>The staircase shares nothing with the program: its own geometry, mean permittivity, and the matrices of Born and Wolf,
/// Principles of Optics, section 1.6 (number from memory), in the time convention exp(-i omega t).</remarks>
public sealed class StaircaseTests
{
    private const double StepNm = 0.025;

    // Chords at the middle miss the round ends by StepNm^1.5. Measured at 70 degrees, the largest: 1.2e-5 with steps of 0.1 nm,
    // 4.1e-6 with 0.05 nm, 1.4e-6 with 0.025 nm, as that law has it; the layer model is nearer to their limit than any of them.
    private const double Tolerance = 2e-6;

    private static readonly Complex Matrix = Squared(1.55, 0), Shell = Squared(1.74, 0.09), Core = Squared(1, 0), Backing = Squared(1.6, 0.02);

    /// <summary>Incidence in degrees.</summary>
    public static TheoryData<double> Angles => [0, 40, 70];

    [Theory]
    [MemberData(nameof(Angles))]
    public void Interleaved_hollow_rods(double degrees)
        => AssertAgrees(
            "[cortex]\nthickness = 90\n[[layer]]\nform = 'rod'\ndiameter = 120\nlumen = 66\nspacing = 240\nrows = 4\npitch = 75\nstacking = 'staggered'\ngap = 20\n",
            90 + 3 * 75 + 120 + 20,
            z =>
            {
                double outer = 0, core = 0;
                for (int row = 0; row < 4; row++)
                {
                    double below = z - (150 + 75 * row);
                    outer += Chord(60, 60, below) / 240;
                    core += Chord(33, 33, below) / 240;
                }
                return (outer, core);
            },
            degrees);

    [Theory]
    [MemberData(nameof(Angles))]
    public void Flattened_rods_of_two_layers(double degrees)
        => AssertAgrees(
            "[[layer]]\nform = 'flattened-rod'\nheight = 70\nwidth = 150\nlumen_height = 30\nlumen_width = 90\nspacing = 180\nrows = 2\npitch = 110\ngap = 35\n" +
            "[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = 130\n",
            110 + 70 + 35 + 100,
            z =>
            {
                double outer = 0, core = 0;
                for (int row = 0; row < 2; row++)
                {
                    double below = z - (35 + 110 * row);
                    outer += Chord(75, 35, below) / 180;
                    core += Chord(45, 15, below) / 180;
                }
                return (outer + Chord(50, 50, z - (180 + 35 + 50)) / 130, core);
            },
            degrees);

    private static double Chord(double halfWidth, double halfHeight, double below)
        => 2 * halfWidth * Math.Sqrt(Math.Max(0, 1 - below * below / (halfHeight * halfHeight)));

    private static void AssertAgrees(string text, double depthNm, Func<double, (double Outer, double Core)> shares, double degrees)
    {
        const string Materials = "[barbule]\nmatrix = { n = 1.55 }\nbacking = { n = 1.6, k = 0.02 }\n";
        string shell = text.Replace("form =", "material = { n = 1.74, k = 0.09 }\nform =", StringComparison.Ordinal);
        LoadedStructure loaded = Structures.Load(Materials + shell);
        var conditions = new PredictionConditions
        {
            Wavelengths = WavelengthGrid.FromRange(Length.FromNanometres(320), Length.FromNanometres(760), Length.FromNanometres(40)),
            Incidences = [Angle.FromDegrees(degrees)],
            Mixing = new MeanPermittivity(),
            ComparesSolvers = false,
            // Finer than by default, so that the staircase is what differs.
            Accuracy = 1e-7,
        };
        Assert.True(Predictor.TryPredict(loaded.Barbule, conditions, loaded.Catalog, out StructurePrediction? prediction, out _));
        int steps = (int)Math.Round(depthNm / StepNm);
        var permittivities = new Complex[steps];
        for (int i = 0; i < steps; i++)
        {
            (double outer, double core) = shares((i + 0.5) * depthNm / steps);
            permittivities[i] = Matrix + (outer - core) * (Shell - Matrix) + core * (Core - Matrix);
        }
        double largest = 0;
        foreach (SpectralResponse response in prediction.Responses.Where(response => response.Polarization != Polarizations.Unpolarized))
        {
            for (int i = 0; i < conditions.Wavelengths.Count; i++)
            {
                double expected = Staircase(permittivities, depthNm / steps, conditions.Wavelengths.Nanometres[i], degrees, response.Polarization == Polarizations.P);
                largest = Math.Max(largest, Math.Abs(expected - response.Reflectance[i]));
            }
        }
        Assert.InRange(largest, 0, Tolerance);
    }

    /// <summary>R of isotropic slices of one thickness, from the backing up: (H or E; E or H) through M = (cos, -i sin/p; -i p sin, cos).</summary>
    private static double Staircase(Complex[] permittivities, double stepNm, double wavelengthNm, double degrees, bool isP)
    {
        double sine = Math.Sin(degrees * Math.PI / 180), cosine = Math.Cos(degrees * Math.PI / 180), k0 = 2 * Math.PI / wavelengthNm;
        Complex Depth(Complex e) => Complex.Sqrt(e - sine * sine);
        Complex Admittance(Complex e) => isP ? Depth(e) / e : Depth(e);
        Complex first = Complex.One, second = Admittance(Backing);
        for (int i = permittivities.Length - 1; i >= 0; i--)
        {
            Complex phase = k0 * stepNm * Depth(permittivities[i]), p = Admittance(permittivities[i]);
            Complex c = Complex.Cos(phase), s = -Complex.ImaginaryOne * Complex.Sin(phase);
            (first, second) = (c * first + s / p * second, s * p * first + c * second);
        }
        Complex reflected = (cosine * first - second) / (cosine * first + second);
        return reflected.Real * reflected.Real + reflected.Imaginary * reflected.Imaginary;
    }

    private static Complex Squared(double n, double k) => new Complex(n, k) * new Complex(n, k);
}

using BarbuleOptics.Files;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Tests.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Prediction;

/// <summary>Predictions from the text of a structure file.</summary>
internal static class Predictions
{
    public static StructurePrediction Of(string text, PredictionConditions conditions, params string[] sets)
    {
        LoadedStructure loaded = Structures.Load(text, sets);
        Assert.True(
            Predictor.TryPredict(loaded.Barbule, conditions, loaded.Catalog, out StructurePrediction? prediction, out var problems, cancellation: TestContext.Current.CancellationToken),
            string.Join('\n', problems));
        return prediction;
    }

    /// <summary>Wavelengths in nm and angles in degrees; by the layer model alone.</summary>
    public static PredictionConditions At(double fromNm, double toNm, double stepNm, params double[] degrees) => new()
    {
        Solver = SolverChoice.Multilayer,
        ComparesSolvers = false,
        Wavelengths = WavelengthGrid.FromRange(Length.FromNanometres(fromNm), Length.FromNanometres(toNm), Length.FromNanometres(stepNm)),
        Incidences = [.. (degrees.Length == 0 ? [0] : degrees).Select(Angle.FromDegrees)],
    };

    /// <summary>The same by the solver that is taken where none is named.</summary>
    public static PredictionConditions Rigorously(double fromNm, double toNm, double stepNm, params double[] degrees)
        => At(fromNm, toNm, stepNm, degrees) with { Solver = SolverChoice.Auto };

    public static string[] Codes(StructurePrediction prediction) => [.. prediction.Warnings.Select(warning => warning.Code)];

    /// <summary>R of the first wavelength and angle.</summary>
    public static double R(StructurePrediction prediction, Polarizations polarization) => Response(prediction, polarization).Reflectance[0];

    public static SpectralResponse Response(StructurePrediction prediction, Polarizations polarization)
        => prediction.Responses.First(response => response.Polarization == polarization);
}

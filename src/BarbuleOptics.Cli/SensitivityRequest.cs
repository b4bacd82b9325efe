using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Cli;

/// <summary>What <c>barbule sensitivity</c> was asked for.</summary>
/// <param name="File">Structure file as typed.</param>
/// <param name="Conditions">How it is looked at.</param>
/// <param name="SeenBy">Light, background and eyes, which may stand in files.</param>
/// <param name="Draws">How many draws of which spread.</param>
/// <param name="OutputFolder">Where results go; null to write none.</param>
/// <param name="Force">Whether results that exist are replaced.</param>
/// <param name="Json">Whether standard output holds JSON in place of a table.</param>
/// <param name="MaterialFolder">Folder of the user's material tables; null for none.</param>
/// <param name="Sets">KEY=VALUE texts.</param>
/// <param name="FigureSize">Printed width of the figure.</param>
internal sealed record SensitivityRequest(
    string File, PredictionConditions Conditions, SeenBy SeenBy, DrawOptions Draws, string? OutputFolder, bool Force, bool Json, string? MaterialFolder,
    IReadOnlyList<string> Sets, FigureSize FigureSize);

using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Cli;

/// <summary>What <c>barbule predict</c> was asked for.</summary>
/// <param name="Files">Structure files as typed, at least one.</param>
/// <param name="Conditions">How they are looked at.</param>
/// <param name="SeenBy">Light, background and eyes, which may stand in files.</param>
/// <param name="OutputFolder">Where results go; null to write none.</param>
/// <param name="Force">Whether results that exist are replaced.</param>
/// <param name="Json">Whether standard output holds JSON in place of tables.</param>
/// <param name="MaterialFolder">Folder of the user's material tables; null for none.</param>
/// <param name="Sets">KEY=VALUE texts.</param>
/// <param name="FigureSize">Printed width of the figures.</param>
/// <param name="Overlays">Whether the reflectance figure also holds what the other solver says.</param>
internal sealed record PredictRequest(
    IReadOnlyList<string> Files, PredictionConditions Conditions, SeenBy SeenBy, string? OutputFolder, bool Force, bool Json, string? MaterialFolder, IReadOnlyList<string> Sets,
    FigureSize FigureSize, bool Overlays)
{
    /// <summary>How many draws of which spread; null for none.</summary>
    public DrawOptions? Draws { get; init; }
}

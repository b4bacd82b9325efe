using BarbuleOptics.Ensembles;
using BarbuleOptics.Prediction;

namespace BarbuleOptics.Cli;

/// <summary>What <c>barbule batch</c> was asked for.</summary>
/// <param name="Table">The table as typed.</param>
/// <param name="Conditions">How specimens are looked at.</param>
/// <param name="SeenBy">Light, background and eyes, which may stand in files.</param>
/// <param name="OutputFolder">Where results go.</param>
/// <param name="Force">Whether results that exist are replaced.</param>
/// <param name="Resume">Whether an unfinished run is continued.</param>
/// <param name="MaterialFolder">Folder of the user's material tables; null for none.</param>
/// <param name="Sets">KEY=VALUE texts.</param>
/// <param name="Draws">How many draws of which spread; null for none.</param>
/// <param name="Options">The options that decide results, as typed, in order.</param>
internal sealed record BatchRequest(
    string Table, PredictionConditions Conditions, SeenBy SeenBy, string OutputFolder, bool Force, bool Resume, string? MaterialFolder, IReadOnlyList<string> Sets, DrawOptions? Draws,
    IReadOnlyList<string> Options);

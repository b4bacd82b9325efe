using BarbuleOptics.Anatomy;
using BarbuleOptics.Grating;
using BarbuleOptics.Layering;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;

namespace BarbuleOptics.Prediction;

/// <summary>What one structure does to light under stated conditions.</summary>
public sealed record StructurePrediction
{
    /// <summary>What the result may be said of; it stands in every output.</summary>
    public const string Scope = "An inference from the measured section and the constants named: it speaks for the sampled spot of the sampled individual.";

    /// <summary>The structure as measured.</summary>
    public required Barbule Barbule { get; init; }

    /// <summary>The section it was solved as.</summary>
    public required Section Section { get; init; }

    /// <summary>How it was looked at.</summary>
    public required PredictionConditions Conditions { get; init; }

    /// <summary>Name of the solver whose result this is, one of <see cref="SolverNames"/>.</summary>
    public required string Solver { get; init; }

    /// <summary>Whether the section was solved rigorously as it is: infinite, flat and perfectly periodic.</summary>
    public bool IsRigorous => Solver == SolverNames.Grating;

    /// <summary>What the section was taken as, in a few words; it stands in every output.</summary>
    public string Picture => IsRigorous ? PictureOfRows : Mixing is null ? "films" : "films averaged from rows";

    private string PictureOfRows => MovedUpToNm is double upToNm
        ? FormattableString.Invariant($"rows at a common period up to {upToNm:0.#} nm and as they are above, infinite, flat and perfectly periodic")
        : "rows as they are, infinite, flat and perfectly periodic";

    /// <summary>Spacings that were moved to a common period at some wavelengths; empty where each was solved as it is.</summary>
    public ValueList<SpacingMove> MovedSpacings { get; init; } = [];

    /// <summary>The longest wavelength at which they were, in nm; null where none was.</summary>
    public double? MovedUpToNm { get; init; }

    /// <summary>Name of the mixing rule; null where nothing was averaged into films.</summary>
    public required string? Mixing { get; init; }

    /// <summary>Name of the average of porous cores; null where there are none.</summary>
    public required string? CoreMixing { get; init; }

    /// <summary>Estimate of the largest absolute error of the solution in R, T, A and diffracted R: of the numbers, not of the layer picture nor of the
    /// section measured.</summary>
    public required double ErrorEstimate { get; init; }

    /// <summary>Number of films the section was replaced by; null where it was solved as it is.</summary>
    public required int? FilmCount { get; init; }

    /// <summary>The materials met, each once, the surround first.</summary>
    public required ValueList<Material> Materials { get; init; }

    /// <summary>Where the power goes: for each angle s, p and unpolarized, or the polarization asked for alone.</summary>
    public required ValueList<SpectralResponse> Responses { get; init; }

    /// <summary>The power in each direction that light leaves in, in the order of <see cref="Responses"/>; empty for films, which have the mirror's alone.</summary>
    public required ValueList<DiffractionOrder> Orders { get; init; }

    /// <summary>The power lost in each material that absorbs, in the order of <see cref="Responses"/>; empty for films.</summary>
    public required ValueList<MaterialLoss> Losses { get; init; }

    /// <summary>One view an angle.</summary>
    public required ValueList<View> Views { get; init; }

    /// <summary>The main peak of the smallest angle, followed over the angles in ascending order.</summary>
    public required PeakTrack Track { get; init; }

    /// <summary>What the result leans on.</summary>
    public required ValueList<PredictionWarning> Warnings { get; init; }
}

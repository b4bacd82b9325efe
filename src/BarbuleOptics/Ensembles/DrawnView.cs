using BarbuleOptics.Color;
using BarbuleOptics.Ensembles.Statistics;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;

namespace BarbuleOptics.Ensembles;

/// <summary>What all draws show at one angle.</summary>
public sealed record DrawnView
{
    /// <summary>Angle of incidence in the surround.</summary>
    public required Angle Incidence { get; init; }

    /// <summary>Polarization of the incident light.</summary>
    public required Polarizations Polarization { get; init; }

    /// <summary>Reflectance at each wavelength.</summary>
    public required ReflectanceBands Bands { get; init; }

    /// <summary>Peaks of the mean of the intensities.</summary>
    public required SpectrumFeatures MeanFeatures { get; init; }

    /// <summary>Color of the mean of the intensities; null where the grid leaves out visible light.</summary>
    public required CieColor? MeanColor { get; init; }

    /// <summary>Peak, color and bird coordinates by name, unit included, those that some draw has.</summary>
    public required ValueList<(string Name, DrawnValue Value)> Values { get; init; }

    /// <summary>Hue terms, most probable first; empty without color.</summary>
    public required ValueList<TermShare> Terms { get; init; }

    /// <summary>The same under each shipped set of melanin constants; empty where the structure names none of them.</summary>
    public ValueList<MelaninTerms> Melanins { get; init; } = [];

    /// <summary>Wavelength of the mean geometry's main peak, in nm, which was followed; null where it has none.</summary>
    public required double? FollowedPeakNm { get; init; }

    /// <summary>Share of the draws in which that peak is not found again.</summary>
    public required double PeakLostShare { get; init; }

    /// <summary>Share of the draws in which it is found and another peak is higher.</summary>
    public required double OtherPeakShare { get; init; }

    /// <summary>Largest disagreement of two sets of melanin constants: half the sum of absolute differences of their shares, 0 to 1; null with fewer than two.</summary>
    public double? LargestDisagreement
        => Melanins.Count < 2 ? null : Melanins.SelectMany(one => Melanins.Select(other => MelaninTerms.Disagreement(one.Terms, other.Terms))).Max();

    /// <summary>One value by name; null where no draw has it.</summary>
    public DrawnValue? Value(string name) => Values.FirstOrDefault(value => value.Name == name).Value;
}

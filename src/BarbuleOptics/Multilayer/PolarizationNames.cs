using BarbuleOptics.Quantities;

namespace BarbuleOptics.Multilayer;

/// <summary>How polarizations are written on the command line and in files.</summary>
public static class PolarizationNames
{
    /// <summary>All names.</summary>
    public static ValueList<string> All { get; } = ["unpolarized", "s", "p"];

    /// <summary>The name of a polarization.</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="polarization"/> is none.</exception>
    public static string Of(Polarizations polarization) => polarization switch
    {
        Polarizations.Unpolarized => "unpolarized",
        Polarizations.S => "s",
        Polarizations.P => "p",
        _ => throw new ArgumentOutOfRangeException(nameof(polarization), polarization, "Must be s, p or unpolarized."),
    };

    /// <summary>The polarization of a name; false when there is none.</summary>
    public static bool TryFind(string? name, out Polarizations polarization)
    {
        polarization = name switch
        {
            "unpolarized" => Polarizations.Unpolarized,
            "s" => Polarizations.S,
            "p" => Polarizations.P,
            _ => Polarizations.None,
        };
        return polarization != Polarizations.None;
    }
}

using System.Globalization;
using System.Text;
using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Random sections, directions and wavelengths; lengths in nm, uniform in the ranges that stand below.</summary>
internal sealed class RandomSections(int seed)
{
    private readonly Random _random = new(seed);

    /// <summary>Rows of round rods: solid and hollow, alone, touching or nested in depth, over a film or not.</summary>
    public string Rods(bool lossless = false)
    {
        StringBuilder text = Start(lossless);
        double diameter = In(60, 180);
        double spacing = diameter * (Chance(0.2) ? 1 : In(1, 1.6));
        text.Append("[[layer]]\nform = \"rod\"\n");
        Line(text, "diameter", diameter);
        if (Chance(0.5))
            Line(text, "lumen", diameter * (Chance(0.1) ? 0.98 : In(0.2, 0.8)));
        if (lossless)
            text.Append("material = { n = 1.9, k = 0 }\n");
        Line(text, "spacing", spacing);
        AddRows(text, diameter);
        return Finish(text, lossless);
    }

    /// <summary>Rows of flattened rods or platelets, solid and hollow.</summary>
    public string Flat(bool lossless = false)
    {
        StringBuilder text = Start(lossless);
        double height = In(50, 110), width = height * In(1.5, 3);
        bool hollow = Chance(0.5);
        text.Append("[[layer]]\n");
        if (Chance(0.6))
        {
            text.Append("form = \"flattened-rod\"\n");
            Line(text, "height", height);
            if (hollow)
            {
                double share = In(0.3, 0.7);
                Line(text, "lumen_height", height * share);
                Line(text, "lumen_width", width * share);
            }
        }
        else
        {
            text.Append("form = \"platelet\"\n");
            Line(text, "thickness", height);
            if (hollow)
                Line(text, "wall", height * In(0.15, 0.35));
        }
        Line(text, "width", width);
        if (lossless)
            text.Append("material = { n = 1.9, k = 0 }\n");
        Line(text, "spacing", width * In(1.02, 1.5));
        AddRows(text, height);
        return Finish(text, lossless);
    }

    /// <summary>Rows of platelets: solid, walled with an empty or a porous core, touching or apart.</summary>
    public string Platelets()
    {
        StringBuilder text = Start(lossless: false);
        double thickness = In(40, 140), width = thickness * In(1.2, 3.5);
        text.Append("[[layer]]\nform = \"platelet\"\n");
        Line(text, "thickness", thickness);
        Line(text, "width", width);
        if (Chance(0.6))
        {
            Line(text, "wall", thickness * In(0.1, 0.35));
            Line(text, "core_air", Chance(0.3) ? 1 : In(0.2, 0.9));
        }
        Line(text, "spacing", width * (Chance(0.15) ? 1 : In(1.02, 1.5)));
        AddRows(text, thickness);
        return Finish(text, lossless: false);
    }

    /// <summary>Angle of the rods' axis, in degrees: across more often than not.</summary>
    public double Axis() => _random.Next(6) switch { 0 => 90, 1 => In(1, 89), _ => 0 };

    /// <summary>Angle of incidence, in degrees.</summary>
    public double Incidence() => _random.Next(4) == 0 ? 0 : In(0, 75);

    /// <summary>s or p.</summary>
    public Polarizations Polarization() => Chance(0.5) ? Polarizations.S : Polarizations.P;

    /// <summary>A wavelength.</summary>
    public double WavelengthNm() => In(300, 780);

    /// <summary>A number between two.</summary>
    public double In(double least, double most) => least + (most - least) * _random.NextDouble();

    private bool Chance(double share) => _random.NextDouble() < share;

    private StringBuilder Start(bool lossless)
    {
        var text = new StringBuilder("[barbule]\n");
        if (lossless)
            text.Append("matrix = { n = 1.55, k = 0 }\n");
        if (lossless || Chance(0.3))
            text.Append(CultureInfo.InvariantCulture, $"backing = {{ n = {In(1, 1.8):0.###}, k = {(lossless ? 0 : In(0, 0.3)):0.###} }}\n");
        if (Chance(0.2))
            text.Append("surround = { n = 1.33, k = 0 }\n");
        text.Append("[cortex]\n");
        Line(text, "thickness", Chance(0.1) ? 0 : In(0, 300));
        return text;
    }

    private void AddRows(StringBuilder text, double height)
    {
        int rows = _random.Next(1, 6);
        text.Append(CultureInfo.InvariantCulture, $"rows = {rows}\n");
        if (rows > 1)
        {
            bool staggered = Chance(0.5);
            Line(text, "row_separation", Chance(0.2) ? 0 : In(0, 80));
            text.Append(staggered ? "stacking = \"staggered\"\n" : "stacking = \"aligned\"\n");
        }
        Line(text, "gap", Chance(0.2) ? 0 : In(0, 0.5 * height + 60));
    }

    private string Finish(StringBuilder text, bool lossless)
    {
        if (Chance(0.2))
        {
            text.Append("[[layer]]\nform = \"film\"\n");
            Line(text, "thickness", In(20, 120));
            Line(text, "gap", In(0, 100));
            if (lossless)
                text.Append("material = { n = 1.7, k = 0 }\n");
        }
        if (Chance(0.2))
        {
            text.Append("[back]\nbehind = \"air\"\n");
            Line(text, "thickness", In(100, 3000));
            text.Append(Chance(0.5) ? "coherent = true\n" : "coherent = false\n");
        }
        return text.ToString();
    }

    private static void Line(StringBuilder text, string key, double value)
        => text.Append(CultureInfo.InvariantCulture, $"{key} = {value:0.###}\n");
}

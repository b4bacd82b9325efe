using System.CommandLine;
using System.CommandLine.Parsing;
using System.Globalization;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra.Instruments;

namespace BarbuleOptics.Cli;

/// <summary>Options that describe an instrument; without any of them views are of the reflectance at one angle.</summary>
internal sealed class InstrumentOptions
{
    private const string WhiteStandard = "white-standard";

    private static readonly string[] References = ["mirror", WhiteStandard];
    private static readonly string[] Geometries = ["turning-arms", "one-line", "fixed-arms:"];

    private readonly CheckedOption<(Angle Light, Angle Collection)?> _aperture = new("--aperture", "half[,half]", "Half angle in degrees of the cones of light and of collection: one number for both, or two; or a numerical aperture in air, NA0.15 [none: one direction]", null, Aperture);
    private readonly CheckedOption<FacetTilt?> _tilt = new("--tilt", "sd|arc:half", "Tilt of the facets in a spot: standard deviation in degrees of a normal distribution, or arc:20 for normals evenly up to 20 degrees to either side across the rods, as on a curved barbule [flat]", null, Tilt);
    private readonly CheckedOption<Angle?> _rodSpread = new("--rod-spread", "sd", "Standard deviation in degrees of the rods' direction within their facets [0]", null, RodSpread);
    private readonly CheckedOption<ArmGeometry?> _geometry = new("--geometry", "NAME", "Arms of the instrument at each of --angles: turning-arms (light at the angle, collected where a flat mirror sends it), one-line (light and collection both at the angle), fixed-arms:60 (two arms 60 degrees apart, the line between them at the angle) [turning-arms]", null, Geometry, Geometries);
    private readonly CheckedOption<SignalReference?> _reference = new("--reference", "NAME", $"What signals are divided by: {string.Join(" or ", References)}, a perfect matt white [mirror]", null, Reference, References);

    /// <summary>The options.</summary>
    public IEnumerable<Option> All => [_aperture.Option, _tilt.Option, _rodSpread.Option, _geometry.Option, _reference.Option];

    /// <summary>The instrument they describe; null where none was given.</summary>
    public Instrument? Of(ParseResult parse)
    {
        if (All.All(option => parse.GetResult(option) is null))
            return null;
        (Angle light, Angle collection) = _aperture.Of(parse) ?? default;
        return new Instrument
        {
            Light = light,
            Collection = collection,
            Tilt = _tilt.Of(parse) ?? FacetTilt.Flat,
            RodSpread = _rodSpread.Of(parse) ?? default,
            Arms = _geometry.Of(parse) ?? ArmGeometry.TurningArms,
            Reference = _reference.Of(parse) ?? SignalReference.Mirror,
        };
    }

    /// <summary>Refuses what has no meaning together: a matt white needs a cone to send light into.</summary>
    public void Refuse(CommandResult result)
    {
        if (result.GetResult(_reference.Option) is { Tokens.Count: > 0 } reference && reference.Tokens[^1].Value == WhiteStandard && result.GetResult(_aperture.Option) is null)
            result.AddError($"--reference: found '{WhiteStandard}' without --aperture; a matt white sends nothing into a cone of no width: allowed with --aperture");
    }

    /// <summary>Refuses an instrument beside what is drawn: draws are of the reflectance of flat sections.</summary>
    public void RefuseBeside(CommandResult result, string drawing)
    {
        foreach (Option option in All.Where(option => result.GetResult(option) is not null))
            result.AddError($"{option.Name}: found with {drawing}, whose draws are of the reflectance of flat sections; allowed in predict without --draws");
    }

    private static bool Aperture(string text, out (Angle Light, Angle Collection)? cones, out string allowed)
    {
        cones = null;
        allowed = FormattableString.Invariant($"a half angle above 0 to {Instrument.MostHalfAngleDegrees} degrees, two of them (light,collection; one may be 0), or NA with a number above 0 and below 1, such as 7.5, 2,10 or NA0.15");
        if (text.StartsWith("NA", StringComparison.OrdinalIgnoreCase))
        {
            if (!Number(text[2..], out double aperture) || aperture is <= 0 or >= 1)
                return false;
            Angle half = Instrument.FromAperture(aperture);
            cones = (half, half);
            return half.Degrees <= Instrument.MostHalfAngleDegrees;
        }
        string[] parts = text.Split(',');
        double[] degrees = new double[2];
        for (int i = 0; i < 2; i++)
        {
            if (parts.Length > 2 || !Number(parts[Math.Min(i, parts.Length - 1)], out degrees[i]) || degrees[i] is < 0 or > Instrument.MostHalfAngleDegrees)
                return false;
        }
        cones = (Angle.FromDegrees(degrees[0]), Angle.FromDegrees(degrees[1]));
        return degrees[0] > 0 || degrees[1] > 0;
    }

    private static bool Tilt(string text, out FacetTilt? tilt, out string allowed)
    {
        tilt = null;
        allowed = FormattableString.Invariant($"a standard deviation above 0 to {FacetTilt.MostNormalDegrees} degrees, or arc: with a half width above 0 to {FacetTilt.MostArcDegrees} degrees, such as 5 or arc:20");
        bool isArc = text.StartsWith("arc:", StringComparison.Ordinal);
        if (!Number(isArc ? text[4..] : text, out double degrees) || degrees <= 0 || degrees > (isArc ? FacetTilt.MostArcDegrees : FacetTilt.MostNormalDegrees))
            return false;
        tilt = isArc ? FacetTilt.Arc(Angle.FromDegrees(degrees)) : FacetTilt.Normal(Angle.FromDegrees(degrees));
        return true;
    }

    private static bool RodSpread(string text, out Angle? spread, out string allowed)
    {
        spread = null;
        allowed = FormattableString.Invariant($"a standard deviation of 0 to {FacetTilt.MostNormalDegrees} degrees");
        if (!Number(text, out double degrees) || degrees is < 0 or > FacetTilt.MostNormalDegrees)
            return false;
        spread = Angle.FromDegrees(degrees);
        return true;
    }

    private static bool Geometry(string text, out ArmGeometry? arms, out string allowed)
    {
        arms = null;
        allowed = FormattableString.Invariant($"turning-arms, one-line or fixed-arms: with the angle between the arms, 0 to below {ArmGeometry.MostSpanDegrees} degrees, such as fixed-arms:60");
        if (text.StartsWith(Geometries[2], StringComparison.Ordinal))
        {
            if (!Number(text[Geometries[2].Length..], out double span) || span is < 0 or >= ArmGeometry.MostSpanDegrees)
                return false;
            arms = ArmGeometry.FixedArms(Angle.FromDegrees(span));
            return true;
        }
        arms = text == Geometries[0] ? ArmGeometry.TurningArms : ArmGeometry.OneLine;
        return text == Geometries[0] || text == Geometries[1];
    }

    private static bool Reference(string text, out SignalReference? reference, out string allowed)
    {
        allowed = string.Join(" or ", References);
        reference = text == WhiteStandard ? SignalReference.WhiteStandard : SignalReference.Mirror;
        return References.Contains(text);
    }

    private static bool Number(string text, out double number)
        => double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out number) && double.IsFinite(number);
}

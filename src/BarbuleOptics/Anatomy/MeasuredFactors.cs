using BarbuleOptics.Quantities;

namespace BarbuleOptics.Anatomy;

/// <summary>Every factor of a structure with its name.</summary>
public static class MeasuredFactors
{
    /// <summary>The factors given, named as on the command line: <c>preparation.obliquity</c>; with the unit, empty for a pure number.</summary>
    public static IEnumerable<(string Key, MeasuredFactor Factor, string Unit)> Of(Barbule barbule)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        (string Key, MeasuredFactor? Factor, string Unit)[] all =
        [
            ("preparation.obliquity", barbule.Preparation?.ObliquityDegrees, "deg"),
            ("preparation.keratin_scale", barbule.Preparation?.KeratinScale, ""),
            ("preparation.melanin_scale", barbule.Preparation?.MelaninScale, ""),
            ("preservation.melanosome_shrinkage", barbule.Preservation?.MelanosomeShrinkage, ""),
            ("preservation.cortex_shrinkage", barbule.Preservation?.CortexShrinkage, ""),
        ];
        return all.Where(one => one.Factor is not null).Select(one => (one.Key, one.Factor!, one.Unit));
    }

    /// <summary>The same structure with other values for the factors that it has, in the order of <see cref="Of"/>.</summary>
    /// <exception cref="ArgumentException">There are not as many values as factors.</exception>
    public static Barbule With(Barbule barbule, ReadOnlySpan<double> values)
    {
        ArgumentNullException.ThrowIfNull(barbule);
        Guard.SameLength(Of(barbule).Count(), values.Length, nameof(values));
        int at = 0;
        Preparation? preparation = barbule.Preparation is null ? null : new Preparation(
            Next(barbule.Preparation.ObliquityDegrees, values, ref at), Next(barbule.Preparation.KeratinScale, values, ref at), Next(barbule.Preparation.MelaninScale, values, ref at));
        Preservation? preservation = barbule.Preservation is null ? null : new Preservation(
            Next(barbule.Preservation.MelanosomeShrinkage, values, ref at), Next(barbule.Preservation.CortexShrinkage, values, ref at));
        return barbule with { Preparation = preparation, Preservation = preservation };
    }

    private static MeasuredFactor.Exact? Next(MeasuredFactor? factor, ReadOnlySpan<double> values, ref int at)
        => factor is null ? null : new MeasuredFactor.Exact(values[at++]);
}

using System.Numerics;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Which orders travel, and wavelengths at which one is neither traveling nor fading.</summary>
internal static class OrderCount
{
    /// <summary>Least |kz/k0|^2 of an order besides the zeroth. At this distance from an order's opening R differs from its limit by
    /// about 1e-6, and amplitudes near 1e6 still leave powers ten digits.</summary>
    private const double LeastDepthSquared = 1e-12;

    /// <summary>Largest order that travels in any of the media.</summary>
    public static int Most(in PointLight light, ReadOnlySpan<Complex> media, double periodNm)
    {
        double step = light.WavelengthNm / periodNm, across = Math.Abs(light.Index * light.Across), along = light.Index * light.Along;
        int most = 0;
        foreach (Complex permittivity in media)
        {
            double reach = permittivity.Real - along * along;
            if (reach > 0)
                most = Math.Max(most, (int)Math.Floor((Math.Sqrt(reach) + across) / step));
        }
        return most;
    }

    /// <summary>The light at a wavelength, changed by parts in 1e12, at which no order grazes.</summary>
    /// <param name="light">The light.</param>
    /// <param name="media">Permittivities of all media.</param>
    /// <param name="periodNm">The period.</param>
    public static PointLight AwayFromGrazing(PointLight light, ReadOnlySpan<Complex> media, double periodNm)
    {
        double wavelengthNm = light.WavelengthNm;
        for (int attempt = 1; attempt <= 20 && Grazes(light, media, periodNm); attempt++)
            light = light with { WavelengthNm = wavelengthNm * (1 + 2e-12 * attempt) };
        return light;
    }

    private static bool Grazes(in PointLight light, ReadOnlySpan<Complex> media, double periodNm)
    {
        double step = light.WavelengthNm / periodNm, across = light.Index * light.Across, along = light.Index * light.Along;
        int most = Most(light, media, periodNm) + 1;
        for (int order = -most; order <= most; order++)
        {
            double lateral = across + order * step;
            double lateralSquared = lateral * lateral + along * along;
            foreach (Complex permittivity in media)
            {
                if (order != 0 && Math.Abs(permittivity.Real - lateralSquared) + permittivity.Imaginary < LeastDepthSquared)
                    return true;
            }
        }
        return false;
    }
}

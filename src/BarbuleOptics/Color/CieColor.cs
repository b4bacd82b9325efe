namespace BarbuleOptics.Color;

/// <summary>The color of one reflectance spectrum, with everything that is reported of it. Immutable.</summary>
public sealed record CieColor
{
    /// <param name="observer">The observer.</param>
    /// <param name="illuminant">The illuminant.</param>
    /// <param name="color">Tristimulus values of that observer.</param>
    /// <param name="white">Those of a perfect mirror.</param>
    /// <param name="color1931">Tristimulus values of the 1931 observer, for sRGB.</param>
    /// <param name="white1931">Those of a perfect mirror for it.</param>
    internal CieColor(
        StandardObserver observer, Illuminant illuminant, Tristimulus color, Tristimulus white, Tristimulus color1931, Tristimulus white1931)
    {
        Observer = observer;
        Illuminant = illuminant;
        Tristimulus = color;
        Chromaticity = color.ChromaticityOr(white);
        UniformChromaticity = UniformChromaticity.Of(color, white);
        White = white;
        Lab = CieLab.FromTristimulus(color, white);
        Luv = CieLuv.FromTristimulus(color, white);
        (double? wavelengthNm, ExcitationPurity) = SpectralLocus.Of(observer).Locate(Chromaticity, white.ChromaticityOr(white));
        DominantWavelengthNm = HueTerms.IsAchromatic(Lab) ? null : wavelengthNm;
        HueTerm = HueTerms.Of(Lab);
        Srgb = SrgbEncoder.Encode(color1931, white1931, out bool inGamut);
        InSrgbGamut = inGamut;
        SrgbBrightened = SrgbEncoder.EncodeBrightened(color1931, white1931);
    }

    /// <summary>The observer.</summary>
    public StandardObserver Observer { get; }

    /// <summary>The illuminant.</summary>
    public Illuminant Illuminant { get; }

    /// <summary>X, Y, Z; a perfect mirror has Y = 100.</summary>
    public Tristimulus Tristimulus { get; }

    /// <summary>x, y; those of the white for black, which has none.</summary>
    public Chromaticity Chromaticity { get; }

    /// <summary>u', v'; those of the white for black.</summary>
    public UniformChromaticity UniformChromaticity { get; }

    /// <summary>Tristimulus values of the perfect mirror that it is relative to.</summary>
    public Tristimulus White { get; }

    /// <summary>L*u*v* relative to the same white; holds the saturation.</summary>
    public CieLuv Luv { get; }

    /// <summary>L*a*b* relative to the perfect mirror under the same illuminant for the same observer; holds C* and h, too.</summary>
    public CieLab Lab { get; }

    /// <summary>
    /// The dominant wavelength in nm; for a purple the complementary wavelength, negative; null for an achromatic color
    /// (<see cref="HueTerms.IsAchromatic"/>).
    /// </summary>
    public double? DominantWavelengthNm { get; }

    /// <summary>
    /// How far the chromaticity lies on the way from the white (0) to the spectral locus or the purple line (1). Given for achromatic colors, too;
    /// negative reflectances may bring it above 1.
    /// </summary>
    public double ExcitationPurity { get; }

    /// <summary>The word for the color, one of <see cref="HueTerms"/>.</summary>
    public string HueTerm { get; }

    /// <summary>The sRGB color, from the 1931 observer whatever <see cref="Observer"/> is; see <see cref="SrgbEncoder"/>.</summary>
    public SrgbColor Srgb { get; }

    /// <summary>The sRGB color lifted to the lightness <see cref="SrgbEncoder.BrightenedLightness"/> where it is darker.</summary>
    public SrgbColor SrgbBrightened { get; }

    /// <summary>Whether sRGB holds the color itself, so that <see cref="Srgb"/> is not a paler stand-in.</summary>
    public bool InSrgbGamut { get; }
}

using BarbuleOptics.Color;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>sRGB, its adaptation and its landmarks.</summary>
public sealed class SrgbTests
{
    // Source: IEC 61966-2-1, both matrices as printed (from memory), white 0.9505 1.0000 1.0890.
    private static readonly double[][] ToXyz = [[0.4124, 0.3576, 0.1805], [0.2126, 0.7152, 0.0722], [0.0193, 0.1192, 0.9505]];
    private static readonly double[][] ToLinear = [[3.2406, -1.5372, -0.4986], [-0.9689, 1.8758, 0.0415], [0.0557, -0.2040, 1.0570]];
    private static readonly Tristimulus White = new(95.05, 100, 108.90);

    // IEC 61966-2-1 decoded and encoded again must be the same 8 bits; the rounding of the printed matrix is far below one step.
    [Fact]
    public void Decoded_colors_encode_to_themselves()
    {
        for (int red = 0; red < 256; red += 15)
            for (int green = 0; green < 256; green += 15)
                for (int blue = 0; blue < 256; blue += 15)
                {
                    var color = new SrgbColor((byte)red, (byte)green, (byte)blue);
                    Assert.Equal(color, SrgbEncoder.Encode(Decode(color), White, out bool inGamut));
                    Assert.True(inGamut);
                }
    }

    // The inverse matrix and the knee as IEC 61966-2-1 prints them. Four decimals of the matrix: within one step of 255.
    [Theory]
    [InlineData(20.0, 21.0, 22.0)]
    [InlineData(20.0, 30.0, 15.0)]
    [InlineData(40.0, 30.0, 20.0)]
    [InlineData(0.2, 0.21, 0.23)]
    [InlineData(0.02, 0.021, 0.023)]
    public void Encoding_follows_the_printed_formula(double x, double y, double z)
    {
        SrgbColor found = SrgbEncoder.Encode(new Tristimulus(x, y, z), White, out _);
        byte[] channels = [found.Red, found.Green, found.Blue];
        for (int i = 0; i < 3; i++)
        {
            double linear = (ToLinear[i][0] * x + ToLinear[i][1] * y + ToLinear[i][2] * z) / 100;
            double encoded = linear <= 0.0031308 ? 12.92 * linear : 1.055 * Math.Pow(linear, 1 / 2.4) - 0.055;
            Assert.Equal(255 * encoded, channels[i], 0.6);
        }
    }

    // Source: CIELAB of the sRGB primaries under D65, widely printed (from memory; from a matrix with more digits, hence 0.03).
    [Theory]
    [InlineData("#ff0000", 53.24, 80.09, 67.20)]
    [InlineData("#00ff00", 87.73, -86.18, 83.18)]
    [InlineData("#0000ff", 32.30, 79.19, -107.86)]
    public void Primaries_have_their_known_Lab(string hex, double l, double a, double b)
    {
        CieLab lab = CieLab.FromTristimulus(Decode(Parse(hex)), White);
        Assert.Equal(l, lab.L, 0.03);
        Assert.Equal(a, lab.A, 0.03);
        Assert.Equal(b, lab.B, 0.05);
    }

    // Source: the red, green and blue colorants of ICC's sRGB profile, adapted to the D50 of ICC.1 (0.9642 1 0.8249) by Bradford (from memory).
    [Theory]
    [InlineData("#ff0000", 0.4360, 0.2225, 0.0139)]
    [InlineData("#00ff00", 0.3851, 0.7169, 0.0971)]
    [InlineData("#0000ff", 0.1431, 0.0606, 0.7141)]
    public void Bradford_gives_the_colorants_of_the_ICC_profile(string hex, double x, double y, double z)
    {
        Tristimulus adapted = ChromaticAdaptation.Bradford(Decode(Parse(hex)), White, new Tristimulus(96.42, 100, 82.49));
        Assert.Equal(x, adapted.X / 100, 2e-4);
        Assert.Equal(y, adapted.Y / 100, 2e-4);
        Assert.Equal(z, adapted.Z / 100, 2e-4);
    }

    // Dominant wavelengths of the primaries of IEC 61966-2-1 against D65. First: widely printed (from memory, 0.1 nm); they are read off a locus
    // of straight lines between 5 nm points, which differs from the 1 nm locus by 0.12 nm. Second: computed apart from this project, from
    // the 1 nm tables of spec2cie with the ray and the locus intersected in another program.
    [Theory]
    [InlineData(0.64, 0.33, 611.4, 611.279)]
    [InlineData(0.30, 0.60, 549.1, 549.134)]
    [InlineData(0.15, 0.06, 464.2, 464.307)]
    public void Primaries_have_their_known_dominant_wavelength(double x, double y, double printedNm, double computedNm)
    {
        SpectralLocus locus = SpectralLocus.Of(StandardObserver.Cie1931TwoDegree);
        (double? foundNm, double purity) = locus.Locate(new Chromaticity(x, y), new Chromaticity(0.3127, 0.3290));
        Assert.NotNull(foundNm);
        Assert.Equal(printedNm, foundNm.Value, 0.15);
        Assert.Equal(computedNm, foundNm.Value, 0.005);
        Assert.InRange(purity, 0.5, 1);
    }

    // Source: CSS Color Module Level 4, named colors. A color that the list calls by one of our terms must get that term.
    [Theory]
    [InlineData("#ff0000", "red")]
    [InlineData("#8b0000", "red")]
    [InlineData("#ffa500", "orange")]
    [InlineData("#ffff00", "yellow")]
    [InlineData("#9acd32", "yellow-green")]
    [InlineData("#00ff00", "green")]
    [InlineData("#008000", "green")]
    [InlineData("#2e8b57", "green")]
    [InlineData("#0000ff", "blue")]
    [InlineData("#4682b4", "blue")]
    [InlineData("#6495ed", "blue")]
    [InlineData("#9400d3", "violet")]
    [InlineData("#8a2be2", "violet")]
    [InlineData("#800080", "purple")]
    [InlineData("#c71585", "red-purple")]
    [InlineData("#000000", "black")]
    [InlineData("#808080", "gray")]
    [InlineData("#ffffff", "white")]
    public void Named_colors_of_the_web_keep_their_name(string hex, string term)
        => Assert.Equal(term, HueTerms.Of(CieLab.FromTristimulus(Decode(Parse(hex)), White)));

    // Teal, blue and green at equal strength (CSS: #008080), is what "blue-green" means.
    [Fact]
    public void Teal_is_blue_green() => Assert.Equal("blue-green", HueTerms.Of(CieLab.FromTristimulus(Decode(Parse("#008080")), White)));

    private static SrgbColor Parse(string hex) => new(Convert.ToByte(hex[1..3], 16), Convert.ToByte(hex[3..5], 16), Convert.ToByte(hex[5..7], 16));

    private static Tristimulus Decode(SrgbColor color)
    {
        double[] linear = [.. new[] { color.Red, color.Green, color.Blue }.Select(static channel => channel / 255.0)
            .Select(static v => v <= 0.04045 ? v / 12.92 : Math.Pow((v + 0.055) / 1.055, 2.4))];
        double[] xyz = [.. ToXyz.Select(row => 100 * (row[0] * linear[0] + row[1] * linear[1] + row[2] * linear[2]))];
        return new Tristimulus(xyz[0], xyz[1], xyz[2]);
    }
}

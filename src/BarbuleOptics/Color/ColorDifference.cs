namespace BarbuleOptics.Color;

/// <summary>The CIEDE2000 color difference.</summary>
/// <remarks>
/// Source: CIE 142 / ISO/CIE 11664-6 in the form of Sharma, Wu and Dalal, Color Res. Appl. 30:21 (2005), 10.1002/col.20070,
/// equations 2 to 22 (numbers from memory), with kL = kC = kH = 1. Their 34 worked pairs are met to all four decimals. The formula jumps where two hues are
/// 180 degrees apart.
/// </remarks>
public static class ColorDifference
{
    private static readonly double Pow25To7 = Math.Pow(25, 7);

    /// <summary>The difference of two colors; about 1 is just noticeable side by side. Symmetric; 0 for equal colors.</summary>
    public static double Ciede2000(CieLab first, CieLab second)
    {
        double g = 0.5 * (1 - Saturation((first.Chroma + second.Chroma) / 2));
        var (c1, h1) = ChromaAndHue((1 + g) * first.A, first.B);
        var (c2, h2) = ChromaAndHue((1 + g) * second.A, second.B);

        double deltaL = second.L - first.L;
        double deltaC = c2 - c1;
        double deltaH = 2 * Math.Sqrt(c1 * c2) * SinDegrees(HueStep(c1 * c2, h1, h2) / 2);

        double meanL = (first.L + second.L) / 2;
        double meanC = (c1 + c2) / 2;
        double meanH = MeanHue(c1 * c2, h1, h2);

        double lightness = deltaL / LightnessWeight(meanL);
        double chroma = deltaC / (1 + 0.045 * meanC);
        double hue = deltaH / (1 + 0.015 * meanC * HueWeight(meanH));
        return Math.Sqrt(lightness * lightness + chroma * chroma + hue * hue + Rotation(meanC, meanH) * chroma * hue);
    }

    /// <summary>sqrt(C^7 / (C^7 + 25^7)).</summary>
    private static double Saturation(double chroma)
    {
        double power = Math.Pow(chroma, 7);
        return Math.Sqrt(power / (power + Pow25To7));
    }

    private static (double Chroma, double HueDegrees) ChromaAndHue(double a, double b)
    {
        var color = new CieLab(0, a, b);
        return (color.Chroma, color.HueDegrees);
    }

    /// <summary>Equation 10: the way from the first hue to the second, -180 to 180 degrees.</summary>
    private static double HueStep(double chromaProduct, double h1, double h2)
    {
        if (chromaProduct == 0)
            return 0;
        double step = h2 - h1;
        return step > 180 ? step - 360 : step < -180 ? step + 360 : step;
    }

    /// <summary>Equation 14.</summary>
    private static double MeanHue(double chromaProduct, double h1, double h2)
    {
        double sum = h1 + h2;
        if (chromaProduct == 0)
            return sum;
        if (Math.Abs(h1 - h2) <= 180)
            return sum / 2;
        return sum < 360 ? (sum + 360) / 2 : (sum - 360) / 2;
    }

    /// <summary>S_L, equation 18.</summary>
    private static double LightnessWeight(double meanL)
    {
        double square = (meanL - 50) * (meanL - 50);
        return 1 + 0.015 * square / Math.Sqrt(20 + square);
    }

    /// <summary>T, equation 15.</summary>
    private static double HueWeight(double h)
        => 1 - 0.17 * CosDegrees(h - 30) + 0.24 * CosDegrees(2 * h) + 0.32 * CosDegrees(3 * h + 6) - 0.20 * CosDegrees(4 * h - 63);

    /// <summary>R_T, equations 16, 17 and 21.</summary>
    private static double Rotation(double meanC, double meanH)
    {
        double offset = (meanH - 275) / 25;
        double deltaTheta = 30 * Math.Exp(-offset * offset);
        return -SinDegrees(2 * deltaTheta) * 2 * Saturation(meanC);
    }

    private static double SinDegrees(double degrees) => Math.Sin(double.DegreesToRadians(degrees));

    private static double CosDegrees(double degrees) => Math.Cos(double.DegreesToRadians(degrees));
}

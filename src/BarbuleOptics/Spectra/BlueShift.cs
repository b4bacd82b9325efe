namespace BarbuleOptics.Spectra;

/// <summary>The law by which an interference peak moves with the angle, lambda(a) = lambda_0 sqrt(1 - (n_s sin a)^2 / n^2).</summary>
/// <param name="NormalWavelengthNm">lambda_0, the wavelength at normal incidence, in nm.</param>
/// <param name="EffectiveIndex">n, the index that the shift shows: a mean over what the light crosses.</param>
/// <param name="ResidualNm">Root mean square of the distance between the peaks and the law, in nm.</param>
/// <remarks>
/// n_s is the index of the surround, a the angle in it. For one film the law is that of its fringes,
/// 2 n d cos(angle inside) = order times lambda, with Snell's law; a stack of films follows it nearly.
/// </remarks>
public sealed record BlueShift(double NormalWavelengthNm, double EffectiveIndex, double ResidualNm)
{
    /// <summary>Least shift over all angles that is taken for one, in nm: the accuracy of a peak's wavelength.</summary>
    public const double LeastShiftNm = 0.05;

    /// <summary>The law that fits peaks best.</summary>
    /// <param name="sinesSquared">(n_s sin a)^2 of each peak.</param>
    /// <param name="wavelengthsNm">Wavelength of each peak, in nm.</param>
    /// <returns>Null with fewer than two angles, or where the peaks do not shift towards the blue.</returns>
    /// <remarks>The law is a straight line in lambda^2 = A - B (n_s sin a)^2, with n^2 = A/B. Least squares of lambda^2 weighted by
    /// 1/lambda^2 are, to first order in the residuals, least squares of lambda itself.</remarks>
    internal static BlueShift? Fit(ReadOnlySpan<double> sinesSquared, ReadOnlySpan<double> wavelengthsNm)
    {
        double weight = 0, meanX = 0, meanY = 0;
        for (int i = 0; i < wavelengthsNm.Length; i++)
        {
            double square = wavelengthsNm[i] * wavelengthsNm[i];
            weight += 1 / square;
            meanX += sinesSquared[i] / square;
            meanY += 1; // lambda^2 times its weight
        }
        (meanX, meanY) = (meanX / weight, meanY / weight);

        double xx = 0, xy = 0;
        for (int i = 0; i < wavelengthsNm.Length; i++)
        {
            double square = wavelengthsNm[i] * wavelengthsNm[i], x = sinesSquared[i] - meanX;
            xx += x * x / square;
            xy += x * (square - meanY) / square;
        }
        if (!(xx > 0))
            return null;
        double slope = -xy / xx;
        double atNormal = meanY + slope * meanX;
        double normalNm = Math.Sqrt(atNormal);
        double shiftNm = slope * (Greatest(sinesSquared) - Least(sinesSquared)) / (2 * normalNm);
        if (!(shiftNm >= LeastShiftNm))
            return null;
        double index = Math.Sqrt(atNormal / slope);
        return new BlueShift(normalNm, index, Residual(sinesSquared, wavelengthsNm, atNormal, slope));
    }

    private static double Residual(ReadOnlySpan<double> sinesSquared, ReadOnlySpan<double> wavelengthsNm, double atNormal, double slope)
    {
        double sum = 0;
        for (int i = 0; i < wavelengthsNm.Length; i++)
        {
            double distance = wavelengthsNm[i] - Math.Sqrt(Math.Max(0, atNormal - slope * sinesSquared[i]));
            sum += distance * distance;
        }
        return Math.Sqrt(sum / wavelengthsNm.Length);
    }

    private static double Greatest(ReadOnlySpan<double> values)
    {
        double greatest = values[0];
        foreach (double value in values)
            greatest = Math.Max(greatest, value);
        return greatest;
    }

    private static double Least(ReadOnlySpan<double> values)
    {
        double least = values[0];
        foreach (double value in values)
            least = Math.Min(least, value);
        return least;
    }
}

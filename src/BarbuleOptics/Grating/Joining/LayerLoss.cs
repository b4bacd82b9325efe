using System.Numerics;
using static BarbuleOptics.Multilayer.StableFunctions;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Power one channel loses in a homogeneous layer, in closed form.</summary>
/// <remarks>
/// The power lost is k0 times the integral of u |phi|^2 + v |psi|^2: in s u = Im e, in p u = K^2 Im(e)/|e|^2 and v = Im e, with K the
/// lateral wave number in units of k0. With a the amplitude that enters from one side and b from the other, X = (1 - exp(-2 k'' d))/(2 k'')
/// and Y = exp(-k'' d) sin(k' d)/k', the integral of |phi|^2 is (|a|^2 + |b|^2) X + 2 Re(conj(a) b) Y, that of |psi|^2
/// is |eta|^2 times the same with - Y.
/// </remarks>
internal static class LayerLoss
{
    /// <summary>The power, in units of Re(conj(phi) psi).</summary>
    /// <param name="table">The channels.</param>
    /// <param name="channel">The channel.</param>
    /// <param name="medium">Number of the layer's medium.</param>
    /// <param name="thicknessNm">Its thickness, in nm.</param>
    /// <param name="first">Amplitude that enters from one side.</param>
    /// <param name="second">Amplitude that enters from the other.</param>
    public static double Of(ChannelTable table, int channel, int medium, double thicknessNm, Complex first, Complex second)
    {
        Complex permittivity = table.Permittivity(medium);
        double loss = permittivity.Imaginary;
        if (loss == 0)
            return 0;
        Complex kz = table.Kz(medium)[channel % table.Orders];
        double turn = kz.Real * thicknessNm, decay = kz.Imaginary * thicknessNm;
        (double kept, double faded) = Decay(decay);
        double direct = decay == 0 ? thicknessNm : thicknessNm * faded * (1 + kept) / (2 * decay);
        double cross = kept * thicknessNm * (turn == 0 ? 1 : Math.Sin(turn) / turn);
        double size = Norm(first) + Norm(second), product = 2 * (first.Real * second.Real + first.Imaginary * second.Imaginary);
        double phi = size * direct + product * cross, psi = Norm(table.Eta(medium)[channel]) * (size * direct - product * cross);
        return table.Waves.K0 * loss * (table.IsP(channel) ? table.LateralSquared(channel) / Norm(permittivity) * phi + psi : phi);
    }
}

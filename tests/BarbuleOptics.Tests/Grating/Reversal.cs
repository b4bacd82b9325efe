using System.Numerics;
using BarbuleOptics.Grating;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Exchange of source and receiver: between the answer to waves and the answer to the same waves reversed.</summary>
internal static class Reversal
{
    /// <summary>The largest defect over all pairs of channels, weighted by the admittances of the channels and relative to these weights.</summary>
    public static double Defect(GratingWaves waves, ScatteringBlock there, ScatteringBlock back)
    {
        double worst = 0;
        for (int i = 0; i < waves.ChannelCount; i++)
        {
            for (int j = 0; j < waves.ChannelCount; j++)
            {
                int from = Mirrored(waves, j), to = Mirrored(waves, i);
                Complex weight = Weight(waves, i) / Weight(waves, j);
                double defect = (weight * there.ReflectTop[i, j] - back.ReflectTop[from, to]).Magnitude;
                defect = Math.Max(defect, (weight * there.ReflectBottom[i, j] - back.ReflectBottom[from, to]).Magnitude);
                defect = Math.Max(defect, (weight * there.TransmitDown[i, j] - back.TransmitUp[from, to]).Magnitude);
                worst = Math.Max(worst, defect / (1 + weight.Magnitude));
            }
        }
        return worst;
    }

    private static int Mirrored(GratingWaves waves, int channel)
        => channel / waves.OrderCount * waves.OrderCount + waves.OrderCount - 1 - channel % waves.OrderCount;

    // Admittance of a channel; H takes the other sign, since reversed light has its H reversed.
    private static Complex Weight(GratingWaves waves, int channel)
    {
        Complex kz = waves.Kz[channel % waves.OrderCount];
        return waves.Field == RodField.Both && channel < waves.OrderCount ? -waves.Matrix * kz : kz;
    }
}

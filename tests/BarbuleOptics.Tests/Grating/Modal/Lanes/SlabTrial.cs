using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Grating.Modal;
using BarbuleOptics.Grating.Modal.Lanes;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Tests.Grating.Modal.Lanes;

/// <summary>Solves a slab in lanes and by the reference, a wavelength a lane, and tells the largest difference of any element of their blocks.</summary>
internal readonly struct SlabTrial(
    PlacedOutline[] bodies, double heightNm, double periodNm, Complex[] permittivities, double kx0Share, double wavelengthNm, RodField field, int mostOrder, int harmonics)
    : ILaneAction<double>
{
    public double Invoke<TLanes>()
        where TLanes : struct, ILanes<TLanes>
    {
        int lanes = TLanes.Count, channels = 2 * mostOrder + 1;
        var light = new SlabLight();
        light.Reserve(lanes, permittivities.Length);
        double[] k0 = new double[lanes], kx0 = new double[lanes];
        for (int lane = 0; lane < lanes; lane++)
        {
            k0[lane] = 2 * Math.PI / (wavelengthNm + 7 * lane);
            kx0[lane] = kx0Share * k0[lane];
            for (int material = 0; material < permittivities.Length; material++)
            {
                light.Permittivities[2 * material * lanes + lane] = permittivities[material].Real;
                light.Permittivities[(2 * material + 1) * lanes + lane] = permittivities[material].Imaginary;
            }
        }
        light.Set(k0, kx0, periodNm);
        double[] reflection = new double[channels * channels * 2 * lanes], transmission = new double[channels * channels * 2 * lanes];
        var shape = new SlabShape(bodies, heightNm, periodNm);
        if (!UprightSlab.Covers(shape) || TLanes.Any(new UprightSlab(shape).Scatter<TLanes>(light, field == RodField.Electric, mostOrder, harmonics, reflection, transmission)))
            return double.NaN;
        double most = 0;
        for (int lane = 0; lane < lanes; lane++)
        {
            var waves = new GratingWaves();
            waves.Set(wavelengthNm + 7 * lane, kx0[lane], 0, periodNm, permittivities, mostOrder, field);
            ScatteringBlock expected = ModalCase.Solve(new ModalSlab(bodies, heightNm, periodNm), waves, harmonics);
            for (int i = 0; i < channels * channels; i++)
            {
                most = Math.Max(most, (expected.ReflectTop.Elements[i] - At(reflection, i, lane, lanes)).Magnitude);
                most = Math.Max(most, (expected.ReflectBottom.Elements[i] - At(reflection, i, lane, lanes)).Magnitude);
                most = Math.Max(most, (expected.TransmitDown.Elements[i] - At(transmission, i, lane, lanes)).Magnitude);
                most = Math.Max(most, (expected.TransmitUp.Elements[i] - At(transmission, i, lane, lanes)).Magnitude);
            }
        }
        return most;
    }

    private static Complex At(double[] elements, int i, int lane, int lanes) => new(elements[2 * i * lanes + lane], elements[(2 * i + 1) * lanes + lane]);
}

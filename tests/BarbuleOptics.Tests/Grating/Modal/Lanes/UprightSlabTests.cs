using System.Numerics;
using BarbuleOptics.Grating;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using Xunit;

namespace BarbuleOptics.Tests.Grating.Modal.Lanes;

/// <summary>Slabs of upright walls in lanes against the reference, one wavelength at a time.</summary>
public class UprightSlabTests
{
    public static TheoryData<int> Widths => [512, 256, 128, 64];

    /// <summary>Measured: at most 5e-11, most of which is the reference's elements in depth.</summary>
    [Theory]
    [MemberData(nameof(Widths))]
    public void Random_platelets_come_out_as_by_the_reference(int bits)
    {
        var random = new Random(41);
        for (int i = 0; i < 24; i++)
        {
            bool lossless = random.Next(3) == 0;
            Complex[] permittivities = [
                new(In(1.8, 2.5), random.Next(4) == 0 ? In(0, 0.1) : 0), new(In(2.2, 4), lossless ? 0 : In(0, 0.9)), new(In(1, 2), lossless ? 0 : In(0, 0.3))];
            double height = In(30, 160), width = In(80, 300), wall = In(0.1, 0.35) * Math.Min(height, width), periodNm = width * In(1.02, 1.6);
            CellBody body = random.Next(2) == 0 ? ModalCase.Rectangle(width, height) : ModalCase.Walled(width, height, wall);
            // The planes of some slabs lie beyond their platelets, and those of some cut them.
            double slabNm = height * (random.Next(3) switch { 0 => 1, 1 => In(1.05, 1.3), _ => In(0.8, 0.95) });
            double share = random.Next(3) == 0 ? 0 : In(0, 0.95);
            var trial = new SlabTrial(
                [body.At(random.Next(2) == 0 ? 0 : In(0, periodNm), slabNm / 2)], slabNm, periodNm, permittivities, share, In(300, 760),
                random.Next(2) == 0 ? RodField.Electric : RodField.Magnetic, random.Next(4), random.Next(3, 9));
            double difference = LaneWidth.Parse($"{bits}")!.Value.Invoke<SlabTrial, double>(trial);
            Assert.True(difference < 1e-10, $"{difference} in trial {i}");
        }

        double In(double least, double most) => least + (most - least) * random.NextDouble();
    }

    /// <summary>Platelets of two heights side by side, and platelets that touch, whose row is a closed film.</summary>
    [Theory]
    [InlineData(260, 0.3)]
    [InlineData(140, 0)]
    public void Cells_of_several_platelets_come_out_as_by_the_reference(double periodNm, double share)
    {
        PlacedOutline[] bodies = periodNm > 200
            ? [ModalCase.Rectangle(80, 90).At(0, 50), ModalCase.Walled(100, 60, 12).At(130, 50)]
            : [ModalCase.Rectangle(140, 90).At(20, 50)];
        foreach (RodField field in (ReadOnlySpan<RodField>)[RodField.Electric, RodField.Magnetic])
        {
            var trial = new SlabTrial(bodies, 100, periodNm, ModalCase.Absorbing, share, 410, field, 2, 7);
            Assert.InRange(LaneWidth.Default.Invoke<SlabTrial, double>(trial), 0, 1e-10);
        }
    }
}

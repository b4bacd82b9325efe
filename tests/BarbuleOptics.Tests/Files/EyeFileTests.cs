using System.Text;
using BarbuleOptics.Color;
using BarbuleOptics.Files;
using BarbuleOptics.Quantities;
using BarbuleOptics.Vision;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>Files of eyes, lights and backgrounds give what they say.</summary>
public sealed class EyeFileTests
{
    [Fact]
    public void A_file_may_say_everything_itself()
    {
        VisualSystem eye = Eye("""
            format = 1
            name = "marsh-singer"
            source = "invented"
            obtained = "invented"
            weber_fraction = 0.08
            double_weber_fraction = 0.2
            [media]
            half_nm = 320
            width_nm = 12
            [shortest]
            pigment_nm = 368
            number = 1
            [short]
            pigment_nm = 446
            number = 2
            cut_nm = 420
            mid_nm = 437
            [medium]
            pigment_nm = 503
            number = 2.5
            cut_nm = 513
            mid_nm = 530
            [long]
            pigment_nm = 565
            number = 3
            cut_nm = 570
            mid_nm = 595
            """);
        Assert.Equal([new Cone(368, null, 1), new Cone(446, new OilDroplet(420, 437), 2), new Cone(503, new OilDroplet(513, 530), 2.5), new Cone(565, new OilDroplet(570, 595), 3)], eye.SingleCones);
        Assert.Equal((new OcularMedia(320, 12), 0.08, 0.2, "invented", "invented"), (eye.Media, eye.WeberFraction, eye.DoubleWeberFraction, eye.Source, eye.Obtained));
        Assert.Null(eye.DoubleCone);
    }

    [Fact]
    public void What_a_file_leaves_out_is_that_of_the_system_it_is_like()
    {
        VisualSystem eye = Eye("format = 1\nname = \"x\"\nlike = \"peafowl\"\n[long]\nnumber = 4\n[short]\ntransparent = true\n");
        VisualSystem peafowl = VisualSystems.Peafowl;
        Assert.Equal([peafowl.SingleCones[0], new Cone(458, null, 1.9), peafowl.SingleCones[2], new Cone(567, peafowl.SingleCones[3].Droplet, 4)], eye.SingleCones);
        Assert.Equal((peafowl.Media, peafowl.DoubleCone, peafowl.Source), (eye.Media, eye.DoubleCone, eye.Source));
        Assert.Equal("peafowl with values given by the user", eye.Obtained);
    }

    // 1 photon at 400 nm carries 1.4 times the energy of one at 560 nm: by hand, E = h c/l.
    [Fact]
    public void Photons_become_energy()
    {
        const string Rows = "rows = [[300, 1], [400, 1], [560, 1], [780, 1]]\n";
        Illuminant photons = Light("format = 1\nname = \"x\"\nunit = \"photons\"\n" + Rows), energy = Light("format = 1\nname = \"x\"\n" + Rows);
        Assert.Equal(140, photons.RelativePower(Length.FromNanometres(400)), 1e-9);
        Assert.Equal(100, energy.RelativePower(Length.FromNanometres(400)), 1e-9);
    }

    [Fact]
    public void A_background_runs_straight_between_its_rows()
    {
        FileResult<AdaptingBackground> read = SampledFile.ParseBackground(Encoding.UTF8.GetBytes("format = 1\nname = \"x\"\nrows = [[290, 0], [310, 0.2], [710, 0.6]]\n"), "x");
        Assert.Empty(read.Problems);
        Spectrum reflectance = read.Value!.Reflectance;
        Assert.Equal((300, 700, 0.1, 0.3), (reflectance.Grid.StartNm, reflectance.Grid.StopNm, Math.Round(reflectance[0], 12), Math.Round(reflectance[110], 12)));
    }

    private static VisualSystem Eye(string text)
    {
        FileResult<VisualSystem> read = EyeFile.Parse(Encoding.UTF8.GetBytes(text), "eye.toml");
        Assert.True(read.Succeeded, string.Join('\n', read.Problems));
        return read.Value;
    }

    private static Illuminant Light(string text)
    {
        FileResult<Illuminant> read = SampledFile.ParseLight(Encoding.UTF8.GetBytes(text), "light.toml");
        Assert.True(read.Succeeded, string.Join('\n', read.Problems));
        return read.Value;
    }
}

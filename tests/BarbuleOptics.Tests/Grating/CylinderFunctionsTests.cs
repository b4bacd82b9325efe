using System.Numerics;
using BarbuleOptics.Grating.Multipoles;
using MathNet.Numerics;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Bessel and Hankel functions of complex argument.</summary>
public class CylinderFunctionsTests
{
    // Abramowitz and Stegun, Handbook of Mathematical Functions, tables 9.1 and 9.2 (from memory; all digits agree with mpmath 1.3).
    [Theory]
    [InlineData(1.0, 0, 0.7651976866, 0.0882569642)]
    [InlineData(1.0, 1, 0.4400505857, -0.7812128213)]
    [InlineData(5.0, 0, -0.1775967713, -0.3085176252)]
    [InlineData(10.0, 0, -0.2459357645, 0.0556711673)]
    [InlineData(10.0, 1, 0.0434727462, 0.2490154242)]
    public void Real_arguments_match_tabulated_values(double x, int m, double j, double y)
    {
        (Complex foundJ, Complex foundH) = Unscaled(x, m);
        Assert.Equal(j, foundJ.Real, 6e-11);
        Assert.Equal(y, foundH.Imaginary, 6e-11);
        Assert.Equal(j, foundH.Real, 6e-11);
    }

    // Computed with mpmath 1.3 at 90 digits. Largest error measured: 6e-15 of the value, beside zeros of J_m of 1e-2.
    [Theory]
    [InlineData(0.001, 0.002, 0, 1.0000007499998906, -1.0000003750000191e-6, 0.29516286093675595, -3.9591216316285325)]
    [InlineData(0.001, 0.002, 1, 0.00050000068750010678, 0.0010000001249999011, -254.64348393484175, -127.32579802340098)]
    [InlineData(0.001, 0.002, 5, 1.0677083018662963e-17, -9.895836349826529e-18, 2972658074345816.7, -3207339998228832.0)]
    [InlineData(0.001, 0.002, 20, -3.7839963326600613e-78, -5.789634410795937e-79, 6.2881109970412055e+74, 4.1097914067878627e+75)]
    [InlineData(0.001, 0.002, 31, -3.7573768285904327e-126, 9.0321698302692895e-127, -6.2103152341785785e+122, 2.5834871114830575e+123)]
    [InlineData(0.69999999999999996, 0.0, 0, 0.8812008886074053, 0.0, 0.8812008886074053, -0.19066492933739512)]
    [InlineData(0.69999999999999996, 0.0, 1, 0.32899574154005893, 0.0, 0.32899574154005893, -1.1032498719076334)]
    [InlineData(0.69999999999999996, 0.0, 5, 4.2882407058885479e-5, 0.0, 4.2882407058885479e-5, -1499.9983172514863)]
    [InlineData(0.69999999999999996, 0.0, 20, 3.1095858376600629e-28, 0.0, 3.1095858376600629e-28, -5.1213495595076059e+25)]
    [InlineData(0.69999999999999996, 0.0, 31, 8.9007166579557581e-49, 0.0, 8.9007166579557581e-49, -1.1539163351399909e+46)]
    [InlineData(2.4048255576957729, 0.0, 0, -6.1087652597367304e-17, 0.0, -6.1087652597367304e-17, 0.50992438344847907)]
    [InlineData(2.4048255576957729, 0.0, 1, 0.51914749728946676, 0.0, 0.51914749728946676, 0.1027466824382596)]
    [InlineData(2.4048255576957729, 0.0, 5, 0.016389243204805852, 0.0, 0.016389243204805852, -4.4919848883206289)]
    [InlineData(2.4048255576957729, 0.0, 20, 1.5310874781579102e-17, 0.0, 1.5310874781579102e-17, -1047106375815167.3)]
    [InlineData(2.4048255576957729, 0.0, 31, 3.5237406168725217e-32, 0.0, 3.5237406168725217e-32, -2.9227832104644392e+29)]
    [InlineData(5.0, 3.0, 0, -0.82671066540395971, 3.2432199411359523, -0.011491471543250507, -0.01150470257779589)]
    [InlineData(5.0, 3.0, 1, -3.1827605600677619, -0.53217037614288965, -0.012835219682808293, 0.011202202136515391)]
    [InlineData(5.0, 3.0, 5, 0.22330911878482278, 0.98508733694458286, -0.037404596695997614, -0.042288194156733818)]
    [InlineData(5.0, 3.0, 20, -3.4888418580866544e-10, -5.72368880358729e-10, 20152855.519610603, 13391785.281030966)]
    [InlineData(5.0, 3.0, 31, -1.8861750856339367e-20, -1.9804685931440066e-20, 2.6991270589568966e+17, 2.6536494310406266e+17)]
    [InlineData(0.40000000000000002, 1.1000000000000001, 0, 1.2670475143468265, -0.24985061358578535, 0.11915521361902331, -0.19335021895753742)]
    [InlineData(0.40000000000000002, 1.1000000000000001, 1, 0.29249072385270999, 0.59907468135268128, -0.24822541185801934, -0.18394253473818959)]
    [InlineData(0.40000000000000002, 1.1000000000000001, 5, 0.00058459005518833247, -0.00012429425183644017, 23.449789501488085, -101.56315010059986)]
    [InlineData(0.40000000000000002, 1.1000000000000001, 20, 7.054869453779714e-24, -5.9749313837688681e-24, 1.1125677596407335e+21, -1.3107328777945984e+21)]
    [InlineData(0.40000000000000002, 1.1000000000000001, 31, 7.3953086729288864e-42, 1.321285497800631e-42, -2.3964815453320991e+38, -1.3448800702437177e+39)]
    [InlineData(9.5, 0.01, 0, -0.19393929297676234, -0.0016126671871931263, -0.19190745786612739, 0.16960545023068555)]
    [InlineData(9.5, 0.01, 1, 0.16127129466139804, -0.0021090762268053654, 0.15977304128316204, 0.20108165822620997)]
    [InlineData(9.5, 0.01, 5, -0.16132806153880291, -0.0018422710853873816, -0.15978450586924211, 0.22675561992465905)]
    [InlineData(9.5, 0.01, 20, 4.6655095167721094e-6, 8.7108673795580663e-8, -71.200485623076156, -3877.7532574076834)]
    [InlineData(9.5, 0.01, 31, 5.6584939176070565e-14, 1.7611572891582222e-15, -5907189088.372232, -190463932516.53066)]
    [InlineData(3.0, 25.0, 0, -5636625940.0297383, -1153892521.5132686, 1.8098448690634337e-13, 2.1901674596784948e-12)]
    [InlineData(3.0, 25.0, 1, 1117296551.1689912, -5527157293.1639155, 2.2333648357613507e-12, -1.7943418913516181e-13)]
    [InlineData(3.0, 25.0, 5, 489625382.93067643, -3450930304.5126582, 3.5586558866573013e-12, -9.247470427452728e-14)]
    [InlineData(3.0, 25.0, 20, -2123372.3557871269, 1629743.0621179042, -2.468567571997153e-9, 2.7701816512906623e-9)]
    [InlineData(3.0, 25.0, 31, 141.77549749883353, -3.7830062435877514, 4.1736546003943543e-6, -5.6231522301842708e-5)]
    [InlineData(67.324925325520439, 0.0, 0, -0.082168345393156996, 0.0, -0.082168345393156996, -0.052000309702936248)]
    [InlineData(67.324925325520439, 0.0, 1, -0.052611946806819265, 0.0, -0.052611946806819265, 0.081784442775571854)]
    [InlineData(67.324925325520439, 0.0, 5, -0.066371195708576805, 0.0, -0.066371195708576805, 0.07125102306515392)]
    [InlineData(67.324925325520439, 0.0, 20, 0.091050433037576516, 0.0, 0.091050433037576516, 0.040153640137204012)]
    [InlineData(67.324925325520439, 0.0, 31, 0.10318645051145832, 0.0, 0.10318645051145832, -0.0019524617239849791)]
    [InlineData(90.0, 40.0, 0, 1066016535584633.1, -9406921415005554.2, 1.7289151886465378e-19, 2.9436543634795179e-19)]
    [InlineData(90.0, 40.0, 1, 9392563692995178.1, 1020097966598446.2, 2.9577529442224679e-19, -1.7188668196424189e-19)]
    [InlineData(90.0, 40.0, 5, 8995148965530453.8, -32593606416044.156, 3.2899961209565271e-19, -1.4516935963916348e-19)]
    [InlineData(90.0, 40.0, 20, -4082536753638869.9, 751297039003227.0, -7.6443914694357368e-19, 1.9678547081960179e-19)]
    [InlineData(90.0, 40.0, 31, 420149271552993.87, -1204863448307908.0, 1.8647743150005315e-18, 1.8365137647630363e-18)]
    public void Complex_arguments_match_values_of_high_precision(
        double x, double y, int m, double jReal, double jImaginary, double hReal, double hImaginary)
    {
        (Complex j, Complex h) = Unscaled(new Complex(x, y), m);
        Complex expectedJ = new(jReal, jImaginary), expectedH = new(hReal, hImaginary);
        double size = Math.Max(expectedJ.Magnitude, Math.Min(1e-2, expectedH.Magnitude));
        if (expectedJ.Magnitude < 1e-16 && expectedH.Magnitude > 1)
            size = expectedJ.Magnitude;
        Assert.True((j - expectedJ).Magnitude < 1e-13 * size, $"J {j} against {expectedJ}");
        Assert.True((h - expectedH).Magnitude < 1e-13 * expectedH.Magnitude, $"H {h} against {expectedH}");
    }

    // J H' - J' H = 2 i/(pi z) at every order. Largest error measured: 2e-15 times the order.
    [Fact]
    public void Wronskian_holds_over_the_whole_range()
    {
        var functions = new CylinderFunctions();
        for (double size = 1e-6; size < 100; size *= 1.7)
        {
            for (int i = 0; i <= 12; i++)
            {
                functions.Set(Complex.FromPolarCoordinates(size, i * Math.PI / 24), 31);
                for (int m = 0; m <= 31; m++)
                {
                    Complex wronskian = functions.J[m] * functions.HSlope[m] - functions.JSlope[m] * functions.H[m];
                    Assert.True((wronskian - new Complex(0, 2 / Math.PI)).Magnitude < 1e-14 * (m + 1), $"z {functions.Argument}, m {m}: {wronskian}");
                }
            }
        }
    }

    // MathNet.Numerics as the second method, over what a section may ask for. Largest difference measured: 1.4e-13, at |z| = 67.
    [Fact]
    public void A_general_library_gives_the_same()
    {
        var functions = new CylinderFunctions();
        for (double size = 0.01; size < 90; size *= 1.61)
        {
            for (int i = 0; i <= 8; i++)
            {
                Complex z = Complex.FromPolarCoordinates(size, 0.02 + i * (Math.PI / 2 - 0.02) / 8);
                functions.Set(z, 20);
                for (int m = 0; m <= 20; m += 5)
                {
                    (Complex j, Complex h) = Unscaled(functions, m);
                    Complex otherJ = SpecialFunctions.BesselJ(m, z), otherH = SpecialFunctions.HankelH1(m, z);
                    Assert.True((j - otherJ).Magnitude < 1e-12 * otherJ.Magnitude, $"J_{m}({z}) = {j} against {otherJ}");
                    Assert.True((h - otherH).Magnitude < 1e-12 * otherH.Magnitude, $"H_{m}({z}) = {h} against {otherH}");
                }
            }
        }
    }

    [Theory]
    [InlineData(1e-12, 0)]
    [InlineData(300, 0)]
    [InlineData(40, 600)]
    public void Extreme_arguments_stay_finite(double x, double y)
    {
        var functions = new CylinderFunctions();
        functions.Set(new Complex(x, y), 31);
        for (int m = 0; m <= 31; m++)
        {
            Assert.True(Complex.IsFinite(functions.J[m]) && Complex.IsFinite(functions.H[m]));
            Assert.True(Complex.IsFinite(functions.JSlope[m]) && Complex.IsFinite(functions.HSlope[m]));
        }
    }

    private static (Complex J, Complex H) Unscaled(Complex z, int m)
    {
        var functions = new CylinderFunctions();
        functions.Set(z, 31);
        return Unscaled(functions, m);
    }

    private static (Complex J, Complex H) Unscaled(CylinderFunctions functions, int m)
    {
        Complex z = functions.Argument;
        double scale = 1;
        for (int i = 1; i <= m; i++)
            scale *= z.Magnitude / 2 / i;
        return (functions.J[m] * scale * Math.Exp(z.Imaginary), functions.H[m] / scale * Math.Exp(-z.Imaginary));
    }
}

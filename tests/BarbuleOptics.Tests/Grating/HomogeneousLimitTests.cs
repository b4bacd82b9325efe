using BarbuleOptics.Multilayer;
using Xunit;

namespace BarbuleOptics.Tests.Grating;

/// <summary>Bodies with the index of what surrounds them leave films, which the multilayer solver answers exactly.</summary>
public class HomogeneousLimitTests
{
    // Largest difference found over all cases below: 4e-14.
    private const double Tolerance = 1e-12;

    private const string Rods = """
        form = "rod"
        material = { n = 1.56, k = 0.02 }
        diameter = 120
        """;

    public static TheoryData<string, double> Structures => new(
        from text in new[] { Plain, OnFilms, Dense, Bare, Coherent, Averaged, Absorbing }
        from axis in new[] { 0.0, 90, 35 }
        select (text, axis));

    private static string Plain => Structure("", "", "");

    private static string OnFilms => Structure("", "", """

        [[layer]]
        form = "film"
        material = { n = 1.7, k = 0.1 }
        thickness = 60
        rows = 3
        pitch = 100
        gap = 20
        """ + Layer);

    // Total reflection at the backing beyond 36 degrees.
    private static string Dense => Structure("surround = { n = 1.7, k = 0 }\nbacking = { n = 1.0, k = 0 }", "", "");

    private static string Bare => Structure("surround = { n = 1.2, k = 0 }\nbacking = { n = 0.3, k = 4 }", "", "", cortex: 0);

    private static string Coherent => Structure("", "[back]\nthickness = 300\nbehind = { n = 1.2, k = 0.3 }\ncoherent = true", "");

    private static string Averaged => Structure("backing = { n = 1.5, k = 0 }", "[back]\nthickness = 900\nbehind = \"air\"", "");

    private static string Absorbing => Structure("backing = { n = 1.5, k = 0.01 }", "[back]\nthickness = 900\nbehind = { n = 1.3, k = 0 }", "");

    [Theory]
    [MemberData(nameof(Structures))]
    public void Rods_of_the_matrix_own_index_are_films(string text, double axisDegrees)
    {
        GratingCase section = GratingCase.Of(text).At(axisDegrees);
        foreach (double wavelengthNm in (double[])[320, 467, 731])
        {
            foreach (double degrees in (double[])[0, 23, 60, 89])
            {
                foreach (Polarizations polarization in (Polarizations[])[Polarizations.S, Polarizations.P, Polarizations.Unpolarized])
                {
                    GratingAnswer answer = section.Solve(wavelengthNm, degrees, polarization);
                    GratingCase.Powers films = section.AsFilms(wavelengthNm, degrees, polarization);
                    string where = FormattableString.Invariant($"{wavelengthNm} nm, {degrees} deg, {polarization}: {answer} not {films}");
                    Assert.True(Math.Abs(answer.Reflected - films.Reflected) < Tolerance, where);
                    Assert.True(Math.Abs(answer.Transmitted - films.Transmitted) < Tolerance, where);
                    Assert.True(Math.Abs(answer.Absorbed - films.Absorbed) < Tolerance, where);
                    Assert.True(answer.Diffracted < Tolerance, where);
                }
            }
        }
    }

    private static string Layer => "\n[[layer]]\n" + Rods + "\nspacing = 170\nrows = 3\npitch = 150\nstacking = \"staggered\"\ngap = 10\n";

    private static string Structure(string barbule, string back, string more, double cortex = 150) => FormattableString.Invariant($$"""
        [barbule]
        matrix = { n = 1.56, k = 0.02 }
        {{barbule}}
        [cortex]
        thickness = {{cortex}}
        {{Layer}}
        {{more}}
        {{back}}
        """);
}

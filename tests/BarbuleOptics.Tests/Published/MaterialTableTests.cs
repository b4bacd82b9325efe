using System.Numerics;
using BarbuleOptics.Files;
using BarbuleOptics.Materials;
using Xunit;

namespace BarbuleOptics.Tests.Published;

/// <summary>The optical constants that the program carries, against values printed in their sources.</summary>
public class MaterialTableTests
{
    // Leertouwer, Wilts & Stavenga 2011, Opt. Express 19:24061, doi 10.1364/OE.19.024061, abstract: three decimals measured at 400, 500
    // and 600 nm, beside the fitted coefficients; the fit rounds to each.
    [Theory]
    [InlineData("keratin", 400, 1.569)]
    [InlineData("keratin", 500, 1.556)]
    [InlineData("keratin", 600, 1.548)]
    [InlineData("chitin", 400, 1.572)]
    [InlineData("chitin", 500, 1.552)]
    [InlineData("chitin", 600, 1.541)]
    public void Keratin_and_chitin_round_to_the_measured_indices(string name, double wavelengthNm, double index)
        => Assert.Equal(index, Math.Round(IndexAt(name, wavelengthNm).Real, 3));

    // Stavenga et al. 2015, Light Sci. Appl. 4:e243, abstract: 1.7 to 1.8 over the visible.
    [Fact]
    public void Melanin_lies_between_1_7_and_1_8_and_absorbs_less_towards_the_red()
    {
        for (double wavelengthNm = 400; wavelengthNm < 650; wavelengthNm += 10)
        {
            Assert.InRange(IndexAt("eumelanin", wavelengthNm).Real, 1.7, 1.8);
            Assert.True(IndexAt("eumelanin", wavelengthNm).Imaginary > IndexAt("eumelanin", wavelengthNm + 10).Imaginary);
        }
    }

    // Malitson 1965 (fused silica at the helium d line), Daimon & Masumura 2007 (water, 20 C), Dodge 1984 (magnesium fluoride),
    // Devore 1951 (rutile): the sources named in the tables; n as tabulated from their formulas, to the last digit given.
    [Theory]
    [InlineData("fused-silica", 587.5618, 1.458464, 6)]
    [InlineData("n-bk7", 587.5618, 1.5168, 5)]
    [InlineData("water", 589.3, 1.333349, 6)]
    [InlineData("mgf2", 589.3, 1.377712, 6)]
    [InlineData("tio2-rutile", 589.3, 2.6129, 4)]
    public void Formulas_give_the_tabulated_index(string name, double wavelengthNm, double index, int decimals)
        => Assert.Equal(index, Math.Round(IndexAt(name, wavelengthNm).Real, decimals));

    // Daimon & Masumura 2007, Table 1, measured; digits seen as quoted by others. The formula's residuals are below 1e-5.
    [Theory]
    [InlineData(404.77, 1.343113)]
    [InlineData(587.725, 1.333399)]
    [InlineData(894.596, 1.327068)]
    public void Water_has_the_measured_indices(double wavelengthNm, double index)
        => Assert.Equal(index, IndexAt("water", wavelengthNm).Real, 1e-5);

    // Schott catalogue, N-BK7: Abbe number 64.17 from the lines d, F (486.1327 nm) and C (656.2725 nm).
    [Fact]
    public void Crown_glass_has_its_abbe_number()
    {
        double abbe = (IndexAt("n-bk7", 587.5618).Real - 1) / (IndexAt("n-bk7", 486.1327).Real - IndexAt("n-bk7", 656.2725).Real);

        Assert.Equal(64.17, abbe, 0.005);
    }

    // Babar & Weaver 2015, Appl. Opt. 54:477, rows of their table.
    [Theory]
    [InlineData(399.9, 0.054, 2.138)]
    [InlineData(495.9, 0.052, 3.105)]
    [InlineData(539.1, 0.05168, 3.483)]
    [InlineData(619.9, 0.04803, 4.164)]
    public void Silver_has_the_rows_of_its_table(double wavelengthNm, double n, double k)
        => Assert.Equal(new Complex(n, k), IndexAt("silver", wavelengthNm));

    // Noyes, Vukusic & Hooper 2007, Opt. Express 15:4351, abstract.
    [Theory]
    [InlineData("melanin-exocuticle-1", 1.68, 0.03)]
    [InlineData("melanin-exocuticle-2", 1.55, 0.14)]
    public void Beetle_cuticle_has_the_fitted_pair(string name, double n, double k)
        => Assert.Equal(new Complex(n, k), IndexAt(name, 550));

    // A material without a source of energy has k >= 0 where time goes as exp(-i omega t) (common practice, no source).
    [Fact]
    public void Every_table_names_its_source_and_is_passive_over_its_range()
    {
        Assert.True(EmbeddedMaterials.Catalog.Tables.Count >= 12);
        foreach (MaterialTable table in EmbeddedMaterials.Catalog.Tables)
        {
            Material material = table.Material;
            Assert.False(string.IsNullOrWhiteSpace(material.Source));
            Assert.False(string.IsNullOrWhiteSpace(material.Obtained));
            for (int i = 0; i <= 50; i++)
            {
                Complex index = material.IndexAt(material.LeastNm + i * (material.MostNm - material.LeastNm) / 50);
                Assert.True(index.Real > 0 && index.Imaginary >= 0, material.Name);
            }
        }
    }

    private static Complex IndexAt(string name, double wavelengthNm)
    {
        Assert.True(EmbeddedMaterials.Catalog.TryFind(new MaterialReference.Named(name), out Material? material));
        return material.IndexAt(wavelengthNm);
    }
}

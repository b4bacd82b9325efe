using System.Numerics;
using BarbuleOptics.Layering;
using BarbuleOptics.Layering.Mixing;
using Xunit;

namespace BarbuleOptics.Tests.Layering;

/// <summary>Slices hold the areas that plane geometry gives, whatever lies beside what.</summary>
public sealed class SliceTests
{
    /// <summary>Bodies of index sqrt(2) in a matrix of index 1: the mean permittivity is 1 + the share of the bodies.</summary>
    private const string Unit = "barbule.matrix = { n = 1.0 }\nbarbule.backing = { n = 1.0 }\n";
    private const string Two = "material = { n = 1.4142135623730951 }\n";

    [Fact]
    public void Rods_keep_their_area()
    {
        Section section = Structures.Section(Unit + "[[layer]]\nform = \"rod\"\ndiameter = 120\nspacing = 170\nrows = 3\npitch = 150\n" + Two);
        Assert.Equal(3 * Math.PI * 60 * 60 / 170, Excess(section, 3).Sum(), 1e-7 * 200);
    }

    [Fact]
    public void Hollow_rods_of_interleaved_rows_keep_their_area()
    {
        // Staggered rows 60 nm apart: each depth meets rods of two or three rows.
        Section section = Structures.Section(Unit + "[[layer]]\nform = \"rod\"\ndiameter = 110\nlumen = 50\nspacing = 240\nrows = 4\npitch = 60\nstacking = \"staggered\"\nlumen_material = { n = 1.0 }\n" + Two);
        Assert.Equal(4 * Math.PI * (55 * 55 - 25 * 25) / 240, Excess(section, 4).Sum(), 1e-7 * 200);
    }

    [Fact]
    public void Flattened_rods_and_platelets_of_one_cell_keep_their_area()
    {
        Section section = Structures.Section(Unit + $$"""
            [[layer]]
            spacing = 500
            [[layer.body]]
            form = "flattened-rod"
            height = 80
            width = 200
            lumen_height = 30
            lumen_width = 90
            lumen_material = { n = 1.0 }
            {{Two}}
            [[layer.body]]
            form = "platelet"
            thickness = 60
            width = 150
            wall = 10
            lumen_material = { n = 1.0 }
            x = 0.5
            z = 7
            {{Two}}
            """);
        double ellipse = Math.PI / 4 * (80 * 200 - 30 * 90), box = 60 * 150 - 40 * 130;
        Assert.Equal((ellipse + box) / 500, Excess(section, 3).Sum(), 1e-7 * 200);
    }

    [Fact]
    public void Each_slice_holds_its_segment_of_the_circle()
    {
        Section section = Structures.Section(Unit + "[[layer]]\nform = \"rod\"\ndiameter = 100\nspacing = 100\n" + Two);
        const int Slices = 6;
        double[] excess = Excess(section, Slices);
        for (int slice = 0; slice < Slices; slice++)
        {
            double top = 50 * (1 - Math.Cos(Math.PI * slice / Slices)), bottom = 50 * (1 - Math.Cos(Math.PI * (slice + 1) / Slices));
            // Two films a slice.
            Assert.Equal((Segment(50, bottom) - Segment(50, top)) / 100, excess[2 * slice] + excess[2 * slice + 1], 1e-8);
        }
    }

    [Fact]
    public void Solid_platelets_that_fill_their_spacing_are_a_film()
    {
        Section platelets = Structures.Section("[[layer]]\nform = \"platelet\"\nthickness = 80\nwidth = 300\nspacing = 300\nrows = 2\npitch = 150\n");
        Section films = Structures.Section("[[layer]]\nform = \"film\"\nthickness = 80\nrows = 2\npitch = 150\n");
        foreach (IMixingRule rule in MixingRules.All)
        {
            FilmStack one = Build(platelets, 1, rule), other = Build(films, 1, rule);
            Assert.Equal(other.ThicknessesNm.ToArray(), one.ThicknessesNm.ToArray());
            for (int film = 0; film < one.FilmCount; film++)
            {
                DiagonalPermittivity a = one.Media.Get(one.MediumOfFilm[film], 0), b = other.Media.Get(other.MediumOfFilm[film], 0);
                Assert.InRange(Complex.Abs(a.X - b.X) + Complex.Abs(a.Y - b.Y) + Complex.Abs(a.Z - b.Z), 0, 1e-13);
            }
        }
    }

    [Fact]
    public void Rods_along_the_plane_of_incidence_swap_the_two_axes_of_the_surface()
    {
        const string Rods = "[[layer]]\nform = \"rod\"\ndiameter = 100\nspacing = 140\n";
        FilmStack across = Build(Structures.Section(Rods), 2, new FormBirefringence());
        FilmStack along = Build(Structures.Section("barbule.axis = \"along\"\n" + Rods), 2, new FormBirefringence());
        for (int film = 0; film < across.FilmCount; film++)
        {
            DiagonalPermittivity a = across.Media.Get(across.MediumOfFilm[film], 0), b = along.Media.Get(along.MediumOfFilm[film], 0);
            Assert.Equal((a.X, a.Y, a.Z), (b.Y, b.X, b.Z));
            Assert.NotEqual(a.X, a.Y);
        }
    }

    /// <summary>Area of the part of a circle above a depth: r^2 acos(1 - t/r) - (r - t) sqrt(2 r t - t^2)
    /// (Bronshtein and Semendyayev, Handbook of Mathematics, segment of a circle; from memory).</summary>
    private static double Segment(double radius, double depth)
        => radius * radius * Math.Acos(Math.Clamp(1 - depth / radius, -1, 1)) - (radius - depth) * Math.Sqrt(Math.Max(0, 2 * radius * depth - depth * depth));

    /// <summary>Thickness times (e - 1) of each film.</summary>
    private static double[] Excess(Section section, int slices)
    {
        FilmStack films = Build(section, slices, new MeanPermittivity());
        return [.. Enumerable.Range(0, films.FilmCount).Select(film => films.ThicknessesNm[film] * (films.Media.Get(films.MediumOfFilm[film], 0).Y.Real - 1))];
    }

    private static FilmStack Build(Section section, int slices, IMixingRule rule)
    {
        DepthProfile profile = DepthProfile.Of(section);
        int[] counts = new int[profile.KindCount];
        Array.Fill(counts, slices);
        return FilmBuilder.Build(profile, counts, new SectionPermittivities(section, BarbuleOptics.Files.EmbeddedMaterials.Catalog, [500.0]), rule);
    }
}

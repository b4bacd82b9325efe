using System.Globalization;
using System.Text.Json;
using BarbuleOptics.Files.Results;
using BarbuleOptics.Tests.Files;
using BarbuleOptics.Tests.Samples;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>What <c>barbule predict</c> writes.</summary>
public sealed class PredictOutputTests
{
    private const string Header = "wavelength_nm,incidence_deg,polarization,reflectance,transmittance,absorptance,diffracted_reflectance";

    public static TheoryData<string> Samples => SampleFiles.Rows;

    [Fact]
    public async Task Spectra_hold_a_line_for_each_wavelength_angle_and_polarization()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("solid-rods-one-row", folder.Path);
        (await Barbule.Call("predict", file, "--wavelengths", "400:401:0.5", "--angles", "0:60:30", "--out", folder["out"])).Good();

        string[] lines = folder.Text("out/spectra.csv").Split('\n');
        Assert.Equal(Header, lines[0]);
        Assert.Equal("", lines[^1]);
        Assert.DoesNotContain("\r", folder.Text("out/spectra.csv"), StringComparison.Ordinal);
        string[] beams = [.. lines[1..^1].Select(line => string.Join(',', line.Split(',')[..3]))];
        string[] expected = [.. from angle in (string[])["0", "30", "60"] from beam in (string[])["s", "p", "unpolarized"] from nm in (string[])["400", "400.5", "401"] select $"{nm},{angle},{beam}"];
        Assert.Equal(expected, beams);
    }

    // Unpolarized is the mean of s and p.
    [Theory]
    [MemberData(nameof(Samples))]
    public async Task Power_closes_on_every_line_of_every_sample(string name)
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write(name, folder.Path);
        (await Barbule.Call("predict", file, "--wavelengths", "300:780:60", "--angles", "0,30,60,85", "--accuracy", "1e-3", "--out", folder["out"])).Good();

        double[][] values = [.. folder.Text("out/spectra.csv").Split('\n')[1..^1].Select(line => line.Split(',')[3..].Select(text => double.Parse(text, CultureInfo.InvariantCulture)).ToArray())];
        Assert.Equal(4 * 3 * 9, values.Length);
        Assert.All(values, parts =>
        {
            Assert.All(parts, part => Assert.InRange(part, 0, 1));
            Assert.Equal(1, parts.Sum(), 1e-10);
        });
        for (int i = 0; i < 9; i++)
            Assert.Equal((values[27 + i][0] + values[36 + i][0]) / 2, values[45 + i][0], 1e-15);
    }

    // Orders and materials: two more tables, of which each adds up to what spectra.csv holds.
    [Fact]
    public async Task Orders_and_materials_add_up_to_the_spectra()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("two-sizes-along", folder.Path);
        (await Barbule.Call("predict", file, "--wavelengths", "300:420:20", "--angles", "0,40", "--accuracy", "1e-3", "--set", "barbule.axis=20", "--out", folder["out"])).Good();

        Dictionary<string, double[]> spectra = Rows(folder.Text("out/spectra.csv"), 3).ToDictionary(row => row.Key, row => row.Values);
        string[] orders = folder.Text("out/orders.csv").Split('\n'), losses = folder.Text("out/absorption.csv").Split('\n');
        Assert.Equal("wavelength_nm,incidence_deg,polarization,side,order,period_nm,efficiency", orders[0]);
        Assert.Equal("wavelength_nm,incidence_deg,polarization,material,absorptance", losses[0]);
        Assert.All(orders[1..^1], line => Assert.Matches("^[0-9]+,(0|40),(s|p|unpolarized),(reflected|transmitted),-?[0-9],280,[0-9.E-]+$", line));
        Assert.All(losses[1..^1], line => Assert.Matches("^[0-9]+,(0|40),(s|p|unpolarized),eumelanin,[0-9.E-]+$", line));
        Assert.Contains(orders, line => line.Contains(",reflected,-1,", StringComparison.Ordinal));
        foreach ((string beam, double[] parts) in spectra)
        {
            double Sum(string[] lines, Func<string[], bool> which) => lines[1..^1].Where(line => line.StartsWith(beam + ",", StringComparison.Ordinal))
                .Select(line => line.Split(',')).Where(which).Sum(cells => double.Parse(cells[^1], CultureInfo.InvariantCulture));
            Assert.Equal(parts[0], Sum(orders, cells => cells[3] == "reflected" && cells[4] == "0"), 1e-12);
            Assert.Equal(parts[3], Sum(orders, cells => cells[3] == "reflected" && cells[4] != "0"), 1e-12);
            Assert.Equal(parts[1], Sum(orders, cells => cells[3] == "transmitted"), 1e-12);
            Assert.Equal(parts[2], Sum(losses, _ => true), 1e-12);
        }
    }

    [Fact]
    public async Task A_layer_model_in_place_of_a_rigorous_result_leaves_no_table_of_orders_behind()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("solid-rods-one-row", folder.Path);
        string[] run = ["predict", file, "--wavelengths", "400:700:20", "--out", folder["out"]];
        (await Barbule.Call(run)).Good();
        Assert.Contains("out/orders.csv", folder.Content());
        Assert.Contains("--force", (await Barbule.Call([.. run, "--mixing", "bruggeman"])).Refusal(5), StringComparison.Ordinal);
        (await Barbule.Call([.. run, "--mixing", "bruggeman", "--force"])).Good();
        Assert.DoesNotContain(folder.Content(), path => path is "out/orders.csv" or "out/absorption.csv");
    }

    // The table says which solver ran and how far the other is from it.
    [Theory]
    [InlineData("", "grating solver, rigorous for this section, unpolarized", "The layer model (bruggeman-2) would be off from this by ")]
    [InlineData("--solver grating", "grating solver, rigorous for this section", "The layer model (bruggeman-2) would be off from this by ")]
    [InlineData("--mixing mean-index", "multilayer solver, mean-index mixing, ", "This layer model is off from the rigorous solution of the section by ")]
    [InlineData("--solver multilayer --mixing mean-index", "multilayer solver, mean-index mixing, ", "This layer model is off from the rigorous solution of the section by ")]
    [InlineData("--solver multilayer", "multilayer solver, bruggeman-2 mixing, ", null)]
    [InlineData("--set barbule.axis=35", "grating solver, rigorous for this section", null)]
    public async Task The_table_names_the_solver_and_the_distance_to_the_other(string options, string solver, string? compared)
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("solid-rods-one-row", folder.Path);
        string[] words = options.Split(' ', StringSplitOptions.RemoveEmptyEntries);
        string text = string.Join(' ', (await Barbule.Call(["predict", file, "--wavelengths", "360:780:10", "--angles", "0,30", .. words])).Good().Output
            .Split(['\n', ' '], StringSplitOptions.RemoveEmptyEntries));
        Assert.Contains(solver, text, StringComparison.Ordinal);
        Assert.Equal(compared is null, !text.Contains("off from", StringComparison.Ordinal));
        if (compared is not null)
            Assert.Matches(System.Text.RegularExpressions.Regex.Escape(compared) + @"[+-]?\d+\.\d and [+-]?\d+\.\d nm in the main peak, 0\.\d{3} and 0\.\d{3} in R at most, CIEDE2000 \d+\.\d and \d+\.\d, at 0 and 30 degrees\.", text);
    }

    // Two wavelengths have no peak inside.
    [Theory]
    [InlineData("0", "be off from this by 0.")]
    [InlineData("0:70:10", "be off from this by up to 0.")]
    public async Task Without_a_peak_the_table_speaks_of_none(string angles, string compared)
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("solid-rods-one-row", folder.Path);
        string text = string.Join(' ', (await Barbule.Call("predict", file, "--wavelengths", "500:510:10", "--angles", angles)).Good().Output
            .Split(['\n', ' '], StringSplitOptions.RemoveEmptyEntries));
        Assert.Contains(compared, text, StringComparison.Ordinal);
        Assert.DoesNotContain("nm in the main peak", text, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_rule_that_is_named_is_compared_with_the_rigorous_solution()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("hollow-rods", folder.Path);
        JsonElement root = (await Barbule.Call("predict", file, "--mixing", "form-birefringence", "--wavelengths", "360:780:5", "--json")).Json();
        Assert.Equal(("multilayer", "form-birefringence"), (Text(root, "solver"), Text(root, "mixing")));
        JsonElement compared = root.GetProperty("views")[0].GetProperty("layer_model_error");
        AssertKeys(compared, "mixing", "peak_shift_nm", "largest_change", "largest_change_at_nm", "ciede2000");
        Assert.Equal("form-birefringence", Text(compared, "mixing"));
        Assert.InRange(Number(compared, "largest_change"), 0.01, 1);
    }

    [Fact]
    public async Task Polarization_narrows_spectra_and_views()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("solid-rods-one-row", folder.Path);
        (await Barbule.Call("predict", file, "--angles", "40", "--polarization", "s", "--out", folder["s"])).Good();
        (await Barbule.Call("predict", file, "--angles", "40", "--out", folder["all"])).Good();

        string[] s = folder.Text("s/spectra.csv").Split('\n'), all = folder.Text("all/spectra.csv").Split('\n');
        Assert.Equal(all.Where(line => line == Header || line.Contains(",s,", StringComparison.Ordinal)), s[..^1]);
        JsonElement view = Assert.Single(JsonDocument.Parse(folder.Text("s/prediction.json")).RootElement.GetProperty("views").EnumerateArray());
        Assert.Equal("s", view.GetProperty("polarization").GetString());
    }

    [Fact]
    public async Task The_document_holds_every_key_of_its_description()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("porous-platelets", folder.Path);
        JsonElement root = (await Barbule.Call("predict", file, "--angles", "0,30", "--wavelengths", "300:780:20", "--json", "--observer", "1964-10deg", "--illuminant", "A", "--accuracy", "1e-3")).Json();

        AssertKeys(root, "program", "structure", "solver", "picture", "mixing", "core_mixing", "films", "accuracy_asked", "error_estimate", "reference", "instrument", "scope", "materials", "bird_vision", "wavelengths_nm", "summation_nm", "views", "main_peak_over_angle", "corrections", "unknowns", "draws", "warnings");
        Assert.Equal(("Barbule Optics", ProgramIdentity.Version), (Text(root, "program", "name"), Text(root, "program", "version")));
        Assert.Equal(file, Text(root, "structure", "file"));
        Assert.Equal(Convert.ToHexStringLower(System.Security.Cryptography.SHA256.HashData(File.ReadAllBytes(file))), Text(root, "structure", "sha256"));
        Assert.Equal(("grating", "bruggeman-3d", "mirror"), (Text(root, "solver"), Text(root, "core_mixing"), Text(root, "reference")));
        Assert.Equal((JsonValueKind.Null, JsonValueKind.Null), (root.GetProperty("mixing").ValueKind, root.GetProperty("films").ValueKind));
        JsonElement structure = root.GetProperty("structure");
        AssertKeys(structure, "name", "file", "sha256", "set", "solved_as_nm", "solved_rows", "depth_nm");
        // The mean of the sample's four replicates, (84 + 88 + 91 + 85) / 4.
        Assert.Equal(87, Number(structure, "solved_as_nm", "cortex.thickness"));
        Assert.Equal(1e-3, Number(root, "accuracy_asked"));
        Assert.InRange(Number(root, "error_estimate"), 1e-13, 1e-3);
        Assert.Equal((300, 780, 20), (Number(root, "wavelengths_nm", "start"), Number(root, "wavelengths_nm", "stop"), Number(root, "wavelengths_nm", "step")));
        Assert.All(root.GetProperty("materials").EnumerateArray(), material =>
        {
            AssertKeys(material, "name", "source", "obtained", "note", "range_nm");
            Assert.Equal(2, material.GetProperty("range_nm").GetArrayLength());
        });
        JsonElement vision = root.GetProperty("bird_vision");
        AssertKeys(vision, "illuminant", "illuminant_note", "background", "adaptation", "space", "contrast", "eyes");
        Assert.All(vision.GetProperty("eyes").EnumerateArray(), eye =>
        {
            AssertKeys(eye, "name", "source", "obtained", "cones", "media_half_nm", "media_width_nm");
            Assert.Equal(["shortest", "short", "medium", "long", "double"], eye.GetProperty("cones").EnumerateArray().Select(cone => Text(cone, "cone")));
            Assert.All(eye.GetProperty("cones").EnumerateArray(), cone => AssertKeys(cone, "cone", "pigment_nm", "droplet_cut_nm", "droplet_mid_nm", "peak_nm", "number", "weber_fraction"));
        });
        Assert.Equal(["air", "keratin", "eumelanin"], root.GetProperty("materials").EnumerateArray().Select(material => Text(material, "name")));
        Assert.All(root.GetProperty("warnings").EnumerateArray(), warning =>
        {
            AssertKeys(warning, "code", "message", "incidence_deg");
            Assert.Contains(warning.GetProperty("incidence_deg").ValueKind, (JsonValueKind[])[JsonValueKind.Null, JsonValueKind.Number]);
        });
        JsonElement[] views = [.. root.GetProperty("views").EnumerateArray()];
        Assert.Equal([0, 30], views.Select(view => Number(view, "incidence_deg")));
        Assert.All(views, AssertView);
    }

    // 251.9 nm opens orders in the matrix at 380 nm and none at 800 nm.
    [Fact]
    public async Task Spacings_that_were_moved_stand_beside_those_measured()
    {
        using var folder = new TemporaryFolder();
        const string layer = "[[layer]]\nform = 'rod'\ndiameter = 100\nspacing = ";
        string file = folder["two.toml"];
        await File.WriteAllTextAsync(file, $"format = 1\nbarbule.backing = 'keratin'\n{layer}240.3\ngap = 10\n{layer}251.9\n", TestContext.Current.CancellationToken);
        JsonElement near = (await Barbule.Call("predict", file, "--wavelengths", "380:390:10", "--json", "--accuracy", "1e-2")).Json();
        JsonElement[] rows = [.. near.GetProperty("structure").GetProperty("solved_rows").EnumerateArray()];
        Assert.Equal([240.3, 251.9], rows.Select(row => Number(row, "spacing_nm")));
        Assert.All(rows, row => Assert.Equal(Math.Sqrt(240.3 * 251.9), Number(row, "moved_spacing_nm"), 1e-9));
        Assert.All(rows, row => Assert.Equal(390, Number(row, "moved_up_to_nm")));
        JsonElement far = (await Barbule.Call("predict", file, "--wavelengths", "800:810:10", "--json", "--accuracy", "1e-2")).Json();
        Assert.All(far.GetProperty("structure").GetProperty("solved_rows").EnumerateArray(), row => AssertKeys(row, "layer", "rows", "spacing_nm", "pitch_nm"));
    }

    [Fact]
    public async Task What_does_not_exist_is_null()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("cortex-over-sheet", folder.Path);
        JsonElement root = (await Barbule.Call("predict", file, "--wavelengths", "500:600:1", "--json")).Json();

        Assert.Equal(JsonValueKind.Null, root.GetProperty("mixing").ValueKind);
        Assert.Equal(JsonValueKind.Null, root.GetProperty("core_mixing").ValueKind);
        JsonElement view = root.GetProperty("views")[0];
        Assert.Equal(JsonValueKind.Null, view.GetProperty("cie").ValueKind);
        Assert.Equal(JsonValueKind.Null, view.GetProperty("bird").ValueKind);
        Assert.Equal(JsonValueKind.Null, view.GetProperty("hue").GetProperty("term").ValueKind);
        Assert.Equal(JsonValueKind.Null, view.GetProperty("hue").GetProperty("bird").ValueKind);
        Assert.Equal(JsonValueKind.Null, view.GetProperty("layer_model_error").ValueKind);
        Assert.Equal(JsonValueKind.Null, view.GetProperty("powers").GetProperty("absorbed_by").ValueKind);
        Assert.Equal(JsonValueKind.Null, view.GetProperty("powers").GetProperty("orders").ValueKind);
    }

    [Fact]
    public async Task A_value_set_on_the_command_line_is_as_good_as_one_in_the_file()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("hollow-rods", folder.Path);
        string wet = folder["wet.toml"];
        await File.WriteAllTextAsync(wet, SampleFiles.Text("hollow-rods").Replace("[cortex]", "[barbule]\nsurround = \"water\"\n[cortex]", StringComparison.Ordinal), TestContext.Current.CancellationToken);
        (await Barbule.Call("predict", file, "--set", "barbule.surround=water", "--out", folder["set"])).Good();
        (await Barbule.Call("predict", wet, "--out", folder["wet"])).Good();
        (await Barbule.Call("predict", file, "--out", folder["dry"])).Good();

        Assert.Equal(folder.Text("wet/spectra.csv"), folder.Text("set/spectra.csv"));
        Assert.NotEqual(folder.Text("dry/spectra.csv"), folder.Text("set/spectra.csv"));
        JsonElement changes = JsonDocument.Parse(folder.Text("set/prediction.json")).RootElement.GetProperty("structure").GetProperty("set");
        Assert.Equal("barbule.surround=water", Assert.Single(changes.EnumerateArray()).GetString());
    }

    [Fact]
    public async Task A_folder_of_materials_adds_names_and_wins_over_those_inside()
    {
        using var folder = new TemporaryFolder();
        string file = SampleFiles.Write("cortex-over-sheet", folder.Path), tables = Directory.CreateDirectory(folder["tables"]).FullName;
        const string Table = "format = 1\nname = \"{0}\"\nunit = \"nm\"\nrange_nm = [300, 900]\nsource = \"invented\"\nobtained = \"invented\"\n[n]\nkind = \"constant\"\nvalue = 1.9\n[k]\nkind = \"constant\"\nvalue = 0.0\n";
        await File.WriteAllTextAsync(Path.Combine(tables, "keratin.toml"), Table.Replace("{0}", "keratin", StringComparison.Ordinal), TestContext.Current.CancellationToken);
        await File.WriteAllTextAsync(Path.Combine(tables, "glass.toml"), Table.Replace("{0}", "glass", StringComparison.Ordinal), TestContext.Current.CancellationToken);
        (await Barbule.Call("predict", file, "--materials", tables, "--out", folder["own"])).Good();
        (await Barbule.Call("predict", file, "--materials", tables, "--set", "barbule.matrix=glass", "--out", folder["named"])).Good();
        (await Barbule.Call("predict", file, "--set", "barbule.matrix={ n = 1.9 }", "--out", folder["inline"])).Good();

        Assert.Equal(folder.Text("inline/spectra.csv"), folder.Text("own/spectra.csv"));
        Assert.Equal(folder.Text("inline/spectra.csv"), folder.Text("named/spectra.csv"));
        Assert.Contains("invented", (await Barbule.Call("materials", "keratin", "--materials", tables)).Good().Output, StringComparison.Ordinal);
    }

    private static void AssertView(JsonElement view)
    {
        AssertKeys(view, "incidence_deg", "polarization", "spectrum", "cie", "hue", "bird", "signal", "layer_model_error", "powers");
        JsonElement compared = view.GetProperty("layer_model_error"), powers = view.GetProperty("powers");
        AssertKeys(compared, "mixing", "peak_shift_nm", "largest_change", "largest_change_at_nm", "ciede2000");
        Assert.Equal("bruggeman-2", Text(compared, "mixing"));
        Assert.InRange(Number(compared, "largest_change"), 1e-4, 1);
        Assert.InRange(Number(compared, "largest_change_at_nm"), 300, 780);
        Assert.InRange(Number(compared, "ciede2000"), 0.01, 100);
        AssertKeys(powers, "mean_reflectance", "mean_diffracted_reflectance", "mean_transmittance", "mean_absorptance", "absorbed_by", "orders");
        Assert.Equal(Number(view, "spectrum", "mean_reflectance"), Number(powers, "mean_reflectance"), 1e-12);
        Assert.Equal(1, ((string[])["reflectance", "diffracted_reflectance", "transmittance", "absorptance"]).Sum(part => Number(powers, "mean_" + part)), 1e-10);
        Assert.Equal(Number(powers, "mean_absorptance"), powers.GetProperty("absorbed_by").EnumerateArray().Sum(loss => Number(loss, "mean_absorptance")), 1e-10);
        Assert.All(powers.GetProperty("absorbed_by").EnumerateArray(), loss => AssertKeys(loss, "material", "mean_absorptance"));
        Assert.NotEqual(0, powers.GetProperty("orders").GetArrayLength());
        Assert.All(powers.GetProperty("orders").EnumerateArray(), order =>
        {
            AssertKeys(order, "side", "order", "period_nm", "longest_nm", "largest_efficiency", "largest_at_nm");
            Assert.InRange(Number(order, "largest_at_nm"), 300, Number(order, "longest_nm"));
        });
        Assert.Equal("unpolarized", Text(view, "polarization"));
        JsonElement spectrum = view.GetProperty("spectrum"), cie = view.GetProperty("cie");
        AssertKeys(spectrum, "peaks", "at_edge", "mean_reflectance", "contrast", "ultraviolet_share");
        Assert.Contains(spectrum.GetProperty("at_edge").ValueKind, (JsonValueKind[])[JsonValueKind.True, JsonValueKind.False]);
        Assert.NotEqual(0, spectrum.GetProperty("peaks").GetArrayLength());
        Assert.All(spectrum.GetProperty("peaks").EnumerateArray(), peak =>
        {
            AssertKeys(peak, "wavelength_nm", "reflectance", "prominence", "half_height_width_nm", "half_prominence_width_nm");
            Assert.InRange(Number(peak, "wavelength_nm"), 300, 780);
            Assert.InRange(Number(peak, "prominence"), 0, Number(peak, "reflectance"));
        });
        AssertKeys(cie, "observer", "illuminant", "XYZ", "xy", "u_v_prime", "Lab", "LCh", "Luv", "saturation_uv", "dominant_wavelength_nm", "excitation_purity", "sRGB_adaptation", "sRGB", "sRGB_brightened", "in_sRGB_gamut");
        Assert.Equal(("1964-10deg", "A"), (Text(cie, "observer"), Text(cie, "illuminant")));
        double[] xyz = Numbers(cie, "XYZ"), xy = Numbers(cie, "xy"), lab = Numbers(cie, "Lab"), lch = Numbers(cie, "LCh");
        // Definitions of x, y, C* and h (CIE 015:2018, sections 7.3 and 8.2.1; numbers of the sections from memory).
        Assert.Equal([xyz[0] / xyz.Sum(), xyz[1] / xyz.Sum()], xy, (a, b) => Math.Abs(a - b) < 1e-12);
        Assert.Equal([lab[0], Math.Sqrt(lab[1] * lab[1] + lab[2] * lab[2]), (Math.Atan2(lab[2], lab[1]) * 180 / Math.PI + 360) % 360], lch, (a, b) => Math.Abs(a - b) < 1e-9);
        Assert.Matches("^#[0-9a-f]{6}$", Text(cie, "sRGB"));
        Assert.Matches("^#[0-9a-f]{6}$", Text(cie, "sRGB_brightened"));
        AssertBird(view);
    }

    private static void AssertBird(JsonElement view)
    {
        JsonElement hue = view.GetProperty("hue"), bird = view.GetProperty("bird");
        AssertKeys(hue, "term", "peak_wavelength_nm", "ultraviolet_peak", "ultraviolet_peak_nm", "ultraviolet_peak_prominence", "bird");
        Assert.NotEqual("", Text(hue, "term"));
        Assert.Equal(hue.GetProperty("ultraviolet_peak").GetBoolean(), hue.GetProperty("ultraviolet_peak_nm").ValueKind == JsonValueKind.Number);
        AssertKeys(bird, "average-ultraviolet", "average-violet");
        AssertKeys(hue.GetProperty("bird"), "average-ultraviolet", "average-violet");
        foreach (JsonProperty eye in bird.EnumerateObject())
        {
            AssertKeys(eye.Value, "catches", "double_catch", "relative_catches", "xyz", "azimuth_deg", "elevation_deg", "chroma", "chroma_share", "chromatic_contrast", "achromatic_contrast", "dark");
            AssertKeys(eye.Value.GetProperty("catches"), "shortest", "short", "medium", "long");
            Assert.Equal(1, eye.Value.GetProperty("relative_catches").EnumerateObject().Sum(cone => cone.Value.GetDouble()), 1e-12);
            double[] xyz = Numbers(eye.Value, "xyz");
            Assert.Equal(Number(eye.Value, "chroma"), Math.Sqrt(xyz.Sum(value => value * value)), 1e-12);
            JsonElement said = hue.GetProperty("bird").GetProperty(eye.Name);
            AssertKeys(said, "term", "shortest_relative_catch", "nonspectral");
            Assert.Equal(Number(eye.Value, "relative_catches", "shortest"), Number(said, "shortest_relative_catch"));
        }
    }

    /// <summary>Lines by their first cells, with the numbers of the others.</summary>
    private static IEnumerable<(string Key, double[] Values)> Rows(string csv, int keys)
        => csv.Split('\n')[1..^1].Select(line => line.Split(',')).Select(cells => (
            string.Join(',', cells[..keys]), cells[keys..].Select(cell => double.Parse(cell, CultureInfo.InvariantCulture)).ToArray()));

    private static void AssertKeys(JsonElement element, params string[] keys) => Assert.Equal(keys, element.EnumerateObject().Select(property => property.Name));

    private static JsonElement At(JsonElement element, string[] path) => path.Aggregate(element, (inner, key) => inner.GetProperty(key));

    private static string Text(JsonElement element, params string[] path) => At(element, path).GetString()!;

    private static double Number(JsonElement element, params string[] path) => At(element, path).GetDouble();

    private static double[] Numbers(JsonElement element, string key) => [.. element.GetProperty(key).EnumerateArray().Select(item => item.GetDouble())];
}

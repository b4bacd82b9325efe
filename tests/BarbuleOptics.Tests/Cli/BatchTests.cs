using System.Diagnostics;
using BarbuleOptics.Tests.Files;
using Parquet;
using Parquet.Schema;
using Xunit;

namespace BarbuleOptics.Tests.Cli;

/// <summary>Tables of specimens through the command: results, rows that fail, interruption and resumption.</summary>
public sealed class BatchTests
{
    private static readonly string[] Quick = ["--wavelengths", "300:780:20", "--solver", "multilayer"];

    [Fact]
    public async Task Results_hold_one_line_a_specimen_and_angle_and_are_the_same_for_any_threads()
    {
        using var folder = new TemporaryFolder();
        string table = Written(folder, 5);
        string[] asked = ["batch", table, .. Quick, "--angles", "0,40", "--draws", "20", "--out"];
        string printed = (await Barbule.Call([.. asked, folder["one"], "--threads", "2"])).Good().Output;
        Assert.Contains("5 of 5 specimens were predicted.", printed, StringComparison.Ordinal);
        (await Barbule.Call([.. asked, folder["two"], "--threads", "1"])).Good();
        Assert.Equal(Bytes(folder["one"]), Bytes(folder["two"]));
        string[] lines = File.ReadAllLines(folder["one/predictions.csv"]);
        Assert.Equal(1 + 5 * 2, lines.Length);
        Assert.All(lines, line => Assert.Equal(lines[0].Split(',').Length, line.Split(',').Length));
        Assert.Equal(["specimen,row,column,key,problem"], File.ReadAllLines(folder["one/failed.csv"]));
        Assert.False(Directory.Exists(folder["one/unfinished"]));
    }

    [Fact]
    public async Task A_specimen_of_a_table_is_what_its_structure_file_predicts()
    {
        using var folder = new TemporaryFolder();
        File.WriteAllText(folder["a.toml"], "format = 1\nname = \"a\"\n[cortex]\nthickness = 250\n[[layer]]\nform = \"film\"\nthickness = 120\n");
        File.WriteAllText(folder["t.csv"], "specimen,cortex_nm,layer1.form,layer1.thickness_nm\na,250,film,120\n");
        System.Text.Json.JsonElement view = (await Barbule.Call("predict", folder["a.toml"], "--json")).Json().GetProperty("views")[0];
        (await Barbule.Call("batch", folder["t.csv"], "--out", folder["out"])).Good();
        string[] lines = File.ReadAllLines(folder["out/predictions.csv"]), names = lines[0].Split(','), cells = lines[1].Split(',');
        Assert.Equal(view.GetProperty("cie").GetProperty("LCh")[2].GetRawText(), cells[Array.IndexOf(names, "h_deg")]);
        Assert.Equal(view.GetProperty("hue").GetProperty("term").GetString(), cells[Array.IndexOf(names, "hue_term")]);
        Assert.Equal(view.GetProperty("spectrum").GetProperty("peaks")[0].GetProperty("wavelength_nm").GetRawText(), cells[Array.IndexOf(names, "peak_nm")]);
    }

    // Read by a library that knows nothing of us (Parquet.Net), against the text that predict writes of the same structure, which keeps every digit.
    [Fact]
    public async Task Spectra_in_Parquet_are_those_that_predict_writes()
    {
        using var folder = new TemporaryFolder();
        File.WriteAllText(folder["a.toml"], "format = 1\nname = \"a\"\n[cortex]\nthickness = 250\n[[layer]]\nform = \"film\"\nthickness = 120\n");
        File.WriteAllText(folder["t.csv"], "specimen,cortex_nm,layer1.form,layer1.thickness_nm\nPlume \u00e9,250,film,120\nb,300,film,90\n");
        (await Barbule.Call(["predict", folder["a.toml"], .. Quick, "--angles", "0,40", "--out", folder["one"]])).Good();
        (await Barbule.Call(["batch", folder["t.csv"], .. Quick, "--angles", "0,40", "--out", folder["out"]])).Good();
        string[] lines = File.ReadAllLines(folder["one/spectra.csv"]);

        await using ParquetReader reader = await ParquetReader.CreateAsync(folder["out/spectra.parquet"], cancellationToken: TestContext.Current.CancellationToken);
        Assert.Equal(2, reader.RowGroupCount);
        using ParquetRowGroupReader group = reader.OpenRowGroupReader(0);
        Assert.Equal(lines.Length - 1, group.RowCount);
        DataField[] fields = reader.Schema.GetDataFields();
        Assert.Equal(lines[0].Split(',').Append("specimen").Order(), fields.Select(field => field.Name).Order());
        foreach (DataField field in fields)
        {
            string[] found = await Values(group, field), expected = [.. lines[1..].Select(line => field.Name == "specimen" ? "Plume \u00e9" : line.Split(',')[Array.IndexOf(lines[0].Split(','), field.Name)])];
            Assert.Equal(expected, found);
        }
    }

    private static async Task<string[]> Values(ParquetRowGroupReader group, DataField field)
    {
        if (field.ClrType != typeof(double))
        {
            var texts = new string?[group.RowCount];
            await group.ReadAsync(field, texts.AsMemory(), cancellationToken: TestContext.Current.CancellationToken);
            return [.. texts.Select(text => text ?? "")];
        }
        var numbers = new double[group.RowCount];
        await group.ReadAsync(field, numbers.AsMemory(), cancellationToken: TestContext.Current.CancellationToken);
        return [.. numbers.Select(number => number.ToString(System.Globalization.CultureInfo.InvariantCulture))];
    }

    [Fact]
    public async Task A_bad_row_never_stops_the_rest()
    {
        using var folder = new TemporaryFolder();
        string table = Written(folder, 3);
        File.AppendAllText(table, "wrong cell,rod,abc,120,150,1,\noverlap,rod,100,120,130,3,50\nlast,rod,100,120,150,1,\n");
        Outcome outcome = await Barbule.Call(["batch", table, .. Quick, "--out", folder["out"]]);
        Assert.Equal(4, outcome.ExitCode);
        Assert.Equal(2, outcome.ErrorLines.Length);
        Assert.StartsWith(table + ":5:3: cortex.thickness: found \"abc\"", outcome.ErrorLines[0], StringComparison.Ordinal);
        string[] failed = File.ReadAllLines(folder["out/failed.csv"]);
        Assert.Equal(3, failed.Length);
        Assert.StartsWith("wrong cell,5,3,cortex.thickness,", failed[1], StringComparison.Ordinal);
        Assert.StartsWith("overlap,6,", failed[2], StringComparison.Ordinal);
        Assert.StartsWith("last,", File.ReadAllLines(folder["out/predictions.csv"])[^1], StringComparison.Ordinal);
        // Asked again, nothing is left to do, and the answer is the same.
        Assert.Equal(4, (await Barbule.Call(["batch", table, .. Quick, "--out", folder["out"], "--resume"])).ExitCode);
    }

    [Fact]
    public async Task What_is_there_is_kept_unless_force_is_given()
    {
        using var folder = new TemporaryFolder();
        string table = Written(folder, 1);
        (await Barbule.Call(["batch", table, .. Quick, "--out", folder["out"], "--resume"])).Good();
        Assert.Contains("--force replaces it", (await Barbule.Call(["batch", table, .. Quick, "--out", folder["out"]])).Refusal(5), StringComparison.Ordinal);
        Assert.Contains("--force replaces it", (await Barbule.Call(["batch", table, .. Quick, "--angles", "10", "--out", folder["out"], "--resume"])).Refusal(5), StringComparison.Ordinal);
        (await Barbule.Call(["batch", table, .. Quick, "--out", folder["out"], "--force"])).Good();
        Directory.CreateDirectory(folder["new/unfinished"]);
        Assert.Contains("--resume continues it", (await Barbule.Call(["batch", table, .. Quick, "--out", folder["new"]])).Refusal(5), StringComparison.Ordinal);
        Assert.Contains("there is no such file", (await Barbule.Call("batch", folder["nothing.csv"], "--out", folder["out"])).Refusal(3), StringComparison.Ordinal);
    }

    [Fact]
    public async Task An_interrupt_keeps_what_is_done()
    {
        using var folder = new TemporaryFolder();
        string table = Written(folder, 4);
        using var interrupt = new CancellationTokenSource();
        await interrupt.CancelAsync();
        Outcome outcome = await Barbule.Call(interrupt.Token, ["batch", table, .. Quick, "--out", folder["out"]]);
        Assert.Equal(130, outcome.ExitCode);
        Assert.Contains("0 of 4 specimens are done", outcome.Error, StringComparison.Ordinal);
        (await Barbule.Call(["batch", table, .. Quick, "--out", folder["out"], "--resume"])).Good();
        (await Barbule.Call(["batch", table, .. Quick, "--out", folder["whole"]])).Good();
        Assert.Equal(Bytes(folder["whole"]), Bytes(folder["out"]));
    }

    [Fact]
    public async Task Killed_at_random_moments_it_resumes_to_the_same_bytes()
    {
        using var folder = new TemporaryFolder();
        string table = Written(folder, 60);
        string[] asked = ["batch", table, .. Quick, "--threads", "2", "--out"];
        (await Barbule.Call([.. asked, folder["whole"]])).Good();
        var random = new Random(7);
        int killed = 0, kept = 0;
        for (int i = 0; i < 3; i++)
        {
            using Process process = Barbule.Start([.. asked, folder["out"], "--resume"]);
            // From the first part on, so that each kill falls into the work and not before it.
            var waited = Stopwatch.StartNew();
            while (!process.HasExited && Parts() <= kept && waited.Elapsed < TimeSpan.FromSeconds(20))
                await Task.Delay(2, TestContext.Current.CancellationToken);
            await Task.Delay(random.Next(40), TestContext.Current.CancellationToken);
            if (!process.HasExited)
            {
                process.Kill();
                killed++;
            }
            await process.WaitForExitAsync(TestContext.Current.CancellationToken);
            kept = Parts();
        }
        Assert.True(killed > 0, "No run was killed within its work.");
        // A part that is damaged is made again.
        if (Directory.Exists(folder["out/unfinished"]) && Directory.GetFiles(folder["out/unfinished"], "*.part").FirstOrDefault() is string part)
            File.WriteAllBytes(part, File.ReadAllBytes(part)[..^40]);
        (await Barbule.Call([.. asked, folder["out"], "--resume"])).Good();
        Assert.Equal(Bytes(folder["whole"]), Bytes(folder["out"]));

        int Parts() => Directory.Exists(folder["out/unfinished"]) ? Directory.GetFiles(folder["out/unfinished"], "*.part").Length : 0;
    }

    /// <summary>Names and bytes of everything in a folder.</summary>
    private static string[] Bytes(string folder)
        => [.. Directory.GetFileSystemEntries(folder).Order(StringComparer.Ordinal).Select(path => $"{Path.GetFileName(path)} {(File.Exists(path) ? Convert.ToHexString(System.Security.Cryptography.SHA256.HashData(File.ReadAllBytes(path))) : "folder")}")];

    private static string Written(TemporaryFolder folder, int specimens)
    {
        string[] rows = [.. Enumerable.Range(0, specimens).Select(i => FormattableString.Invariant($"plume {i},rod,{100 + i},120,{150 + i % 7},2,160,9,8"))];
        File.WriteAllLines(folder["t.csv"], ["specimen,layer1.form,cortex_nm,layer1.diameter_nm,layer1.spacing_nm,layer1.rows,layer1.pitch_nm,cortex_sd,cortex_n", .. rows]);
        return folder["t.csv"];
    }
}

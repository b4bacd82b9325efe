using BarbuleOptics.Files;
using Xunit;

namespace BarbuleOptics.Tests.Files;

/// <summary>Files are written whole or not at all.</summary>
public sealed class OutputFolderTests : IDisposable
{
    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private static void Write(string folder, OutputFile[] files, bool force, CancellationToken? cancellation = null)
        => OutputFolder.Write(folder, files, force, [], cancellation ?? TestContext.Current.CancellationToken);

    [Fact]
    public void Files_are_written_into_a_folder_that_is_made()
    {
        Write(_folder["a/b"], [OutputFile.FromText("one.csv", "x\n"), OutputFile.FromBytes("two.bin", new byte[] { 1, 2 })], force: false);
        Assert.Equal(["a", "a/b", "a/b/one.csv", "a/b/two.bin"], _folder.Content());
        Assert.Equal("x\n"u8.ToArray(), File.ReadAllBytes(_folder["a/b/one.csv"]));
    }

    [Fact]
    public void An_existing_file_is_refused_before_anything_is_written()
    {
        File.WriteAllText(_folder["two.csv"], "old");
        bool wrote = false;
        var fault = Assert.Throws<OutputException>(() => Write(
            _folder.Path, [new OutputFile("one.csv", _ => wrote = true), OutputFile.FromText("two.csv", "new")], force: false));
        Assert.Equal(OutputFault.Exists, fault.Fault);
        Assert.Contains("two.csv", fault.Message);
        Assert.Contains("--force", fault.Message);
        Assert.False(wrote);
        Assert.Equal(["two.csv"], _folder.Content());
        Assert.Equal("old", File.ReadAllText(_folder["two.csv"]));
    }

    [Fact]
    public void Force_replaces_and_leaves_no_trace_of_the_old()
    {
        File.WriteAllText(_folder["two.csv"], "old");
        Write(_folder.Path, [OutputFile.FromText("one.csv", "1"), OutputFile.FromText("two.csv", "new")], force: true);
        Assert.Equal(["one.csv", "two.csv"], _folder.Content());
        Assert.Equal("new", File.ReadAllText(_folder["two.csv"]));
    }

    [Fact]
    public void A_file_that_an_earlier_run_wrote_and_this_one_does_not_is_taken_away_with_force_only()
    {
        File.WriteAllText(_folder["old.csv"], "old");
        OutputFile[] files = [OutputFile.FromText("one.csv", "1")];
        Assert.Contains("old.csv", Assert.Throws<OutputException>(() => OutputFolder.Write(_folder.Path, files, force: false, ["old.csv"], TestContext.Current.CancellationToken)).Message, StringComparison.Ordinal);
        Assert.Equal(["old.csv"], _folder.Content());
        OutputFolder.Write(_folder.Path, files, force: true, ["old.csv", "never.csv"], TestContext.Current.CancellationToken);
        Assert.Equal(["one.csv"], _folder.Content());
    }

    [Fact]
    public void A_fault_in_the_second_file_leaves_the_first_unwritten_and_the_old_ones_whole()
    {
        File.WriteAllText(_folder["one.csv"], "old");
        Assert.Throws<InvalidOperationException>(() => Write(
            _folder.Path, [OutputFile.FromText("one.csv", "new"), new OutputFile("two.csv", _ => throw new InvalidOperationException())], force: true));
        Assert.Equal(["one.csv"], _folder.Content());
        Assert.Equal("old", File.ReadAllText(_folder["one.csv"]));
    }

    [Fact]
    public void A_fault_takes_back_the_folders_that_were_made()
    {
        Assert.Throws<InvalidOperationException>(() => Write(
            _folder["a/b"], [new OutputFile("one.csv", _ => throw new InvalidOperationException())], force: false));
        Assert.Empty(_folder.Content());
    }

    [Fact]
    public void A_fault_among_the_renames_puts_back_what_was_there()
    {
        File.WriteAllText(_folder["one.csv"], "old");
        // A folder takes the second name while the files are being written, too late for the first check.
        var intruder = new OutputFile("two.csv", _ => Directory.CreateDirectory(_folder["two.csv"]));
        var fault = Assert.Throws<OutputException>(() => Write(_folder.Path, [OutputFile.FromText("one.csv", "new"), intruder], force: true));
        Assert.Equal(OutputFault.NotWritable, fault.Fault);
        Assert.Equal(["one.csv", "two.csv"], _folder.Content());
        Assert.Equal("old", File.ReadAllText(_folder["one.csv"]));
    }

    [Fact]
    public void Cancelling_leaves_nothing_behind()
    {
        using var source = new CancellationTokenSource();
        OutputFile[] files = [new OutputFile("one.csv", _ => source.Cancel()), OutputFile.FromText("two.csv", "2")];
        Assert.Throws<OperationCanceledException>(() => Write(_folder["out"], files, force: false, source.Token));
        Assert.Empty(_folder.Content());
    }

    [Fact]
    public void A_folder_that_is_a_file_is_not_writable()
    {
        File.WriteAllText(_folder["file"], "");
        foreach (string folder in (string[])["file", "file/within"])
        {
            var fault = Assert.Throws<OutputException>(() => Write(_folder[folder], [OutputFile.FromText("a", "")], force: true));
            Assert.Equal(OutputFault.NotWritable, fault.Fault);
            Assert.DoesNotContain('\n', fault.Message);
        }
        Assert.Equal(["file"], _folder.Content());
    }

    [Fact]
    public void A_full_disk_is_named_as_such()
    {
        Assert.SkipUnless(File.Exists("/dev/full"), "Only Linux has a device that is always full.");
        var full = new OutputFile("one.csv", _ =>
        {
            using FileStream device = new("/dev/full", FileMode.Open, FileAccess.Write, FileShare.ReadWrite, bufferSize: 0);
            device.WriteByte(1);
        });
        var fault = Assert.Throws<OutputException>(() => Write(_folder["out"], [full], force: false));
        Assert.Equal(OutputFault.DiskFull, fault.Fault);
        Assert.Empty(_folder.Content());
    }

    [Theory]
    [InlineData("")]
    [InlineData("..")]
    [InlineData("a/b")]
    [InlineData("a\\b")]
    public void A_name_with_folders_is_refused(string name) => Assert.Throws<ArgumentException>(() => OutputFile.FromText(name, ""));

    [Fact]
    public void Two_files_of_one_name_are_refused()
        => Assert.Throws<ArgumentException>(() => Write(_folder.Path, [OutputFile.FromText("a", ""), OutputFile.FromText("A", "")], force: true));
}

using System.CommandLine;
using System.Text;
using BarbuleOptics.Files;

namespace BarbuleOptics.Cli;

/// <summary>The command <c>barbule sample</c>: structure files to start from.</summary>
internal static class SampleCommand
{
    private const string ReadmeName = "README.md", First = "hollow-rods.toml", TableName = "specimens.csv";

    public static Command Create()
    {
        var folder = new Argument<string>("DIR") { Description = "Folder to write them into; it is made if it is not there" };
        var force = new Option<bool>("--force") { Description = "Replace files of the same names", Arity = ArgumentArity.Zero };
        var command = new Command("sample", "Write sample structures to start from, each with comments on what it shows") { folder, force };
        folder.Validators.Add(result => CommandLineErrors.RefuseOptions(result, command));
        folder.Validators.Add(result => CommandLineErrors.RefuseEmpty(result, "DIR", result.Tokens, "the name of a folder"));
        command.SetAction((parse, cancellation) =>
        {
            InvocationConfiguration configuration = parse.InvocationConfiguration;
            return Task.FromResult(Execute(parse.GetRequiredValue(folder), parse.GetValue(force), configuration.Output, configuration.Error, cancellation));
        });
        return command;
    }

    private static int Execute(string folder, bool force, TextWriter output, TextWriter error, CancellationToken cancellation)
    {
        SampleStructure[] samples = [.. SampleStructure.All];
        try
        {
            OutputFolder.Write(
                folder, [OutputFile.FromText(ReadmeName, Readme(samples)), OutputFile.FromText(TableName, Embedded.Text("sample-tables/" + TableName)), .. samples.Select(sample => OutputFile.FromText(sample.FileName, sample.Text))], force, [], cancellation);
        }
        catch (OutputException fault)
        {
            error.WriteLine(fault.Message);
            return ExitCode.OutputFailed;
        }
        output.WriteLine($"Written: {OneLine.Escape(Path.Combine(folder, ReadmeName))} and {samples.Length} structures:");
        foreach (SampleStructure sample in samples)
            output.WriteLine($"  {sample.FileName}");
        output.WriteLine($"  {TableName}, a table of 60 specimens");
        output.WriteLine();
        output.WriteLine($"Next:    barbule predict {Quoted(Path.Combine(folder, First))} --angles 0,30,60");
        return ExitCode.Done;
    }

    private static string Readme(SampleStructure[] samples)
    {
        var text = new StringBuilder();
        text.Append($"""
            # Sample structures

            Barbules to start from. They are invented, as are their birds; the comment at the top of each file says what to look at.
            In this folder,

                barbule predict {First} --angles 0,30,60 --out results

            predicts one and writes spectra, color and hue into `results/`. `--set KEY=VALUE` changes a value without touching the file
            (`--set barbule.surround=water` puts the feather under water), `barbule predict --help` lists what else can be asked. For a
            barbule of your own copy the file that is nearest to it and put your measurements in: lengths are in nm.
            `{TableName}` holds 60 specimens, one a row: `barbule batch {TableName} --out results` predicts them all.

            | file | what it is |
            |---|---|
            """);
        foreach (SampleStructure sample in samples)
            text.Append('\n').Append($"| `{sample.FileName}` | {sample.Purpose.Replace("|", "\\|", StringComparison.Ordinal)} |");
        return text.Append('\n').ToString().ReplaceLineEndings("\n");
    }

    /// <summary>A path as it must be typed.</summary>
    private static string Quoted(string path)
        => path.All(letter => char.IsLetterOrDigit(letter) || "/\\.:_-~+,".Contains(letter, StringComparison.Ordinal)) ? path : $"\"{OneLine.Escape(path)}\"";
}

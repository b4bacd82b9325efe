using System.CommandLine;
using System.CommandLine.Help;
using BarbuleOptics.Files.Results;

namespace BarbuleOptics.Cli;

/// <summary>The command and what it can be followed by.</summary>
internal static class BarbuleCommand
{
    /// <summary>File beside the program that holds the licenses of what it is built with.</summary>
    public const string NoticesName = "THIRD-PARTY-NOTICES.txt";

    public static RootCommand Create(TerminalColors colors, ProgressLine progress)
    {
        var root = new RootCommand("From the measured nanostructure of a feather barbule to its reflectance, its color and its hue.");
        // The stock option prints the bare number; results name the program with it.
        root.Options.Remove(root.Options.OfType<VersionOption>().Single());
        var version = new Option<bool>("--version") { Description = "Show the program's name, version and licenses", Arity = ArgumentArity.Zero };
        root.Options.Add(version);

        var help = new CommandHelp();
        Add(PredictCommand.Create(colors, progress), "barbule predict throat.toml --angles 0:60:15 --set barbule.surround=water --out results");
        Add(BatchCommand.Create(progress), "barbule batch specimens.csv --angles 0,30,60 --out results");
        Add(SensitivityCommand.Create(progress), "barbule sensitivity throat.toml --out results");
        Add(MaterialsCommand.Create(), "barbule materials eumelanin");
        Add(SampleCommand.Create(), "barbule sample samples");
        Add(CompletionCommand.Create(), "eval \"$(barbule completion bash)\"");
        help.AddExample(root, $"barbule sample samples{Environment.NewLine}  barbule predict samples/hollow-rods.toml --angles 0,30,60 --out results");
        HelpOption option = root.Options.OfType<HelpOption>().Single();
        option.Action = help;
        // As completions of a path they would get in its way, and `/h` may be a file.
        option.Aliases.Remove("/h");
        option.Aliases.Remove("/?");
        root.SetAction(parse =>
        {
            if (!parse.GetValue(version))
                return help.Invoke(parse);
            parse.InvocationConfiguration.Output.WriteLine($"{ProgramIdentity.Name} {ProgramIdentity.Version}");
            parse.InvocationConfiguration.Output.WriteLine($"MIT license; licenses of the libraries within: {NoticesName}, beside the program");
            return ExitCode.Done;
        });
        return root;

        void Add(Command command, string example)
        {
            root.Subcommands.Add(command);
            help.AddExample(command, example);
        }
    }
}

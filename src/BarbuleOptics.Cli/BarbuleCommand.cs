using System.CommandLine;
using System.CommandLine.Help;
using BarbuleOptics.Files.Results;

namespace BarbuleOptics.Cli;

/// <summary>The command and what it can be followed by.</summary>
internal static class BarbuleCommand
{
    public static RootCommand Create()
    {
        var root = new RootCommand("From the measured nanostructure of a feather barbule to its reflectance, its color and its hue.");
        // The stock option prints the bare number; results name the program with it.
        root.Options.Remove(root.Options.OfType<VersionOption>().Single());
        var version = new Option<bool>("--version") { Description = "Show the program's name and version" };
        root.Options.Add(version);

        Command predict = PredictCommand.Create(), materials = MaterialsCommand.Create();
        root.Subcommands.Add(predict);
        root.Subcommands.Add(materials);

        var help = new CommandHelp();
        help.AddExample(root, "barbule predict throat.toml --angles 0,30,60 --out results");
        help.AddExample(predict, "barbule predict throat.toml --angles 0:60:15 --set barbule.surround=water --out results");
        help.AddExample(materials, "barbule materials eumelanin");
        root.Options.OfType<HelpOption>().Single().Action = help;
        root.SetAction(parse =>
        {
            if (!parse.GetValue(version))
                return help.Invoke(parse);
            parse.InvocationConfiguration.Output.WriteLine($"{ProgramIdentity.Name} {ProgramIdentity.Version}");
            return ExitCode.Done;
        });
        return root;
    }
}

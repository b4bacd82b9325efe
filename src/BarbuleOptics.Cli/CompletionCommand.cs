using System.CommandLine;
using BarbuleOptics.Files;

namespace BarbuleOptics.Cli;

/// <summary>The command <c>barbule completion</c>: a script that lets a shell's Tab key complete the command line.</summary>
/// <remarks>The scripts ask the command itself, <c>barbule "[suggest:POSITION]" "LINE"</c>, and so know every option without a list of their own.</remarks>
internal static class CompletionCommand
{
    private static readonly string[] Shells = ["bash", "zsh", "powershell"];

    public static Command Create()
    {
        var shell = new Argument<string>("SHELL") { Description = $"{string.Join(", ", Shells)}; the script says at its top where it goes", HelpName = "SHELL" };
        shell.CompletionSources.Add(Shells);
        shell.Validators.Add(result =>
        {
            string text = result.Tokens[0].Value;
            if (Shells.Contains(text))
                return;
            string? near = NearMiss.Find(text, Shells);
            result.AddError($"SHELL: found {OneLine.Quote(text)}; allowed {string.Join(", ", Shells)}{(near is null ? "" : $"; did you mean {near}?")}");
        });
        var command = new Command("completion", "Print a script that lets the Tab key complete commands, options and their values") { shell };
        command.SetAction(parse =>
        {
            parse.InvocationConfiguration.Output.Write(Embedded.Text($"completion/{parse.GetRequiredValue(shell)}"));
            return ExitCode.Done;
        });
        return command;
    }
}

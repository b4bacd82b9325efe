using System.CommandLine;
using System.CommandLine.Invocation;
using BarbuleOptics.Files;

namespace BarbuleOptics.Cli;

/// <summary>The command from its arguments to its exit code, whatever it writes to.</summary>
internal static class BarbuleProgram
{
    /// <summary>Runs the command to its end.</summary>
    /// <param name="args">The words after <c>barbule</c>.</param>
    /// <param name="output">Takes results.</param>
    /// <param name="error">Takes what is wrong, one line each.</param>
    /// <param name="colors">What colors results are shown in; null for none.</param>
    /// <param name="progress">Where long calculations say how far they are; null for nowhere.</param>
    /// <param name="cancellation">Interrupts the work, as the terminal does.</param>
    /// <returns>One of <see cref="ExitCode"/>.</returns>
    public static async Task<int> RunAsync(
        string[] args, TextWriter output, TextWriter error, TerminalColors? colors = null, ProgressLine? progress = null,
        CancellationToken cancellation = default)
    {
        try
        {
            RootCommand root = BarbuleCommand.Create(colors ?? TerminalColors.None, progress ?? ProgressLine.None);
            // Without the replacer a file named @results stays a file name.
            ParseResult result = root.Parse(SuggestLine.Prepare(args), new ParserConfiguration { ResponseFileTokenReplacer = null });
            if (result.Errors.Count > 0 && result.Action is ParseErrorAction)
            {
                CommandLineErrors.Write(result, error);
                return ExitCode.WrongCommandLine;
            }
            // Long enough for what is in flight on a busy machine to end, and to be told.
            var configuration = new InvocationConfiguration
            {
                EnableDefaultExceptionHandler = false, Output = output, Error = error, ProcessTerminationTimeout = TimeSpan.FromSeconds(30),
            };
            // A table is interrupted when the specimens in flight are done, however long those take.
            if (result.CommandResult.Command.Name == BatchCommand.Name)
                configuration.ProcessTerminationTimeout = TimeSpan.FromDays(1);
            return await result.InvokeAsync(configuration, cancellation).ConfigureAwait(false);
        }
        catch (OperationCanceledException)
        {
            error.WriteLine("barbule: interrupted");
            return ExitCode.Interrupted;
        }
        catch (IOException fault)
        {
            // Files of the user are read and written where their own messages are; what is left is what the results are printed to.
            error.WriteLine(OneLine.Escape($"barbule: standard output cannot be written: {OutputFolder.Reason(fault)}"));
            return ExitCode.OutputFailed;
        }
#pragma warning disable CA1031 // The last line of defense: whatever is left is a fault of ours, and a user sees one line of it.
        catch (Exception fault)
#pragma warning restore CA1031
        {
            error.WriteLine(OneLine.Escape($"barbule: {Describe(fault)}"));
            return ExitCode.OurFault;
        }
    }

    /// <summary>What to tell the user of a fault of ours.</summary>
    public static string Describe(Exception fault) => fault.GetBaseException() is DllNotFoundException missing
        ? $"a library of the program is missing beside it, keep its folder together: {missing.Message}"
        : $"a fault of the program, not of your input: {fault.GetBaseException().GetType().Name}: {fault.GetBaseException().Message}; please report it with the command line and the input file";
}

using System.CommandLine;
using System.CommandLine.Invocation;
using System.Text;
using BarbuleOptics.Cli;
using BarbuleOptics.Files;

// UTF-8 whatever the terminal's code page, without a byte-order mark in front of redirected output.
Console.OutputEncoding = new UTF8Encoding(encoderShouldEmitUTF8Identifier: false);
try
{
    RootCommand root = BarbuleCommand.Create();
    // Without the replacer a file named @results stays a file name.
    ParseResult result = root.Parse(args, new ParserConfiguration { ResponseFileTokenReplacer = null });
    if (result.Errors.Count > 0 && result.Action is ParseErrorAction)
    {
        CommandLineErrors.Write(result, Console.Error);
        return ExitCode.WrongCommandLine;
    }
    return await result.InvokeAsync(new InvocationConfiguration { EnableDefaultExceptionHandler = false });
}
catch (OperationCanceledException)
{
    Console.Error.WriteLine("barbule: interrupted; nothing was written");
    return ExitCode.Interrupted;
}
#pragma warning disable CA1031 // The last line of defense: whatever is left is a fault of ours, and a user sees one line of it.
catch (Exception fault)
#pragma warning restore CA1031
{
    Console.Error.WriteLine(OneLine.Escape($"barbule: a fault of the program, not of your input: {fault.GetType().Name}: {fault.Message}; please report it with the command line and the input file"));
    return ExitCode.OurFault;
}

using System.Text;
using BarbuleOptics.Cli;

// UTF-8 whatever the terminal's code page, without a byte-order mark in front of redirected output.
Console.OutputEncoding = new UTF8Encoding(encoderShouldEmitUTF8Identifier: false);
return await BarbuleProgram.RunAsync(
    args, Console.Out, Console.Error, TerminalColors.For(Console.IsOutputRedirected, Environment.GetEnvironmentVariable),
    new ProgressLine(Console.IsErrorRedirected ? null : Console.Error, TimeProvider.System));

namespace BarbuleOptics.Cli;

/// <summary>What the command returns to the shell.</summary>
internal static class ExitCode
{
    public const int Done = 0;
    public const int OurFault = 1;
    public const int WrongCommandLine = 2;
    public const int WrongInput = 3;
    public const int SomeFailed = 4;
    public const int OutputFailed = 5;
    public const int Interrupted = 130;
}

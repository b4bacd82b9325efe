namespace BarbuleOptics.Files;

/// <summary>An output cannot be written; the message is one line that names the file or folder. Nothing was left behind.</summary>
public sealed class OutputException : IOException
{
    /// <summary>With the fault and a message of one line.</summary>
    public OutputException(OutputFault fault, string message, Exception? inner = null)
        : base(message, inner)
        => Fault = fault;

    /// <summary>Why.</summary>
    public OutputFault Fault { get; }
}

using System.Text;

namespace BarbuleOptics.Files.Results;

/// <summary>Tables in long form: comma-separated values, UTF-8 without byte-order mark, lines ended by a line feed.</summary>
internal static class LongTable
{
    /// <summary>Begins a table that is written a line at a time, since a long one would not fit into one text; leaves the stream open.</summary>
    public static StreamWriter Begin(Stream stream, string header)
    {
        ArgumentNullException.ThrowIfNull(stream);
        var text = new StreamWriter(stream, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false), bufferSize: 1 << 16, leaveOpen: true);
        text.Write(header);
        text.Write('\n');
        return text;
    }
}

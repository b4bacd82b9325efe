using System.Globalization;
using System.Text.Unicode;

namespace BarbuleOptics.Files.Toml;

/// <summary>Takes bytes in as text: UTF-8 with or without byte-order mark, up to 1 MB, without zero bytes.</summary>
internal static class SourceText
{
    /// <summary>Largest file, in bytes.</summary>
    public const int MostBytes = 1_000_000;

    /// <summary>The text; null when it was refused.</summary>
    public static string? Decode(ReadOnlySpan<byte> bytes, ReadingLog log, int mostBytes = MostBytes)
    {
        if (bytes.Length > mostBytes)
            return Refuse(log, string.Create(CultureInfo.InvariantCulture, $"found more than {mostBytes / 1_000_000} MB; allowed up to {mostBytes:#,0} bytes"));
        if (bytes is [0xFF, 0xFE, ..] or [0xFE, 0xFF, ..])
            return Refuse(log, "found UTF-16 or UTF-32 text; allowed UTF-8: save the file in that encoding");
        if (bytes is [0xEF, 0xBB, 0xBF, ..])
            bytes = bytes[3..];
        char[] characters = new char[bytes.Length];
        Utf8.ToUtf16(bytes, characters, out int read, out int written, replaceInvalidSequences: false);
        string text = new(characters, 0, written);
        int zero = text.IndexOf('\0', StringComparison.Ordinal);
        if (zero >= 0)
            return Refuse(log, "found a zero byte; allowed UTF-8 text (not UTF-16 or a binary file)", Place(log, text.AsSpan(0, zero)));
        if (read < bytes.Length)
        {
            string message = FormattableString.Invariant($"found the byte 0x{bytes[read]:X2}, which is not UTF-8; allowed UTF-8: save the file in that encoding");
            return Refuse(log, message, Place(log, text));
        }
        return text;
    }

    /// <summary>Reads a file, at most one byte more than is allowed; null when it cannot be read, with the reason logged.</summary>
    public static byte[]? ReadFile(string path, ReadingLog log)
    {
        string? reason = TryReadFile(path, out byte[] bytes);
        if (reason is null)
            return bytes;
        log.Refuse(SourceLocation.Whole(log.Source), null, reason);
        return null;
    }

    /// <summary>Reads a file; returns why it cannot be read, or null.</summary>
    public static string? TryReadFile(string path, out byte[] bytes, int mostBytes = MostBytes)
    {
        bytes = [];
        try
        {
            if (Directory.Exists(path))
                return "found a folder; allowed a file";
            using FileStream stream = new(path, FileMode.Open, FileAccess.Read, FileShare.Read);
            // A device says that it is empty and never ends.
            byte[] buffer = new byte[(stream is { CanSeek: true, Length: > 0 } ? Math.Min(mostBytes, stream.Length) : mostBytes) + 1];
            int length = stream.ReadAtLeast(buffer, buffer.Length, throwOnEndOfStream: false);
            bytes = buffer[..length];
            return null;
        }
        catch (Exception e) when (e is FileNotFoundException or DirectoryNotFoundException)
        {
            return "there is no such file";
        }
        catch (UnauthorizedAccessException)
        {
            return "cannot be read: access is denied";
        }
        catch (Exception e) when (e is IOException or ArgumentException or NotSupportedException)
        {
            return $"cannot be read: {OneLine.Escape(e.Message)}";
        }
    }

    private static string? Refuse(ReadingLog log, string message, SourceLocation? location = null)
    {
        log.Refuse(location ?? SourceLocation.Whole(log.Source), null, message);
        return null;
    }

    private static SourceLocation Place(ReadingLog log, ReadOnlySpan<char> before)
        => new(log.Source, before.Count('\n') + 1, before.Length - before.LastIndexOf('\n'));
}

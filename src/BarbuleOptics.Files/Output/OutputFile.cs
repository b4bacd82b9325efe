using System.Text;

namespace BarbuleOptics.Files;

/// <summary>A file to be written.</summary>
public sealed class OutputFile
{
    private readonly Action<Stream> _write;

    /// <summary>A file whose content <paramref name="write"/> puts into a stream when its turn comes.</summary>
    /// <exception cref="ArgumentException"><paramref name="name"/> is not a plain file name.</exception>
    public OutputFile(string name, Action<Stream> write)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(name);
        ArgumentNullException.ThrowIfNull(write);
        if (name is "." or ".." || name.AsSpan().ContainsAny("/\\\0"))
            throw new ArgumentException($"Must be a file name without folders, is {OneLine.Quote(name)}.", nameof(name));
        Name = name;
        _write = write;
    }

    /// <summary>Its name, without folders.</summary>
    public string Name { get; }

    /// <summary>A file of UTF-8 text without byte-order mark.</summary>
    public static OutputFile FromText(string name, string text)
    {
        ArgumentNullException.ThrowIfNull(text);
        return FromBytes(name, Encoding.UTF8.GetBytes(text));
    }

    /// <summary>A file of bytes.</summary>
    public static OutputFile FromBytes(string name, ReadOnlyMemory<byte> bytes) => new(name, stream => stream.Write(bytes.Span));

    internal void WriteTo(Stream stream) => _write(stream);
}

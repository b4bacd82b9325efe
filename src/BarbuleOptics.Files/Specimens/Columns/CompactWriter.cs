using System.Text;

namespace BarbuleOptics.Files.Specimens.Columns;

/// <summary>Writes the compact protocol of Apache Thrift, in which Parquet files describe themselves.</summary>
/// <remarks>Thrift compact protocol encoding, https://github.com/apache/thrift/blob/master/doc/specs/thrift-compact-protocol.md (from memory).</remarks>
#pragma warning disable CA1001 // A stream in memory holds nothing to give back.
internal sealed class CompactWriter
#pragma warning restore CA1001
{
    private const byte Whole32 = 5, Whole64 = 6, Binary = 8, ListOf = 9, Struct = 12;

    private readonly MemoryStream _bytes = new();
    private readonly Stack<int> _lastFields = new([0]);

    /// <summary>What was written, closed by the end of the outermost struct.</summary>
    public byte[] Finish()
    {
        _bytes.WriteByte(0);
        return _bytes.ToArray();
    }

    /// <summary>A field of 32 bits.</summary>
    public void Int(int field, int value)
    {
        Field(field, Whole32);
        Varint(ZigZag(value));
    }

    /// <summary>A field of 64 bits.</summary>
    public void Long(int field, long value)
    {
        Field(field, Whole64);
        Varint(ZigZag(value));
    }

    /// <summary>A field of text.</summary>
    public void Text(int field, string value)
    {
        Field(field, Binary);
        Bytes(value);
    }

    /// <summary>A field that is a struct.</summary>
    public void Inner(int field, Action write)
    {
        Field(field, Struct);
        Body(write);
    }

    /// <summary>A field that is a list of structs.</summary>
    public void Structs<T>(int field, IReadOnlyList<T> items, Action<T> write)
    {
        List(field, items.Count, Struct);
        foreach (T item in items)
            Body(() => write(item));
    }

    /// <summary>A field that is a list of one number.</summary>
    public void Ints(int field, int only)
    {
        List(field, 1, Whole32);
        Varint(ZigZag(only));
    }

    /// <summary>A field that is a list of one text.</summary>
    public void Texts(int field, string only)
    {
        List(field, 1, Binary);
        Bytes(only);
    }

    private void Body(Action write)
    {
        _lastFields.Push(0);
        write();
        _lastFields.Pop();
        _bytes.WriteByte(0);
    }

    private void List(int field, int count, byte type)
    {
        const int MostShort = 14;
        Field(field, ListOf);
        if (count <= MostShort)
        {
            _bytes.WriteByte((byte)(count << 4 | type));
            return;
        }
        _bytes.WriteByte((byte)(0xF0 | type));
        Varint((ulong)count);
    }

    // Fields come in ascending order and less than 16 apart, so that the short form always serves.
    private void Field(int field, byte type)
    {
        int step = field - _lastFields.Pop();
        _lastFields.Push(field);
        _bytes.WriteByte((byte)(step << 4 | type));
    }

    private void Bytes(string value)
    {
        byte[] bytes = Encoding.UTF8.GetBytes(value);
        Varint((ulong)bytes.Length);
        _bytes.Write(bytes);
    }

    private void Varint(ulong value)
    {
        for (; value >= 0x80; value >>= 7)
            _bytes.WriteByte((byte)(value | 0x80));
        _bytes.WriteByte((byte)value);
    }

    private static ulong ZigZag(long value) => (ulong)(value << 1 ^ value >> 63);
}

using System.Buffers.Binary;
using System.Text;

namespace BarbuleOptics.Files.Specimens.Columns;

/// <summary>Writes a Parquet file of texts and doubles, no value missing: plain encoding, without compression, a row group at a time.</summary>
/// <remarks>Apache Parquet format, version 1 data pages, https://parquet.apache.org/docs/file-format/ (field numbers of its Thrift definition from memory). Equal
/// columns give equal bytes.</remarks>
internal sealed class ParquetWriter
{
    private const int TypeDouble = 5, TypeBytes = 6, Required = 0, Utf8 = 0, Plain = 0, Rle = 3, Uncompressed = 0, DataPage = 0;

    private static readonly byte[] Magic = "PAR1"u8.ToArray();

    private readonly Stream _stream;
    private readonly (string Name, bool IsText)[] _columns;
    private readonly List<(long Rows, (long Offset, long Size)[] Chunks)> _groups = [];
    private long _position;

    /// <summary>Begins a file; the stream stays open.</summary>
    public ParquetWriter(Stream stream, params (string Name, bool IsText)[] columns)
    {
        _stream = stream;
        _columns = columns;
        Put(Magic);
    }

    /// <summary>Writes one row group: for each column its values in plain encoding.</summary>
    public void Group(int rows, IReadOnlyList<byte[]> columns)
    {
        if (rows == 0)
            return;
        var chunks = new (long Offset, long Size)[_columns.Length];
        for (int c = 0; c < chunks.Length; c++)
        {
            long start = _position;
            Put(PageHeader(rows, columns[c].Length));
            Put(columns[c]);
            chunks[c] = (start, _position - start);
        }
        _groups.Add((rows, chunks));
    }

    /// <summary>Ends the file with what describes it.</summary>
    public void Finish(string createdBy)
    {
        byte[] footer = Footer(createdBy);
        Put(footer);
        byte[] length = new byte[sizeof(int)];
        BinaryPrimitives.WriteInt32LittleEndian(length, footer.Length);
        Put(length);
        Put(Magic);
    }

    /// <summary>Doubles in plain encoding.</summary>
    public static byte[] Doubles(IReadOnlyList<double> values)
    {
        byte[] bytes = new byte[values.Count * sizeof(double)];
        for (int i = 0; i < values.Count; i++)
            BinaryPrimitives.WriteDoubleLittleEndian(bytes.AsSpan(i * sizeof(double)), values[i]);
        return bytes;
    }

    /// <summary>Texts in plain encoding.</summary>
    public static byte[] Texts(IEnumerable<(string Text, int Times)> runs)
    {
        using var bytes = new MemoryStream();
        foreach ((string text, int times) in runs)
        {
            byte[] own = Encoding.UTF8.GetBytes(text), length = new byte[sizeof(int)];
            BinaryPrimitives.WriteInt32LittleEndian(length, own.Length);
            for (int i = 0; i < times; i++)
            {
                bytes.Write(length);
                bytes.Write(own);
            }
        }
        return bytes.ToArray();
    }

    private static byte[] PageHeader(int rows, int size)
    {
        var header = new CompactWriter();
        header.Int(1, DataPage);
        header.Int(2, size);
        header.Int(3, size);
        header.Inner(5, () =>
        {
            header.Int(1, rows);
            header.Int(2, Plain);
            header.Int(3, Rle);
            header.Int(4, Rle);
        });
        return header.Finish();
    }

    private byte[] Footer(string createdBy)
    {
        var footer = new CompactWriter();
        footer.Int(1, 1);
        footer.Structs(2, [("schema", (bool?)null), .. _columns.Select(column => (column.Name, (bool?)column.IsText))], element =>
        {
            if (element.Item2 is not bool isText)
            {
                footer.Text(4, element.Item1);
                footer.Int(5, _columns.Length);
                return;
            }
            footer.Int(1, isText ? TypeBytes : TypeDouble);
            footer.Int(3, Required);
            footer.Text(4, element.Item1);
            if (isText)
                footer.Int(6, Utf8);
        });
        footer.Long(3, _groups.Sum(group => group.Rows));
        footer.Structs(4, _groups, group =>
        {
            footer.Structs(1, [.. Enumerable.Range(0, _columns.Length)], c => Chunk(footer, c, group.Rows, group.Chunks[c]));
            footer.Long(2, group.Chunks.Sum(chunk => chunk.Size));
            footer.Long(3, group.Rows);
        });
        footer.Text(6, createdBy);
        return footer.Finish();
    }

    private void Chunk(CompactWriter footer, int column, long rows, (long Offset, long Size) chunk)
    {
        footer.Long(2, chunk.Offset);
        footer.Inner(3, () =>
        {
            footer.Int(1, _columns[column].IsText ? TypeBytes : TypeDouble);
            footer.Ints(2, Plain);
            footer.Texts(3, _columns[column].Name);
            footer.Int(4, Uncompressed);
            footer.Long(5, rows);
            footer.Long(6, chunk.Size);
            footer.Long(7, chunk.Size);
            footer.Long(9, chunk.Offset);
        });
    }

    private void Put(byte[] bytes)
    {
        _stream.Write(bytes);
        _position += bytes.Length;
    }
}

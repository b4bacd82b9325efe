using System.Numerics;

namespace BarbuleOptics.Grating.Joining;

/// <summary>What everything beyond a plane reflects: amplitudes that come back from amplitudes that go.</summary>
/// <remarks>Diagonal until a row is met, and kept as such.</remarks>
internal sealed class Reflection(int channels)
{
    private readonly Complex[] _diagonal = new Complex[channels];
    private readonly ComplexMatrix _full = new(channels, channels);

    /// <summary>Whether no channel reflects into another.</summary>
    public bool IsDiagonal { get; private set; }

    /// <summary>The diagonal, while it is all there is.</summary>
    public Span<Complex> Diagonal => _diagonal;

    /// <summary>The matrix, unless it is diagonal.</summary>
    public ComplexMatrix Full => _full;

    /// <summary>One element.</summary>
    public Complex this[int to, int from] => IsDiagonal ? to == from ? _diagonal[to] : Complex.Zero : _full[to, from];

    /// <summary>Nothing comes back.</summary>
    public void SetZero()
    {
        Array.Clear(_diagonal);
        IsDiagonal = true;
    }

    /// <summary>Copies <paramref name="source"/>.</summary>
    public void CopyFrom(Reflection source)
    {
        IsDiagonal = source.IsDiagonal;
        if (IsDiagonal)
            source._diagonal.CopyTo(_diagonal.AsSpan());
        else
            _full.CopyFrom(source._full);
    }

    /// <summary>From now on the matrix counts.</summary>
    public ComplexMatrix MakeFull()
    {
        IsDiagonal = false;
        return _full;
    }

    /// <summary>Writes what comes back.</summary>
    public void Apply(ReadOnlySpan<Complex> gone, Span<Complex> back)
    {
        if (!IsDiagonal)
        {
            _full.Apply(gone, back);
            return;
        }
        for (int i = 0; i < gone.Length; i++)
            back[i] = _diagonal[i] * gone[i];
    }

    /// <summary>Moves to the near side of a layer.</summary>
    /// <param name="factors">exp(i kz d) of each channel.</param>
    public void ThroughLayer(ReadOnlySpan<Complex> factors) => Scale(factors, factors, ofDiagonal: true);

    /// <summary>Counts phases from another place along the surface.</summary>
    /// <param name="phases">exp(2 pi i n step/P) of each channel.</param>
    /// <param name="conjugates">Their conjugates.</param>
    public void Rotate(ReadOnlySpan<Complex> phases, ReadOnlySpan<Complex> conjugates) => Scale(phases, conjugates, ofDiagonal: false);

    private void Scale(ReadOnlySpan<Complex> rows, ReadOnlySpan<Complex> columns, bool ofDiagonal)
    {
        if (IsDiagonal)
        {
            for (int i = 0; ofDiagonal && i < rows.Length; i++)
                _diagonal[i] *= rows[i] * columns[i];
            return;
        }
        for (int to = 0; to < rows.Length; to++)
        {
            Span<Complex> row = _full.Row(to);
            for (int from = 0; from < row.Length; from++)
                row[from] *= rows[to] * columns[from];
        }
    }
}

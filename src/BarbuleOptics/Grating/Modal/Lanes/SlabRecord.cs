using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>What was eliminated while a slab was solved for functions of one kind, from which the fields inside follow.</summary>
/// <remarks>Each slot holds a reduced system [U | W] and behind it the inverse pivots (<see cref="SymmetricLanes.Recall"/>).</remarks>
internal sealed class SlabRecord
{
    /// <summary>More doublings than these are not kept.</summary>
    public const int MostLevels = 12;

    private LaneMemory _memory = new(0);
    private int _count, _matrix, _slot, _interval, _close;

    /// <summary>How often each interval's thin depth was doubled.</summary>
    public int[] Doublings { get; private set; } = [];

    /// <summary>The thin depths, in nm.</summary>
    public double[] ThinNm { get; private set; } = [];

    /// <summary>Makes room.</summary>
    /// <param name="n">Number of functions.</param>
    /// <param name="ports">Number of plane waves.</param>
    /// <param name="intervals">Number of intervals.</param>
    /// <param name="size">Doubles of a complex number.</param>
    public void Reserve(int n, int ports, int intervals, int size)
    {
        _count = n;
        // Slopes of odd functions are even ones, of which there is one more.
        _matrix = (n + 1) * (n + 1) * size;
        _slot = (2 * n * n + n) * size;
        _interval = 4 * _matrix + (MostLevels + 2) * _slot;
        _close = (n * (n + ports) + n) * size;
        int needed = intervals * _interval + 2 * _close;
        if (_memory.Length < needed)
            _memory = new LaneMemory(needed);
        if (Doublings.Length != intervals)
            (Doublings, ThinNm) = (new int[intervals], new double[intervals]);
    }

    /// <summary>Number of functions.</summary>
    public int Count => _count;

    /// <summary>C of twice the thin depth.</summary>
    public ref double Piece(int interval) => ref _memory[interval * _interval];

    /// <summary>D/2 of the thin depth: what couples the planes of a piece of twice that.</summary>
    public ref double Link(int interval) => ref _memory[interval * _interval + _matrix];

    /// <summary>Z^-1, where Z is not the unit matrix.</summary>
    public ref double SlopeInverse(int interval) => ref _memory[interval * _interval + 2 * _matrix];

    /// <summary>(sum e_i P_i)^-1, between the slopes.</summary>
    public ref double Across(int interval) => ref _memory[interval * _interval + 3 * _matrix];

    /// <summary>The plane between two pieces of the thin depth times 2^<paramref name="level"/>, from level 1.</summary>
    public ref double Level(int interval, int level) => ref _memory[interval * _interval + 4 * _matrix + (level - 1) * _slot];

    /// <summary>The lower plane of an interval, for fields even (0) or odd (1) about the middle.</summary>
    public ref double Carry(int interval, int parity) => ref _memory[interval * _interval + 4 * _matrix + (MostLevels + parity) * _slot];

    /// <summary>The upper plane of the slab, likewise.</summary>
    public ref double Close(int parity, int intervals) => ref _memory[intervals * _interval + parity * _close];
}

using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer.Kernels;

namespace BarbuleOptics.Multilayer;

/// <summary>Memory of the vectorised film solver: what it knows of the media at each direction, and scratch. Serves every stack with at most as
/// many films, media and wavelengths as the one it was made for.</summary>
/// <remarks>Not to be shared between threads. Tables are kept from call to call as long as stacks share their constants.</remarks>
public sealed class VectorFilmWorkspace
{
    /// <summary>Most directions kept, and most doubles that their tables take together.</summary>
    private const int MostDirections = 32, MostDoubles = 8_000_000;

    private readonly int _mostWavelengths, _mostMedia;
    private readonly DirectionTable?[] _directions;
    private int _next;
    private FilmStack? _known;
    private (int Version, int First, int Count) _block;

    internal VectorFilmWorkspace(FilmStack structure, LaneWidth width)
    {
        Width = width;
        _mostWavelengths = structure.WavelengthsNm.Length;
        _mostMedia = structure.Media.MediumCount;
        Films = new FilmSequence(structure.FilmCount);
        Steps = new AmplitudeStep[structure.FilmCount];
        Pairs = new PairRegistry(structure.FilmCount + 1);
        Fields = new FieldKernel(width.Count);
        Facts = new MediumFacts();
        Doubtful = new bool[LaneBlock.Vectors(_mostWavelengths, width.Count)];
        Failed = new bool[Doubtful.Length];
        Reference = new FilmWorkspace(structure.FilmCount, _mostMedia);
        long doubles = (long)DirectionTable.Values * width.Count * Doubtful.Length * (2 * _mostMedia + structure.FilmCount + 3);
        _directions = new DirectionTable?[(int)Math.Clamp(MostDoubles / doubles, 1, MostDirections)];
    }

    internal LaneWidth Width { get; }

    internal FilmSequence Films { get; }

    internal AmplitudeStep[] Steps { get; }

    internal PairRegistry Pairs { get; }

    internal FieldKernel Fields { get; }

    internal MediumFacts Facts { get; }

    /// <summary>For each vector whether the amplitude kernel must leave it.</summary>
    internal bool[] Doubtful { get; }

    /// <summary>For each vector whether the field kernel could not solve it.</summary>
    internal bool[] Failed { get; }

    internal FilmWorkspace Reference { get; }

    internal bool Holds(FilmStack stack)
        => stack.FilmCount <= Steps.Length && stack.Media.MediumCount <= _mostMedia && stack.WavelengthsNm.Length <= _mostWavelengths;

    /// <summary>Makes the stack's films the ones at hand; forgets tables of other constants.</summary>
    internal void Take(FilmStack stack, int first, int count)
    {
        (int, int, int) block = (stack.Media.Version, first, count);
        if (_known is null || _block != block || !stack.SharesConstantsWith(_known))
        {
            // Known only once the media have passed.
            _known = null;
            FilmRequestCheck.CheckMedia(stack, first, count);
            Facts.Find(stack, first, count);
            Pairs.Clear();
            foreach (DirectionTable? direction in _directions)
                direction?.Clear();
            (_known, _block) = (stack, block);
        }
        Films.Take(stack);
    }

    /// <summary>The tables of a direction, their faces not yet filled.</summary>
    internal DirectionTable TableOf<TLanes>(FilmStack stack, int first, int count, double degrees, double sine, double cosine)
        where TLanes : struct, ILanes<TLanes>
    {
        foreach (DirectionTable? known in _directions)
        {
            if (known is not null && known.Degrees == degrees)
                return known;
        }
        int slot = _next;
        _next = (_next + 1) % _directions.Length;
        DirectionTable table = _directions[slot] ??= new DirectionTable(Width.Count, Doubtful.Length, _mostMedia);
        table.Fill<TLanes>(stack, first, count, degrees, sine, cosine);
        return table;
    }

    /// <summary>Forgets all faces.</summary>
    internal void ForgetFaces()
    {
        Pairs.Clear();
        foreach (DirectionTable? direction in _directions)
            direction?.ForgetFaces();
    }
}

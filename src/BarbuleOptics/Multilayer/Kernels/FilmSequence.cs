using BarbuleOptics.Layering;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>The films of a stack as kernels walk through them: none of zero thickness, neighbors of one medium joined, equal films named once.</summary>
internal sealed class FilmSequence(int mostFilms)
{
    private readonly int[] _medium = new int[mostFilms];
    private readonly double[] _thicknessNm = new double[mostFilms];
    private readonly int[] _distinct = new int[mostFilms];
    private readonly int[] _firstOfDistinct = new int[mostFilms];
    private readonly int[] _slots = new int[SlotsFor(mostFilms)];

    /// <summary>Number of films left.</summary>
    public int Count { get; private set; }

    /// <summary>Number of films that differ in medium or thickness; known after <see cref="FindDistinct"/>.</summary>
    public int DistinctCount { get; private set; }

    /// <summary>Number of the medium of each film, outermost first.</summary>
    public ReadOnlySpan<int> Medium => _medium.AsSpan(0, Count);

    /// <summary>Thickness of each film, in nm, above zero.</summary>
    public ReadOnlySpan<double> ThicknessNm => _thicknessNm.AsSpan(0, Count);

    /// <summary>For each film the number among those that differ.</summary>
    public ReadOnlySpan<int> Distinct => _distinct.AsSpan(0, Count);

    /// <summary>For each that differs the first film that is like it.</summary>
    public ReadOnlySpan<int> FirstOfDistinct => _firstOfDistinct.AsSpan(0, DistinctCount);

    /// <summary>Takes the films of a stack, at most as many as there is room for.</summary>
    public void Take(FilmStack stack)
    {
        ReadOnlySpan<int> media = stack.MediumOfFilm;
        ReadOnlySpan<double> thicknessesNm = stack.ThicknessesNm;
        int count = 0;
        for (int film = 0; film < media.Length; film++)
        {
            if (thicknessesNm[film] == 0)
                continue;
            if (count > 0 && _medium[count - 1] == media[film])
            {
                _thicknessNm[count - 1] += thicknessesNm[film];
                continue;
            }
            (_medium[count], _thicknessNm[count]) = (media[film], thicknessesNm[film]);
            count++;
        }
        (Count, DistinctCount) = (count, 0);
    }

    /// <summary>Finds equal films.</summary>
    public void FindDistinct()
    {
        _slots.AsSpan().Fill(-1);
        DistinctCount = 0;
        for (int film = 0; film < Count; film++)
        {
            int slot = HashCode.Combine(_medium[film], _thicknessNm[film]) & (_slots.Length - 1);
            while (_slots[slot] >= 0 && !IsLike(_firstOfDistinct[_slots[slot]], film))
                slot = (slot + 1) & (_slots.Length - 1);
            if (_slots[slot] < 0)
            {
                _firstOfDistinct[DistinctCount] = film;
                _slots[slot] = DistinctCount++;
            }
            _distinct[film] = _slots[slot];
        }
    }

    private bool IsLike(int one, int other) => _medium[one] == _medium[other] && _thicknessNm[one] == _thicknessNm[other];

    private static int SlotsFor(int count) => (int)System.Numerics.BitOperations.RoundUpToPowerOf2((uint)(2 * count + 1));
}

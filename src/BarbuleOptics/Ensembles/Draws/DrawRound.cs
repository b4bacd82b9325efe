namespace BarbuleOptics.Ensembles.Draws;

/// <summary>The draws of one round, filled by several threads and then taken in in their order; used again by the next round.</summary>
internal sealed class DrawRound
{
    private readonly double[] _reflectances;
    private readonly double[] _outcomes;
    private readonly double[] _moved;
    private readonly DrawMarks[] _marks;
    private readonly int _angles;
    private readonly int _wavelengths;
    private readonly int _outcomeCount;
    private readonly int _slots;

    public DrawRound(int most, int angles, int wavelengths, int outcomes, int slots)
    {
        (_angles, _wavelengths, _outcomeCount, _slots) = (angles, wavelengths, outcomes, slots);
        _reflectances = new double[most * angles * wavelengths];
        _outcomes = new double[most * angles * outcomes];
        _moved = new double[most * slots];
        _marks = new DrawMarks[most * angles];
        Errors = new double[most];
    }

    /// <summary>Error estimate of each draw.</summary>
    public double[] Errors { get; }

    /// <summary>Reflectance of a draw, angle after angle.</summary>
    public Span<double> Reflectances(int place) => _reflectances.AsSpan(place * _angles * _wavelengths, _angles * _wavelengths);

    /// <summary>Reflectance of a draw at one angle.</summary>
    public Span<double> Reflectance(int place, int angle) => _reflectances.AsSpan((place * _angles + angle) * _wavelengths, _wavelengths);

    /// <summary>Outcomes of a draw at one angle.</summary>
    public Span<double> Outcomes(int place, int angle) => _outcomes.AsSpan((place * _angles + angle) * _outcomeCount, _outcomeCount);

    /// <summary>By how much each length of a draw was moved to one that can be, in nm.</summary>
    public Span<double> Moved(int place) => _moved.AsSpan(place * _slots, _slots);

    /// <summary>Marks of a draw at one angle.</summary>
    public ref DrawMarks Marks(int place, int angle) => ref _marks[place * _angles + angle];

    /// <summary>Reflectance of a draw at one angle and wavelength.</summary>
    public double ReflectanceAt(int place, int angle, int wavelength) => _reflectances[(place * _angles + angle) * _wavelengths + wavelength];

    /// <summary>One outcome of a draw at one angle.</summary>
    public double OutcomeAt(int place, int angle, int outcome) => _outcomes[(place * _angles + angle) * _outcomeCount + outcome];
}

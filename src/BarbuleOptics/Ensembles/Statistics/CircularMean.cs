namespace BarbuleOptics.Ensembles.Statistics;

/// <summary>The mean of angles: the direction of the sum of their unit vectors.</summary>
/// <remarks>Mardia 1972, Statistics of Directional Data, chapter 2 (from memory).</remarks>
internal struct CircularMean
{
    private double _cosine;
    private double _sine;

    /// <summary>Number of angles.</summary>
    public long Count { get; private set; }

    /// <summary>Length of the mean unit vector, 0 to 1: 1 where all angles agree.</summary>
    public readonly double Length => Count == 0 ? 0 : Math.Min(1, Math.Sqrt(_cosine * _cosine + _sine * _sine) / Count);

    /// <summary>Mean direction, at least 0 and below 360 degrees; 0 where the vectors cancel.</summary>
    public readonly double Degrees => Circle.Wrap(double.RadiansToDegrees(Math.Atan2(_sine, _cosine)));

    /// <summary>sqrt(-2 ln r), in degrees.</summary>
    public readonly double StandardDeviationDegrees => double.RadiansToDegrees(Math.Sqrt(-2 * Math.Log(Math.Max(Length, double.Epsilon))));

    /// <summary>Takes in one angle.</summary>
    public void Add(double degrees)
    {
        (double sine, double cosine) = Math.SinCos(double.DegreesToRadians(degrees));
        (_cosine, _sine, Count) = (_cosine + cosine, _sine + sine, Count + 1);
    }

    /// <summary>Takes in the angles of another.</summary>
    public void Add(in CircularMean other) => (_cosine, _sine, Count) = (_cosine + other._cosine, _sine + other._sine, Count + other.Count);
}

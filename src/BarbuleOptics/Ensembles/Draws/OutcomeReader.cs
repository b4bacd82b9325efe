using BarbuleOptics.Color;
using BarbuleOptics.Prediction;
using BarbuleOptics.Vision;

namespace BarbuleOptics.Ensembles.Draws;

/// <summary>Reads peak, color and bird color from a spectrum; allocates nothing.</summary>
internal sealed class OutcomeReader
{
    /// <summary>Place of the followed peak's wavelength among the outcomes.</summary>
    public const int Peak = 0;

    /// <summary>Place of L*, with a*, b*, C* and h behind it.</summary>
    public const int Lightness = 3;

    /// <summary>Place of the chroma.</summary>
    public const int Chroma = Lightness + 3;

    /// <summary>Place of the hue angle.</summary>
    public const int Hue = Lightness + 4;

    private const int FirstEye = Hue + 1;
    private const int OutcomesOfEye = 6;

    private readonly Colorimeter _colorimeter;
    private readonly BirdEye[] _eyes;

    public OutcomeReader(PredictionConditions conditions)
    {
        _colorimeter = new Colorimeter(conditions.Wavelengths, conditions.Illuminant, conditions.Observer, conditions.Summation);
        _eyes = CatchMatrix.CanCatch(conditions.Wavelengths)
            ? [.. conditions.Eyes.Select(system => new BirdEye(conditions.Wavelengths, system, conditions.Illuminant, conditions.Background?.Reflectance))] : [];
        Outcomes =
        [
            new("peak_nm", false), new("peak_reflectance", false), new("mean_reflectance", false),
            new("L", false), new("a", false), new("b", false), new("C", false), new("h_deg", true),
            .. _eyes.SelectMany(eye => (DrawOutcome[])[
                new($"{eye.System.Name}.x", false), new($"{eye.System.Name}.y", false), new($"{eye.System.Name}.z", false),
                new($"{eye.System.Name}.chroma", false), new($"{eye.System.Name}.azimuth_deg", true), new($"{eye.System.Name}.elevation_deg", false)]),
        ];
    }

    /// <summary>What is read, in order.</summary>
    public IReadOnlyList<DrawOutcome> Outcomes { get; }

    /// <summary>Whether spectra have a color.</summary>
    public bool HasColor => _colorimeter.CanMeasure;

    /// <summary>The colorimeter.</summary>
    public Colorimeter Colorimeter => _colorimeter;

    /// <summary>Reads one spectrum.</summary>
    /// <param name="reflectance">One value a wavelength.</param>
    /// <param name="peaks">Its peaks.</param>
    /// <param name="followed">Number of the peak followed; -1 where it is lost.</param>
    /// <param name="outcomes">Receives one number an outcome; NaN where the spectrum has none.</param>
    /// <returns>Number of the hue term (<see cref="HueTermList"/>); -1 without color.</returns>
    public int Read(ReadOnlySpan<double> reflectance, PeakScan peaks, int followed, Span<double> outcomes)
    {
        outcomes.Fill(double.NaN);
        if (followed >= 0)
            (outcomes[Peak], outcomes[Peak + 1]) = (peaks.WavelengthNm(followed), peaks.Reflectance(followed));
        double sum = 0;
        foreach (double value in reflectance)
            sum += value;
        outcomes[Peak + 2] = sum / reflectance.Length;
        ReadEyes(reflectance, outcomes[FirstEye..]);
        if (!HasColor)
            return -1;
        CieLab lab = _colorimeter.MeasureLab(reflectance);
        (outcomes[Lightness], outcomes[Lightness + 1], outcomes[Lightness + 2]) = (lab.L, lab.A, lab.B);
        (outcomes[Chroma], outcomes[Hue]) = (lab.Chroma, lab.HueDegrees);
        return HueTermList.NumberOf(lab);
    }

    private void ReadEyes(ReadOnlySpan<double> reflectance, Span<double> outcomes)
    {
        Span<double> catches = stackalloc double[CatchMatrix.RowCount];
        for (int eye = 0; eye < _eyes.Length; eye++)
        {
            _eyes[eye].Matrix.Multiply(reflectance, catches);
            var place = new TetrahedralColor(catches[..VisualSystem.SingleCount]);
            Span<double> own = outcomes.Slice(eye * OutcomesOfEye, OutcomesOfEye);
            (own[0], own[1], own[2]) = (place.X, place.Y, place.Z);
            (own[3], own[4], own[5]) = (place.Chroma, place.AzimuthDegrees, place.ElevationDegrees);
        }
    }
}

using BarbuleOptics.Anatomy;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Ensembles.Statistics;
using BarbuleOptics.Files;
using BarbuleOptics.Materials;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Benchmarks.Coverage;

/// <summary>Studies of a structure that is known: some barbules are measured, and the interval predicted from them covers the truth or not.</summary>
/// <remarks>Four melanin films in keratin under a cortex; cortex, film and pitch differ from barbule to barbule, normally and independently, and are measured on
/// the same number of barbules each.</remarks>
internal sealed class CoverageStudy
{
    private const int Draws = 1024;

    /// <summary>Means of cortex, film and pitch over all barbules, and their standard deviations, in nm.</summary>
    private static readonly (double MeanNm, double SdNm)[] Truth = [(130, 8), (85, 5), (170, 7)];

    private static readonly PredictionConditions Conditions = new()
    {
        Wavelengths = WavelengthGrid.FromRange(Length.FromNanometres(380), Length.FromNanometres(700), Length.FromNanometres(10)),
        Threads = 1,
        ComparesSolvers = false,
        Eyes = [],
    };

    /// <summary>The outcomes looked at.</summary>
    public static IReadOnlyList<string> Outcomes { get; } = ["peak_nm", "h_deg", "L", "C"];

    private readonly double[] _truths;

    public CoverageStudy()
    {
        StructurePrediction prediction = Predict(Barbule([.. Truth.Select(length => MeasuredLength.FromNanometres(length.MeanNm))]));
        View view = prediction.Views[0];
        _truths = [view.Features.MainPeak!.WavelengthNm, view.Color!.Lab.HueDegrees, view.Color.Lab.L, view.Color.Lab.Chroma];
    }

    /// <summary>One study: for each outcome whether its 95 % interval covers the truth.</summary>
    /// <param name="units">Number of barbules measured.</param>
    /// <param name="seed">Names the study.</param>
    public bool[] Covers(int units, int seed)
    {
        var random = new Random(seed);
        MeasuredLength[] measured = [.. Truth.Select(length => Measure(length.MeanNm, length.SdNm, units, random))];
        if (!EnsemblePredictor.TryPredict(Barbule(measured), Conditions, new DrawOptions { Draws = Draws, Seed = seed, ComparesMelanins = false }, EmbeddedMaterials.Catalog, out EnsemblePrediction? ensemble, out var problems))
            throw new InvalidOperationException(problems[0].Message);
        return [.. Outcomes.Select((name, i) => Holds(ensemble.Views[0].Value(name)!, _truths[i], isAngle: name == "h_deg"))];
    }

    private static bool Holds(DrawnValue value, double truth, bool isAngle)
    {
        if (!isAngle)
            return truth >= value.From95 && truth <= value.To95;
        double width = Circle.Wrap(value.To95 - value.From95);
        return Circle.Wrap(truth - value.From95) <= width;
    }

    private static MeasuredLength.Summary Measure(double meanNm, double sdNm, int units, Random random)
    {
        double[] values = [.. Enumerable.Range(0, units).Select(_ => meanNm + sdNm * Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble()))];
        double mean = values.Average();
        return new MeasuredLength.Summary(mean, Math.Sqrt(values.Sum(value => (value - mean) * (value - mean)) / (units - 1)), units, null);
    }

    private static Barbule Barbule(MeasuredLength[] lengths)
    {
        var keratin = new MaterialReference.Named(Anatomy.Barbule.DefaultMatrix);
        var film = new Body(new MelanosomeForm.Film(lengths[1]), new MaterialReference.Named(Anatomy.Barbule.DefaultMelanin), new MaterialReference.Named(Anatomy.Barbule.DefaultLumen), 0, 0);
        var layer = new BarbuleLayer([film], null, new RowCount([4]), new Packing(lengths[2], false), Stacking.Aligned, 0, MeasuredLength.FromNanometres(0));
        return new Barbule("study", new MaterialReference.Named(Anatomy.Barbule.DefaultSurround), keratin, keratin, Angle.FromDegrees(0), lengths[0], [layer], null);
    }

    private static StructurePrediction Predict(Barbule barbule)
        => Predictor.TryPredict(barbule, Conditions, EmbeddedMaterials.Catalog, out StructurePrediction? prediction, out var problems)
            ? prediction : throw new InvalidOperationException(problems[0].Message);
}

using System.Globalization;
using BarbuleOptics.Color;
using BarbuleOptics.Figures.Colors;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Figures.Plots;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;
using BarbuleOptics.Spectra;
using BarbuleOptics.Spectra.Instruments;

namespace BarbuleOptics.Figures.Curves;

/// <summary>Reflectance over wavelength, one curve an angle, with the colors that the curves predict.</summary>
public sealed class ReflectanceFigure
{
    private const double MarginPt = 4;
    private const double LabelGapPt = 6;
    private const double MostLabels = 12;
    private const double LeastPeakShare = 0.005;

    private readonly StructurePrediction _prediction;
    private readonly IReadOnlyList<View> _views;
    private readonly double _widthPt;
    private readonly List<PageElement> _elements = [];
    private readonly PlotFrame _frame;
    private readonly int _labelEvery;
    private readonly LayerModelError?[] _others;
    private bool _explainsTint;

    private ReflectanceFigure(StructurePrediction prediction, FigureSize size, bool overlays)
    {
        (_prediction, _views, _widthPt) = (prediction, prediction.Views, size.WidthPt);
        _others = [.. _views.Select(view => overlays ? view.LayerModelError : null)];
        double height = Math.Min(215, Math.Max(130, _widthPt * 0.62));
        int labels = EndLabels.Capacity(height - 40) / (HasOthers ? 2 : 1);
        _labelEvery = (int)Math.Ceiling(_views.Count / Math.Min(MostLabels, labels));
        double right = _widthPt - MarginPt - EndLabels.RoomPt(Enumerable.Range(0, _views.Count).Where(IsLabeled).SelectMany(Labels));
        double greatest = _views.Select(view => view.Reflectance).Concat(_others.OfType<LayerModelError>().Select(other => other.OtherReflectance)).Max(Greatest);
        _frame = PlotFrame.Within(Grid, greatest, new Box(MarginPt, MarginPt + Ink.SmallPt / 2, right, height), Quantity);
    }

    private string Quantity => _prediction.Conditions.Instrument switch
    {
        null => "Reflectance (%)",
        { Reference: SignalReference.WhiteStandard } => "Signal (% of white)",
        _ => "Signal (% of mirror)",
    };

    private WavelengthGrid Grid => _prediction.Conditions.Wavelengths;

    private bool HasOthers => _others.Any(other => other is not null);

    /// <summary>What the solver of the overlaid curves is called.</summary>
    private string OtherName => _prediction.IsRigorous ? "layer model" : "rigorous";

    /// <summary>Lays the figure out.</summary>
    /// <remarks>Curves are drawn in the predicted color, brought to a lightness that reads on white; the swatches hold the colors
    /// themselves. Overlaid curves, one beside each, are dashed, and their swatches lie under those of the others. Beyond twelve angles not every curve is labeled, and the note says so.</remarks>
    /// <exception cref="ArgumentException">The prediction has no view.</exception>
    public static Figure Draw(StructurePrediction prediction, FigureSize size, bool overlays = false)
    {
        ArgumentNullException.ThrowIfNull(prediction);
        if (prediction.Views.Count == 0)
            throw new ArgumentException("Must have at least one view.", nameof(prediction));
        return new Figure(new ReflectanceFigure(prediction, size, overlays).Compose());
    }

    private Page Compose()
    {
        (int View, string Label, Spectrum Reflectance, Stroke Stroke)[] curves = [.. Curves()];
        IReadOnlyList<int>[] samples = [.. curves.Select(curve => CurveTrace.Of(curve.Reflectance, _frame))];
        IReadOnlyList<Point>[] traces = [.. curves.Select((curve, i) => samples[i].Select(k => _frame.At(Grid.Nanometres[k], curve.Reflectance[k])).ToArray())];
        var marks = new List<PlotMark>();
        if (Ultraviolet is (double fromNm, double toNm))
            marks.Add(new PlotBand(fromNm, toNm, Ink.Tint));
        marks.AddRange(curves.Select((curve, i) => new PlotCurve([.. samples[i].Select(k => (Grid.Nanometres[k], PlotFrame.Percent(curve.Reflectance[k])))], curve.Stroke)));
        (SpectralPeak Peak, SrgbColor Color)[] peaks = [.. _views.Select(view => (Peak: PeakOf(view)!, CurveStyle.InkOf(view.Color))).Where(pair => pair.Peak is not null)];
        bool marksPeaks = _views.Count <= MostLabels;
        if (marksPeaks)
            marks.AddRange(peaks.Select(pair => new PlotPeak(pair.Peak.WavelengthNm, PlotFrame.Percent(pair.Peak.Reflectance), pair.Color)));
        _elements.Add(_frame.Panel(marks));
        NameUltraviolet(traces);
        _frame.Write(_elements);
        EndLabels.Draw(_elements, _frame.Plot, [.. curves.Select((curve, i) => (curve.Label, traces[i][^1], curve.Stroke)).Where((_, i) => IsLabeled(curves[i].View))]);
        bool allPeaks = marksPeaks && NamePeaks(traces, peaks);

        double bottom = _frame.Plot.Bottom + 26 + LabelGapPt;
        bottom = SwatchTable.Draw(_elements, _views, HasOthers ? (OtherName, _others) : null, allPeaks ? null : PeakOf, MarginPt, _widthPt - MarginPt, bottom);
        bottom = NoteBlock.Add(_elements, Notes(), MarginPt, _widthPt - MarginPt, bottom + LabelGapPt);
        return new Page($"Reflectance of {_prediction.Barbule.Name}", _widthPt, bottom + MarginPt, _elements);
    }

    /// <summary>A curve an angle, and where there are others, one of them behind each.</summary>
    private IEnumerable<(int View, string Label, Spectrum Reflectance, Stroke Stroke)> Curves()
    {
        for (int i = 0; i < _views.Count; i++)
        {
            string[] labels = [.. Labels(i)];
            // Dashes tell angles apart, or solvers.
            yield return (i, labels[0], _views[i].Reflectance, CurveStyle.Of(HasOthers ? 0 : i, _views[i].Color));
            if (_others[i] is LayerModelError other)
                yield return (i, labels[1], other.OtherReflectance, CurveStyle.OfOther(other.OtherColor));
        }
    }

    /// <summary>What is written beside the curves of a view; two solvers at one angle are told apart by their names.</summary>
    private IEnumerable<string> Labels(int view)
    {
        string angle = Degrees.Text(_views[view].Incidence);
        if (_others[view] is null)
            return [angle];
        return _views.Count == 1 ? [_prediction.IsRigorous ? "rigorous" : "layer model", OtherName] : [angle, $"{angle} {OtherName}"];
    }

    /// <summary>Wavelengths that birds see and people do not, as far as they are shown: they lie on light gray.</summary>
    private (double FromNm, double ToNm)? Ultraviolet
    {
        get
        {
            double from = Math.Max(SpectrumFeatures.UltravioletStartNm, _frame.StartNm), to = Math.Min(SpectrumFeatures.VisibleStartNm, _frame.StopNm);
            return to > from ? (from, to) : null;
        }
    }

    /// <summary>Names the gray where no curve runs.</summary>
    private void NameUltraviolet(IReadOnlyList<Point>[] traces)
    {
        if (Ultraviolet is not (double fromNm, double toNm))
            return;
        Box band = _frame.Plot with { Left = _frame.X(fromNm), Right = _frame.X(toNm) };
        for (double baseline = band.Top + Ink.SmallPt; baseline < band.Bottom; baseline += Ink.SmallPt)
        {
            var name = new TextRun("UV", new(band.Center.X, baseline), Ink.SmallPt, TextAlign.Middle, Ink.Note);
            bool isFree = band.Holds(name.Box.Grown(1)) && !traces.Any(trace => PeakLabels.Crosses(trace, name.Box.Grown(1)));
            if (isFree)
            {
                _elements.Add(name);
                return;
            }
        }
        _explainsTint = true;
    }

    /// <summary>False when a peak's wavelength found no place.</summary>
    private bool NamePeaks(IReadOnlyList<Point>[] traces, (SpectralPeak Peak, SrgbColor Color)[] found)
    {
        var labels = new PeakLabels(_frame.Plot with { Right = _frame.Plot.Right + LabelGapPt }, traces, _elements.OfType<TextRun>().Select(text => text.Box));
        (string Text, Point At, SrgbColor Color)[] peaks = [.. found.Select(pair => (Text(pair.Peak), _frame.At(pair.Peak.WavelengthNm, pair.Peak.Reflectance), pair.Color))];
        foreach ((_, Point at, _) in peaks)
            labels.KeepOff(at);
        // All or none: half of the wavelengths in the plot and half below would be hard to read.
        var written = new List<PageElement>();
        bool all = peaks.OrderBy(peak => peak.At.Y).All(peak => labels.TryWrite(written, peak.Text, peak.At, peak.Color));
        if (all)
            _elements.AddRange(written);
        return all;
    }

    private IEnumerable<string> Notes()
    {
        PredictionConditions conditions = _prediction.Conditions;
        string light = conditions.Polarization switch
        {
            Polarizations.Unpolarized => "unpolarized light",
            Polarizations.S => "s-polarized light",
            _ => "p-polarized light",
        };
        string quantity = conditions.Instrument is null ? "Specular reflectance" : "Signal of an instrument";
        yield return _views.Count == 1 && HasOthers ? $"{quantity} at {Degrees.Text(_views[0].Incidence)}, {light}." : $"{quantity}, {light}.";
        foreach (string sentence in SolverNotes())
            yield return sentence;
        if (_views.Any(view => view.Color is not null))
            yield return $"Colors: illuminant {conditions.Illuminant.Name}, CIE 1931 2° observer{SwatchFigure.Adaptation(conditions)}; {SwatchFigure.White(conditions)} is white.";
        string[] outside = [.. _views.Where(view => view.Color is { InSrgbGamut: false }).Select(view => Degrees.Text(view.Incidence))];
        if (outside.Length == _views.Count)
            yield return "They lie outside sRGB and are shown paler.";
        else if (outside.Length > 0)
            yield return $"Outside sRGB and shown paler: {(outside.Length <= 4 ? string.Join(", ", outside) : $"{outside.Length} of {_views.Count}")}.";
        if (_explainsTint)
            yield return "Gray: ultraviolet.";
        if (_labelEvery > 1)
            yield return string.Create(CultureInfo.InvariantCulture, $"{_views.Count} angles; one curve in {_labelEvery} is labeled, and the last.");
    }

    private IEnumerable<string> SolverNotes()
    {
        yield return _prediction.IsRigorous ? "Rigorous for this section (infinite, flat, perfectly periodic)."
            : _prediction.Mixing is string rule ? $"Layer model, {rule} mixing." : "Multilayer solver.";
        if (_others.OfType<LayerModelError>().FirstOrDefault() is LayerModelError other)
            yield return _prediction.IsRigorous ? $"Dashed: layer model, {other.Mixing} mixing." : "Dashed: rigorous for this section (infinite, flat, perfectly periodic).";
    }

    private bool IsLabeled(int view) => view % _labelEvery == 0 && view + _labelEvery / 2 < _views.Count - 1 || view == _views.Count - 1;

    /// <summary>The main peak; null where there is none, or it is too low to be told from the axis.</summary>
    private SpectralPeak? PeakOf(View view)
        => view.Features.MainPeak is SpectralPeak peak && 100 * peak.Reflectance > LeastPeakShare * _frame.TopPercent ? peak : null;

    private static string Text(SpectralPeak peak) => peak.WavelengthNm.ToString("0", CultureInfo.InvariantCulture) + " nm";

    private static double Greatest(Spectrum spectrum)
    {
        double greatest = 0;
        foreach (double value in spectrum.Values)
            greatest = Math.Max(greatest, value);
        return greatest;
    }
}

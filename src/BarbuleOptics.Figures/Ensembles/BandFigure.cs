using System.Globalization;
using BarbuleOptics.Color;
using BarbuleOptics.Ensembles;
using BarbuleOptics.Figures.Curves;
using BarbuleOptics.Figures.Drawing;
using BarbuleOptics.Figures.Layout;
using BarbuleOptics.Figures.Plots;
using BarbuleOptics.Prediction;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Figures.Ensembles;

/// <summary>Reflectance of draws: the middle 50 and 95 % at each wavelength and their median, one panel an angle.</summary>
internal sealed class BandFigure
{
    private const double MarginPt = 4;
    private const double GapPt = 8;

    /// <summary>Panels of one figure; of more angles the first, the middle and the last are shown.</summary>
    private const int MostPanels = 3;

    /// <summary>How far the tints of the bands go from the ink of the median to white.</summary>
    private const double OuterTint = 0.8, InnerTint = 0.55;

    private readonly EnsemblePrediction _ensemble;
    private readonly StructurePrediction _prediction;
    private readonly int[] _shown;
    private readonly double _widthPt;
    private readonly List<PageElement> _elements = [];

    private BandFigure(StructurePrediction prediction, EnsemblePrediction ensemble, FigureSize size)
    {
        (_prediction, _ensemble, _widthPt) = (prediction, ensemble, size.WidthPt);
        int count = ensemble.Views.Count;
        _shown = count <= MostPanels ? [.. Enumerable.Range(0, count)] : [0, count / 2, count - 1];
    }

    /// <summary>Lays the figure out.</summary>
    /// <param name="prediction">The mean geometry, dashed.</param>
    /// <param name="ensemble">Its draws.</param>
    /// <param name="size">Printed width.</param>
    public static Figure Draw(StructurePrediction prediction, EnsemblePrediction ensemble, FigureSize size) => new(new BandFigure(prediction, ensemble, size).Compose());

    private Page Compose()
    {
        double height = Math.Min(190, Math.Max(120, _widthPt * 0.55)), top = MarginPt + Ink.SmallPt / 2;
        double greatest = _shown.Max(view => Greatest(_ensemble.Views[view].Bands.To95));
        greatest = Math.Max(greatest, _shown.Max(view => Greatest(_prediction.Views[view].Reflectance)));
        foreach (int view in _shown)
        {
            PlotFrame frame = PlotFrame.Within(_prediction.Conditions.Wavelengths, greatest, new Box(MarginPt, top, _widthPt - MarginPt - Ink.LabelPt, top + height));
            AddPanel(frame, view);
            top = frame.Plot.Bottom + 26 + GapPt;
        }
        double bottom = NoteBlock.Add(_elements, Notes(), MarginPt, _widthPt - MarginPt, top);
        return new Page($"Reflectance of {_prediction.Barbule.Name} over its spread", _widthPt, bottom + MarginPt, _elements);
    }

    private void AddPanel(PlotFrame frame, int number)
    {
        DrawnView view = _ensemble.Views[number];
        SrgbColor ink = CurveStyle.InkOf(view.MeanColor);
        _elements.Add(frame.Panel(
        [
            Area(frame, view.Bands.From95, view.Bands.To95, Tint(ink, OuterTint)),
            Area(frame, view.Bands.From50, view.Bands.To50, Tint(ink, InnerTint)),
            Curve(frame, _prediction.Views[number].Reflectance, new Stroke(Ink.Text, 0.6, [3, 1.8])),
            Curve(frame, view.Bands.Median, new Stroke(ink, 1)),
        ]));
        frame.Write(_elements);
        if (_ensemble.Views.Count > 1)
            _elements.Add(new TextRun(Degrees.Text(view.Incidence), new(frame.Plot.Right - 3, frame.Plot.Top + Ink.LabelPt), Ink.SmallPt, TextAlign.End, Ink.Text));
    }

    private static PlotArea Area(PlotFrame frame, Spectrum low, Spectrum high, SrgbColor color)
    {
        int[] samples = [.. CurveTrace.Of(low, frame).Union(CurveTrace.Of(high, frame)).Order()];
        return new PlotArea([.. samples.Select(k => (low.Grid.Nanometres[k], PlotFrame.Percent(low[k]), PlotFrame.Percent(high[k])))], color);
    }

    private static PlotCurve Curve(PlotFrame frame, Spectrum values, Stroke stroke)
        => new([.. CurveTrace.Of(values, frame).Select(k => (values.Grid.Nanometres[k], PlotFrame.Percent(values[k])))], stroke);

    private IEnumerable<string> Notes()
    {
        string question = _ensemble.Options.Spread switch
        {
            Spread.Mean => "spread of the mean (how sure the measurements are)",
            Spread.Between => "spread between barbules",
            _ => "spread within a section, every row drawn by itself",
        };
        yield return string.Create(CultureInfo.InvariantCulture, $"Median (line), middle 50 % and 95 % (tints) of {_ensemble.Options.Draws} draws: {question}.");
        yield return "Dashed: mean geometry.";
        if (_shown.Length < _ensemble.Views.Count)
            yield return string.Create(CultureInfo.InvariantCulture, $"{_shown.Length} of {_ensemble.Views.Count} angles are shown.");
    }

    private static SrgbColor Tint(SrgbColor ink, double share)
        => new(Mixed(ink.Red, share), Mixed(ink.Green, share), Mixed(ink.Blue, share));

    private static byte Mixed(byte channel, double share) => (byte)Math.Round(channel + share * (255 - channel));

    private static double Greatest(Spectrum spectrum)
    {
        double greatest = 0;
        foreach (double value in spectrum.Values)
            greatest = Math.Max(greatest, value);
        return greatest;
    }
}

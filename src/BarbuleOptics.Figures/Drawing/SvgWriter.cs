using System.Globalization;
using System.Text;
using System.Xml;
using System.Xml.Linq;
using BarbuleOptics.Figures.Plots;

namespace BarbuleOptics.Figures.Drawing;

/// <summary>A page as SVG 1.1 with its size in mm.</summary>
/// <remarks>Text becomes outlines, since a reader's machine may lack the font or have none at all; the words stay beside them as
/// <c>aria-label</c>.</remarks>
internal sealed class SvgWriter
{
    private const string Namespace = "http://www.w3.org/2000/svg";

    private readonly XmlWriter _xml;
    private int _windows;

    private SvgWriter(XmlWriter xml) => _xml = xml;

    public static byte[] Write(Page page)
    {
        using var bytes = new MemoryStream();
        var settings = new XmlWriterSettings { Encoding = new UTF8Encoding(encoderShouldEmitUTF8Identifier: false), Indent = true, IndentChars = " ", NewLineChars = "\n" };
        using (var xml = XmlWriter.Create(bytes, settings))
            new SvgWriter(xml).Write(page, page.Title);
        bytes.WriteByte((byte)'\n');
        return bytes.ToArray();
    }

    private void Write(Page page, string title)
    {
        _xml.WriteStartElement("svg", Namespace);
        Attribute("version", "1.1");
        Attribute("width", Number(page.WidthMm) + "mm");
        Attribute("height", Number(page.HeightMm) + "mm");
        Attribute("viewBox", $"0 0 {Number(page.WidthPt)} {Number(page.HeightPt)}");
        Attribute("role", "img");
        _xml.WriteElementString("title", Namespace, title);
        Start("rect");
        Attribute("width", "100%");
        Attribute("height", "100%");
        Attribute("fill", "#ffffff");
        _xml.WriteEndElement();
        Write(page.Elements);
        _xml.WriteEndElement();
    }

    private void Write(IEnumerable<PageElement> elements)
    {
        foreach (PageElement element in elements)
            Write(element);
    }

    private void Write(PageElement element)
    {
        switch (element)
        {
            case FilledShape filled:
                Path(filled.Shape, filled.Color.Hex, null, null, null);
                break;
            case StrokedShape stroked:
                Path(stroked.Shape, "none", stroked.Stroke, stroked.Role, null);
                break;
            case TextRun text:
                Path(TextOutline.Of(text), text.Color.Hex, null, "text", text.Text);
                break;
            case PlotPanel panel:
                Plot(panel);
                break;
            case ClippedGroup group:
                Clipped(group);
                break;
        }
    }

    private void Clipped(ClippedGroup group)
    {
        string id = FormattableString.Invariant($"window{++_windows}");
        Start("clipPath");
        Attribute("id", id);
        Start("path");
        Attribute("d", Data(group.Window));
        _xml.WriteEndElement();
        _xml.WriteEndElement();
        Start("g");
        Attribute("clip-path", $"url(#{id})");
        Write(group.Elements);
        _xml.WriteEndElement();
    }

    private void Plot(PlotPanel panel)
    {
        foreach (PlotMark mark in panel.Marks)
            Layer(mark.Role, mark.Stroke?.Dash, PlotPainter.Svg(panel, mark));
        Layer("axes", null, PlotPainter.SvgAxes(panel));
    }

    /// <summary>Takes the elements of another document, which has the same scale; they inherit the dashes.</summary>
    private void Layer(string role, IReadOnlyList<double>? dash, byte[] document)
    {
        Start("g");
        Attribute("class", role);
        if (dash is not null)
            Attribute("stroke-dasharray", string.Join(' ', dash.Select(Number)));
        using var stream = new MemoryStream(document);
        foreach (XElement element in XDocument.Load(stream).Root!.Elements())
            element.WriteTo(_xml);
        _xml.WriteEndElement();
    }

    private void Path(Shape shape, string fill, Stroke? stroke, string? role, string? words)
    {
        Start("path");
        if (role is not null)
            Attribute("class", role);
        if (words is not null)
            Attribute("aria-label", words);
        Attribute("fill", fill);
        if (stroke is not null)
        {
            Attribute("stroke", stroke.Color.Hex);
            Attribute("stroke-width", Number(stroke.WidthPt));
            Attribute("stroke-linejoin", "round");
            if (stroke.Dash is not null)
                Attribute("stroke-dasharray", string.Join(' ', stroke.Dash.Select(Number)));
        }
        Attribute("d", Data(shape));
        _xml.WriteEndElement();
    }

    private static string Data(Shape shape)
    {
        var data = new StringBuilder();
        foreach (Step step in shape.Steps)
        {
            _ = step.Verb switch
            {
                Verb.Move => Append(data, 'M', step.A),
                Verb.Line => Append(data, 'L', step.A),
                Verb.Quad => Append(Append(data, 'Q', step.A), ' ', step.B),
                Verb.Cubic => Append(Append(Append(data, 'C', step.A), ' ', step.B), ' ', step.C),
                _ => data.Append('Z'),
            };
        }
        return data.ToString();
    }

    private static StringBuilder Append(StringBuilder data, char verb, Point point)
        => data.Append(verb).Append(Number(point.X)).Append(' ').Append(Number(point.Y));

    // A thousandth of a point is finer than any printer.
    private static string Number(double value)
    {
        double rounded = Math.Round(value, 3);
        return (rounded == 0 ? 0 : rounded).ToString("0.###", CultureInfo.InvariantCulture);
    }

    private void Start(string name) => _xml.WriteStartElement(name, Namespace);

    private void Attribute(string name, string value) => _xml.WriteAttributeString(name, value);
}

namespace BarbuleOptics.Figures.Drawing;

/// <summary>Lines and outlines of one or more parts.</summary>
internal sealed class Shape
{
    // Four cubic arcs follow a circle to 0.03 % of its radius with this reach of the control points (common practice, no source).
    private const double ArcReach = 0.5522847498;

    private readonly List<Step> _steps = [];

    public IReadOnlyList<Step> Steps => _steps;

    public bool IsEmpty => _steps.Count == 0;

    public static Shape Line(Point from, Point to) => new Shape().MoveTo(from).LineTo(to);

    public static Shape Polyline(IReadOnlyList<Point> points, bool closed = false)
    {
        Shape shape = new Shape().MoveTo(points[0]);
        for (int i = 1; i < points.Count; i++)
            shape.LineTo(points[i]);
        return closed ? shape.Close() : shape;
    }

    public static Shape Rectangle(Box box) => new Shape().AddRectangle(box);

    public static Shape Circle(Point center, double radius) => new Shape().AddEllipse(Box.Around(center, 2 * radius, 2 * radius));

    public Shape MoveTo(Point to) => Add(new Step(Verb.Move, to));

    public Shape LineTo(Point to) => Add(new Step(Verb.Line, to));

    public Shape Close() => Add(new Step(Verb.Close));

    public Shape AddLine(Point from, Point to) => MoveTo(from).LineTo(to);

    public Shape AddRectangle(Box box)
        => MoveTo(new(box.Left, box.Top)).LineTo(new(box.Right, box.Top)).LineTo(new(box.Right, box.Bottom)).LineTo(new(box.Left, box.Bottom)).Close();

    public Shape AddEllipse(Box box)
    {
        (double x, double y) = (box.Center.X, box.Center.Y);
        (double dx, double dy) = (box.Width / 2 * ArcReach, box.Height / 2 * ArcReach);
        return MoveTo(new(box.Right, y))
            .Add(new Step(Verb.Cubic, new(box.Right, y + dy), new(x + dx, box.Bottom), new(x, box.Bottom)))
            .Add(new Step(Verb.Cubic, new(x - dx, box.Bottom), new(box.Left, y + dy), new(box.Left, y)))
            .Add(new Step(Verb.Cubic, new(box.Left, y - dy), new(x - dx, box.Top), new(x, box.Top)))
            .Add(new Step(Verb.Cubic, new(x + dx, box.Top), new(box.Right, y - dy), new(box.Right, y)))
            .Close();
    }

    public Shape Add(Step step)
    {
        _steps.Add(step);
        return this;
    }
}

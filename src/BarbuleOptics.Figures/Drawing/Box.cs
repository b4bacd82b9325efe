namespace BarbuleOptics.Figures.Drawing;

/// <summary>A rectangle on the page, in points.</summary>
internal readonly record struct Box(double Left, double Top, double Right, double Bottom)
{
    public double Width => Right - Left;

    public double Height => Bottom - Top;

    public Point Center => new((Left + Right) / 2, (Top + Bottom) / 2);

    public static Box Around(Point center, double width, double height)
        => new(center.X - width / 2, center.Y - height / 2, center.X + width / 2, center.Y + height / 2);

    public Box Grown(double by) => new(Left - by, Top - by, Right + by, Bottom + by);

    public Box Moved(double x, double y) => new(Left + x, Top + y, Right + x, Bottom + y);

    /// <summary>Whether the insides have a point in common; sides may touch.</summary>
    public bool Overlaps(Box other) => Left < other.Right && other.Left < Right && Top < other.Bottom && other.Top < Bottom;

    public bool Holds(Box other) => other.Left >= Left && other.Right <= Right && other.Top >= Top && other.Bottom <= Bottom;

    /// <summary>Whether any part of the line from <paramref name="a"/> to <paramref name="b"/> lies inside.</summary>
    public bool Meets(Point a, Point b)
    {
        // Liang and Barsky: the share of the line that each side leaves.
        double from = 0, to = 1;
        return Keeps(a.X - b.X, a.X - Left, ref from, ref to) && Keeps(b.X - a.X, Right - a.X, ref from, ref to)
            && Keeps(a.Y - b.Y, a.Y - Top, ref from, ref to) && Keeps(b.Y - a.Y, Bottom - a.Y, ref from, ref to);
    }

    private static bool Keeps(double direction, double distance, ref double from, ref double to)
    {
        if (direction == 0)
            return distance > 0;
        double share = distance / direction;
        if (direction < 0)
            from = Math.Max(from, share);
        else
            to = Math.Min(to, share);
        return from < to;
    }
}

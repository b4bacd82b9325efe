using BarbuleOptics.Vision;

namespace BarbuleOptics.Figures.Colors;

/// <summary>One way to look at the tetrahedron: x runs to the right, and y or z upward.</summary>
/// <param name="Up">The coordinate that runs upward.</param>
/// <param name="Above">How far the view reaches above its center.</param>
/// <param name="Edges">The edges; those behind are hidden.</param>
/// <param name="Names">The corners with their names, which stand under or over them.</param>
internal sealed record SpaceView(
    Func<TetrahedralColor, double> Up, double Above, IReadOnlyList<(TetrahedralColor From, TetrahedralColor To, bool Hidden)> Edges,
    IReadOnlyList<(string Name, TetrahedralColor Corner, bool Under)> Names)
{
    /// <summary>Width of both views: the distance of two corners.</summary>
    public static double Width => Corner(3).X - Corner(1).X;

    /// <summary>Height of the higher view.</summary>
    public static double Height => Corner(2).Y - Corner(1).Y;

    /// <summary>From the corner of the shortest cone, which lies over gray: hue without the shortest cone's share.</summary>
    public static SpaceView FromAbove(VisualSystem eye)
        => new(
            place => place.Y, Corner(2).Y,
            [(Corner(1), Corner(2), false), (Corner(2), Corner(3), false), (Corner(3), Corner(1), false), (Corner(0), Corner(1), false), (Corner(0), Corner(2), false), (Corner(0), Corner(3), false)],
            [(eye.ConeNames[1], Corner(1), true), (eye.ConeNames[2], Corner(2), false), (eye.ConeNames[3], Corner(3), true)]);

    /// <summary>From the front, opposite the medium cone: how much the shortest cone has, upward.</summary>
    public static SpaceView FromFront(VisualSystem eye)
        => new(
            place => place.Z, Corner(0).Z,
            [(Corner(0), Corner(1), false), (Corner(1), Corner(3), false), (Corner(3), Corner(0), false), (Corner(0), Corner(2), true)],
            [(eye.ConeNames[1], Corner(1), true), (eye.ConeNames[2], Corner(2), true), (eye.ConeNames[3], Corner(3), true), (eye.ConeNames[0], Corner(0), false)]);

    private static TetrahedralColor Corner(int cone)
    {
        Span<double> catches = stackalloc double[VisualSystem.SingleCount];
        catches.Clear();
        catches[cone] = 1;
        return new TetrahedralColor(catches);
    }
}

using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>A point of an outline with its outward normal, in nm, and its share of the outline's length in the first quadrant.</summary>
internal readonly record struct OutlinePoint(double X, double Z, double NormalX, double NormalZ, double Length);

/// <summary>An ellipse about the origin, its axes along x and z.</summary>
/// <remarks>Points x + i z = (a + b)/2 exp(d + i t) + (a - b)/2 exp(-d - i t) lie on it for d = 0 and on confocal ellipses elsewhere; for circles on
/// concentric ones.</remarks>
internal readonly record struct EllipseOutline(double HalfWidthNm, double HalfHeightNm)
{
    /// <summary>How far d can go inward: there the ellipse has shrunk to the line between its foci. Infinite for circles.</summary>
    public double FocalDistance => HalfWidthNm == HalfHeightNm
        ? double.PositiveInfinity
        : 0.5 * Math.Log((HalfWidthNm + HalfHeightNm) / Math.Abs(HalfWidthNm - HalfHeightNm));

    /// <summary>Points in the first quadrant, equally spaced in t and half a step off the axes.</summary>
    public OutlinePoint[] Quadrant(int count, double distance)
    {
        var points = new OutlinePoint[count];
        double sum = (HalfWidthNm + HalfHeightNm) / 2, difference = (HalfWidthNm - HalfHeightNm) / 2;
        for (int i = 0; i < count; i++)
        {
            Complex turn = Complex.Exp(new Complex(distance, (i + 0.5) * Math.PI / (2 * count)));
            Complex at = sum * turn + difference / turn, normal = sum * turn - difference / turn;
            double stretch = normal.Magnitude;
            points[i] = new OutlinePoint(
                at.Real, at.Imaginary, normal.Real / stretch, normal.Imaginary / stretch, stretch * Math.PI / (2 * count));
        }
        return points;
    }
}

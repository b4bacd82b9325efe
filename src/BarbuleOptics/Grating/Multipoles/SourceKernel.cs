using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>Fields that line sources in four mirrored places make at points of the first quadrant: value, normal and tangential derivative of
/// H_0(k r), for each of the four symmetries.</summary>
/// <remarks>Symmetry 2 z + x, z = 0 for even and 1 for odd in z, x likewise. The tangent turns the normal by 90 degrees towards theta.</remarks>
internal sealed class SourceKernel(OutlinePoint[] points, OutlinePoint[] sources)
{
    private readonly Complex[] _values = new Complex[4 * points.Length * sources.Length];
    private readonly Complex[] _normals = new Complex[4 * points.Length * sources.Length];
    private readonly Complex[] _tangents = new Complex[4 * points.Length * sources.Length];
    private readonly CylinderFunctions _functions = new();

    /// <summary>Value of source <paramref name="source"/> at point <paramref name="point"/>.</summary>
    public Complex Value(int symmetry, int point, int source) => _values[Place(symmetry, point, source)];

    /// <summary>Derivative along the normal, in 1/nm.</summary>
    public Complex Normal(int symmetry, int point, int source) => _normals[Place(symmetry, point, source)];

    /// <summary>Derivative along the tangent, in 1/nm.</summary>
    public Complex Tangent(int symmetry, int point, int source) => _tangents[Place(symmetry, point, source)];

    /// <summary>Fills all tables for one wave number.</summary>
    public void Fill(Complex k)
    {
        Span<Complex> values = stackalloc Complex[4], normals = stackalloc Complex[4], tangents = stackalloc Complex[4];
        for (int p = 0; p < points.Length; p++)
        {
            for (int s = 0; s < sources.Length; s++)
            {
                for (int image = 0; image < 4; image++)
                    FillImage(k, points[p], sources[s], image, values, normals, tangents);
                for (int symmetry = 0; symmetry < 4; symmetry++)
                {
                    int place = Place(symmetry, p, s);
                    (_values[place], _normals[place], _tangents[place]) = (Sum(values, symmetry), Sum(normals, symmetry), Sum(tangents, symmetry));
                }
            }
        }
    }

    private void FillImage(
        Complex k, in OutlinePoint point, in OutlinePoint source, int image, Span<Complex> values, Span<Complex> normals, Span<Complex> tangents)
    {
        double dx = point.X - ((image & 1) == 0 ? source.X : -source.X), dz = point.Z - ((image & 2) == 0 ? source.Z : -source.Z);
        double r = Math.Sqrt(dx * dx + dz * dz);
        _functions.Set(k * r, 1);
        double decay = Math.Exp(-k.Imaginary * r);
        Complex slope = decay / (r * r) * _functions.HSlope[0];
        values[image] = decay * _functions.H[0];
        normals[image] = slope * (dx * point.NormalX + dz * point.NormalZ);
        tangents[image] = slope * (dz * point.NormalX - dx * point.NormalZ);
    }

    private static Complex Sum(ReadOnlySpan<Complex> images, int symmetry)
    {
        double x = (symmetry & 1) == 0 ? 1 : -1, z = (symmetry & 2) == 0 ? 1 : -1;
        return images[0] + x * images[1] + z * (images[2] + x * images[3]);
    }

    private int Place(int symmetry, int point, int source) => (symmetry * points.Length + point) * sources.Length + source;
}

using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Modal;

/// <summary>One depth of a slab: its walls, the materials between them, and the Fourier coefficients that follow.</summary>
/// <remarks>Coefficient k of f is the mean of f(x) exp(-i 2 pi k x / P) over the period.</remarks>
internal sealed class SlabCut
{
    /// <summary>Walls closer than this share of the period are one wall.</summary>
    private const double SameWall = 1e-10;

    private readonly SlabShape _shape;
    private readonly Wall[] _walls;
    private readonly int[] _materials;
    private readonly double[] _halfChords;
    private readonly double[] _halfCores;

    /// <summary>Scratch for the cuts of <paramref name="shape"/>.</summary>
    public SlabCut(SlabShape shape)
    {
        _shape = shape;
        int most = 4 * shape.Bodies.Length;
        _walls = new Wall[most + 1];
        _materials = new int[most + 1];
        _halfChords = new double[shape.Bodies.Length];
        _halfCores = new double[shape.Bodies.Length];
    }

    /// <summary>Number of walls; 0 where one material fills the period.</summary>
    public int WallCount { get; private set; }

    /// <summary>The walls from left to right.</summary>
    public ReadOnlySpan<Wall> Walls => _walls.AsSpan(0, WallCount);

    /// <summary>The material at a place along the surface.</summary>
    public int MaterialAt(double xNm)
    {
        int material = Section.Matrix;
        for (int b = 0; b < _halfChords.Length; b++)
        {
            if (_halfChords[b] == 0)
                continue;
            double away = Math.Abs(Math.IEEERemainder(xNm - _shape.Bodies[b].XNm, _shape.PeriodNm));
            if (away < _halfChords[b])
                material = away < _halfCores[b] ? _shape.Bodies[b].Body.CoreMaterial : _shape.Bodies[b].Body.Material;
        }
        return material;
    }

    /// <summary>The material between the walls around a place that is none of them; where bodies touch there is no wall.</summary>
    public int MaterialBetween(double xNm)
    {
        if (WallCount == 0)
            return OnlyMaterial;
        double place = Wrap(xNm);
        int wall = WallCount - 1;
        for (int w = 0; w < WallCount && _walls[w].XNm <= place; w++)
            wall = w;
        return _materials[wall];
    }

    /// <summary>The material right of a wall.</summary>
    public int MaterialRightOf(int wall) => _materials[wall];

    /// <summary>Place of the wall right of one, counted on beyond the period, in nm.</summary>
    public double NextXNm(int wall) => wall + 1 < WallCount ? _walls[wall + 1].XNm : _walls[0].XNm + _shape.PeriodNm;

    /// <summary>Cuts at a depth below the slab's top, in nm, within <paramref name="interval"/>, its ends included.</summary>
    public void Set(SlabInterval interval, double zNm)
    {
        Array.Clear(_halfChords);
        Array.Clear(_halfCores);
        WallCount = 0;
        foreach (int body in interval.Outers)
            _halfChords[body] = AddWalls(_shape.Bodies[body], _shape.Bodies[body].Body.Outer, zNm);
        foreach (int body in interval.Cores)
            _halfCores[body] = AddWalls(_shape.Bodies[body], _shape.Bodies[body].Body.Core!.Value, zNm);
        _walls.AsSpan(0, WallCount).Sort(static (first, second) => first.XNm.CompareTo(second.XNm));
        JoinTouchingWalls();
        for (int w = 0; w < WallCount; w++)
            _materials[w] = MaterialAt((_walls[w].XNm + NextXNm(w)) / 2);
        OnlyMaterial = WallCount == 0 ? Section.Matrix : _materials[0];
        DropWallsWithin();
    }

    /// <summary>The only material, where there is no wall.</summary>
    public int OnlyMaterial { get; private set; }

    /// <summary>Whether a material is met.</summary>
    public bool Meets(int material) => WallCount == 0 ? material == OnlyMaterial : _materials.AsSpan(0, WallCount).Contains(material);

    /// <summary>Coefficients -(length - 1)/2 to (length - 1)/2 of what is 1 within a material and 0 elsewhere.</summary>
    public void TransformInside(int material, Span<Complex> inside)
    {
        inside.Clear();
        int zero = inside.Length / 2;
        if (WallCount == 0)
        {
            inside[zero] = OnlyMaterial == material ? 1 : 0;
            return;
        }
        for (int w = 0; w < WallCount; w++)
        {
            if (_materials[w] != material)
                continue;
            double length = NextXNm(w) - _walls[w].XNm, middle = _walls[w].XNm + length / 2, share = length / _shape.PeriodNm;
            inside[zero] += share;
            for (int k = 1; k <= zero; k++)
            {
                (double sin, double cos) = Math.SinCos(2 * Math.PI * k * middle / _shape.PeriodNm);
                double size = share * Sinc(Math.PI * k * share);
                inside[zero + k] += size * new Complex(cos, -sin);
                inside[zero - k] += size * new Complex(cos, sin);
            }
        }
    }

    /// <summary>Coefficients of smooth continuations of the normal's n_x^2 and n_x n_z between the walls, right at every wall.</summary>
    public void TransformNormals(Span<Complex> xx, Span<Complex> xz)
    {
        xx.Clear();
        xz.Clear();
        int zero = xx.Length / 2;
        for (int w = 0; w < WallCount; w++)
        {
            Wall left = _walls[w], right = _walls[w + 1 < WallCount ? w + 1 : 0];
            double length = NextXNm(w) - left.XNm, middle = left.XNm + length / 2;
            double share = length / _shape.PeriodNm;
            double changeXX = right.NormalXX - left.NormalXX, changeXZ = right.NormalXZ - left.NormalXZ;
            xx[zero] += share * (left.NormalXX + right.NormalXX) / 2;
            xz[zero] += share * (left.NormalXZ + right.NormalXZ) / 2;
            for (int k = 1; k <= zero; k++)
            {
                (double sin, double cos) = Math.SinCos(2 * Math.PI * k * middle / _shape.PeriodNm);
                double shape = Ramp(2 * Math.PI * k * share) / (2 * Math.PI * k);
                xx[zero + k] += changeXX * shape * new Complex(-sin, -cos);
                xx[zero - k] += changeXX * shape * new Complex(-sin, cos);
                xz[zero + k] += changeXZ * shape * new Complex(-sin, -cos);
                xz[zero - k] += changeXZ * shape * new Complex(-sin, cos);
            }
        }
    }

    /// <summary>The same, and of that times the continued n_x^2 and n_x n_z.</summary>
    /// <returns>False where the material is not met.</returns>
    public bool TransformInside(int material, Span<Complex> inside, Span<Complex> insideXX, Span<Complex> insideXZ)
    {
        inside.Clear();
        insideXX.Clear();
        insideXZ.Clear();
        int zero = inside.Length / 2;
        if (WallCount == 0)
        {
            inside[zero] = OnlyMaterial == material ? 1 : 0;
            return OnlyMaterial == material;
        }
        bool isMet = false;
        for (int w = 0; w < WallCount; w++)
        {
            if (_materials[w] != material)
                continue;
            isMet = true;
            Wall left = _walls[w], right = _walls[w + 1 < WallCount ? w + 1 : 0];
            double length = NextXNm(w) - left.XNm, middle = left.XNm + length / 2, share = length / _shape.PeriodNm;
            for (int k = -zero; k <= zero; k++)
            {
                (double sin, double cos) = Math.SinCos(2 * Math.PI * k * middle / _shape.PeriodNm);
                double beta = 2 * Math.PI * k * share;
                var phase = new Complex(cos, -sin);
                Complex flat = share * Sinc(beta / 2) * phase;
                // The ramp is the mean of both ends plus half their difference times cos(pi t), t from 0 to 1.
                Complex wave = share * Wave(beta) * Complex.ImaginaryOne * phase;
                inside[zero + k] += flat;
                insideXX[zero + k] += (left.NormalXX + right.NormalXX) / 2 * flat + (left.NormalXX - right.NormalXX) / 2 * wave;
                insideXZ[zero + k] += (left.NormalXZ + right.NormalXZ) / 2 * flat + (left.NormalXZ - right.NormalXZ) / 2 * wave;
            }
        }
        return isMet;
    }

    // Mean of (pi/2) sin(pi t) exp(-i beta (t - 1/2)) over t from 0 to 1: what the slope of a cosine ramp turns into.
    private static double Ramp(double beta)
    {
        double difference = Math.PI * Math.PI - beta * beta;
        return Math.Abs(difference) < 1e-6 ? Math.PI / 4 : Math.PI * Math.PI * Math.Cos(beta / 2) / difference;
    }

    // Mean of cos(pi t) exp(-i beta (t - 1/2)) over t from 0 to 1, divided by i.
    private static double Wave(double beta) => Sinc((Math.PI - beta) / 2) / 2 - Sinc((Math.PI + beta) / 2) / 2;

    private static double Sinc(double x) => x == 0 ? 1 : Math.Sin(x) / x;

    private double AddWalls(PlacedOutline placed, in Outline outline, double zNm)
    {
        double u = Math.Clamp((zNm - placed.CenterNm) / outline.HalfHeightNm, -1, 1);
        double a = outline.HalfWidthNm, b = outline.HalfHeightNm, half = a, xx = 1, xz = 0;
        if (outline.Shape == OutlineShape.Ellipse)
        {
            double cos = Math.Sqrt((1 - u) * (1 + u));
            half = a * cos;
            double nx = cos / a, nz = u / b, scale = nx * nx + nz * nz;
            (xx, xz) = (nx * nx / scale, nx * nz / scale);
        }
        if (half < SameWall * _shape.PeriodNm)
            return 0;
        _walls[WallCount++] = new Wall(Wrap(placed.XNm - half), xx, -xz);
        _walls[WallCount++] = new Wall(Wrap(placed.XNm + half), xx, xz);
        return half;
    }

    // Bodies that touch side by side share one wall, with the mean of their normals.
    private void JoinTouchingWalls()
    {
        int kept = 0;
        for (int w = 0; w < WallCount; w++)
        {
            if (kept > 0 && _walls[w].XNm - _walls[kept - 1].XNm < SameWall * _shape.PeriodNm)
                _walls[kept - 1] = Mean(_walls[kept - 1], _walls[w]);
            else
                _walls[kept++] = _walls[w];
        }
        if (kept > 1 && _walls[0].XNm + _shape.PeriodNm - _walls[kept - 1].XNm < SameWall * _shape.PeriodNm)
        {
            _walls[0] = Mean(_walls[0], _walls[kept - 1]);
            kept--;
        }
        WallCount = kept;
    }

    private void DropWallsWithin()
    {
        int kept = 0, before = WallCount == 0 ? 0 : _materials[WallCount - 1];
        for (int w = 0; w < WallCount; w++)
        {
            int right = _materials[w];
            if (right != before)
            {
                _walls[kept] = _walls[w];
                _materials[kept++] = right;
            }
            before = right;
        }
        WallCount = kept;
    }

    private static Wall Mean(Wall first, Wall second)
        => new(first.XNm, (first.NormalXX + second.NormalXX) / 2, (first.NormalXZ + second.NormalXZ) / 2);

    private double Wrap(double xNm) => xNm - _shape.PeriodNm * Math.Floor(xNm / _shape.PeriodNm);
}

using System.Numerics;
using BarbuleOptics.Grating;
using MathNet.Numerics;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Factorization;
using Strengths = MathNet.Numerics.LinearAlgebra.Vector<System.Numerics.Complex>;

namespace BarbuleOptics.Tests.Grating;

/// <summary>An independent solution of rows of round or elliptical bodies: the method of fundamental solutions. Line sources off each
/// outline stand for the fields on its other side, their strengths follow from the continuity of both fields and both
/// normal fluxes at points of the outlines, in the sense of least squares. Knows no multipoles, no lattice sums and no polar coordinates.</summary>
/// <remarks>Sources of the matrix repeat along the row and are summed one by one, which needs an absorbing matrix.
/// Source: Fairweather and Karageorghis, Adv. Comput. Math. 9 (1998) 69 (from memory).</remarks>
internal sealed class FundamentalSolutions(GratingWaves waves, FundamentalSolutions.Body[] bodies, int sources, double offset)
{
    /// <summary>One body of the cell, with an optional concentric core of half axes above 0.</summary>
    public readonly record struct Body(
        double XNm, double ZNm, double HalfWidthNm, double HalfHeightNm, double CoreHalfWidthNm, double CoreHalfHeightNm, int Material, int CoreMaterial);

    private readonly record struct Point(double X, double Z, double NormalX, double NormalZ);

    private readonly record struct Waves(Complex Value, Complex X, Complex Z);

    /// <summary>A family of sources that radiates into one medium.</summary>
    private sealed record Family(Point[] Places, Complex Permittivity, bool IsPeriodic, int Start);

    /// <summary>An outline and the families that make the fields on its sides.</summary>
    private sealed record Outline(Point[] Points, List<Family> Outside, List<Family> Inside);

    private readonly List<Family> _families = [];
    private readonly List<Outline> _outlines = [];
    private Matrix<Complex>? _matrix;
    private QR<Complex>? _factors;

    /// <summary>The misfit of the continuity conditions, relative to the incident fields.</summary>
    public double Residual { get; private set; }

    /// <summary>Amplitudes above (at z = 0, upward) and below (at z = 0, downward, without the incident wave) of all channels, for a
    /// downward wave of one channel with amplitude 1 at z = 0.</summary>
    public (Complex[] Above, Complex[] Below) Solve(int channel)
    {
        _matrix ??= Assemble();
        _factors ??= _matrix.QR();
        Strengths right = Right(channel);
        Strengths strengths = _factors.Solve(right);
        Residual = (_matrix * strengths - right).L2Norm() / right.L2Norm();
        var above = new Complex[waves.ChannelCount];
        var below = new Complex[waves.ChannelCount];
        foreach (Family family in _families.Where(family => family.IsPeriodic))
        {
            for (int i = 0; i < family.Places.Length; i++)
            {
                for (int c = 0; c < waves.ChannelCount; c++)
                {
                    int n = c % waves.OrderCount, field = FieldOf(c);
                    Point at = family.Places[i];
                    Complex strength = strengths[family.Start + FieldCount * i + Math.Min(field, FieldCount - 1)];
                    Complex gain = 2 / (waves.PeriodNm * waves.Kz[n]) * Complex.Exp(new Complex(0, -waves.Kx[n] * at.X)) * strength;
                    above[c] += gain * Complex.Exp(Complex.ImaginaryOne * waves.Kz[n] * at.Z);
                    below[c] += gain * Complex.Exp(-Complex.ImaginaryOne * waves.Kz[n] * at.Z);
                }
            }
        }
        return (above, below);
    }

    private int FieldCount => waves.Field == RodField.Both ? 2 : 1;

    private int FieldOf(int channel) => waves.Field == RodField.Both ? channel / waves.OrderCount : waves.Field == RodField.Electric ? 0 : 1;

    private Matrix<Complex> Assemble()
    {
        var inMatrix = new List<Family>();
        int start = 0;
        foreach (Body body in bodies)
        {
            Complex material = waves.Permittivities[body.Material];
            inMatrix.Add(Add(Places(body, false, sources, -offset), waves.Matrix, true, ref start));
            var inRod = new List<Family> { Add(Places(body, false, sources, offset), material, false, ref start) };
            _outlines.Add(new Outline(Places(body, false, 2 * sources, 0), inMatrix, inRod));
            if (body.CoreHalfWidthNm > 0)
            {
                inRod.Add(Add(Places(body, true, sources, -offset), material, false, ref start));
                Family inCore = Add(Places(body, true, sources, offset), waves.Permittivities[body.CoreMaterial], false, ref start);
                _outlines.Add(new Outline(Places(body, true, 2 * sources, 0), inRod, [inCore]));
            }
        }
        Matrix<Complex> matrix = Matrix<Complex>.Build.Dense(2 * FieldCount * _outlines.Sum(outline => outline.Points.Length), start);
        int row = 0;
        foreach (Outline outline in _outlines)
        {
            foreach (Point point in outline.Points)
            {
                foreach (Family family in outline.Outside)
                    AddSources(matrix, row, point, family, 1);
                foreach (Family family in outline.Inside)
                    AddSources(matrix, row, point, family, -1);
                row += 2 * FieldCount;
            }
        }
        return matrix;
    }

    private Strengths Right(int channel)
    {
        Strengths right = Strengths.Build.Dense(_matrix!.RowCount);
        int row = 0;
        foreach (Outline outline in _outlines)
        {
            foreach (Point point in outline.Points)
            {
                if (outline.Outside[0].IsPeriodic)
                    AddIncident(right, row, point, channel);
                row += 2 * FieldCount;
            }
        }
        return right;
    }

    private Family Add(Point[] places, Complex permittivity, bool isPeriodic, ref int start)
    {
        var family = new Family(places, permittivity, isPeriodic, start);
        start += FieldCount * places.Length;
        _families.Add(family);
        return family;
    }

    // x + i z = (a + b)/2 exp(d + i t) + (a - b)/2 exp(-d - i t): confocal ellipses, or circles.
    private static Point[] Places(in Body body, bool core, int count, double d)
    {
        double a = core ? body.CoreHalfWidthNm : body.HalfWidthNm, b = core ? body.CoreHalfHeightNm : body.HalfHeightNm;
        var points = new Point[count];
        for (int i = 0; i < count; i++)
        {
            Complex turn = Complex.Exp(new Complex(d, 2 * Math.PI * i / count));
            Complex at = (a + b) / 2 * turn + (a - b) / 2 / turn, normal = (a + b) / 2 * turn - (a - b) / 2 / turn;
            normal /= normal.Magnitude;
            points[i] = new Point(body.XNm + at.Real, body.ZNm + at.Imaginary, normal.Real, normal.Imaginary);
        }
        return points;
    }

    private void AddSources(Matrix<Complex> matrix, int row, Point point, Family family, double sign)
    {
        for (int i = 0; i < family.Places.Length; i++)
        {
            Waves kernel = Kernel(point, family.Places[i], family);
            for (int f = 0; f < FieldCount; f++)
            {
                int field = waves.Field == RodField.Magnetic ? 1 : f;
                AddConditions((condition, value) => matrix[row + condition, family.Start + FieldCount * i + f] += sign * value, point, family.Permittivity, kernel, field);
            }
        }
    }

    private void AddIncident(Strengths right, int row, Point point, int channel)
    {
        int n = channel % waves.OrderCount;
        Complex value = Complex.Exp(Complex.ImaginaryOne * (waves.Kx[n] * point.X + waves.Kz[n] * point.Z));
        var wave = new Waves(value, Complex.ImaginaryOne * waves.Kx[n] * value, Complex.ImaginaryOne * waves.Kz[n] * value);
        AddConditions((condition, share) => right[row + condition] -= share, point, waves.Matrix, wave, FieldOf(channel));
    }

    // Conditions: the fields, then the normal fluxes of a grad E + c J grad H and b grad H - c J grad E, (J g) = (-g_z, g_x).
    private void AddConditions(Action<int, Complex> add, Point point, Complex permittivity, Waves wave, int field)
    {
        Complex q = waves.AcrossSquared(permittivity);
        Complex weight = waves.K0 * waves.K0 / q * (field == 0 ? permittivity : 1), cross = waves.K0 * waves.Ky / q;
        Complex normal = wave.X * point.NormalX + wave.Z * point.NormalZ, turned = wave.X * point.NormalZ - wave.Z * point.NormalX;
        int own = FieldCount == 2 ? field : 0;
        double scale = 1 / waves.K0;
        add(own, wave.Value);
        add(FieldCount + own, weight * normal * scale);
        if (FieldCount == 2)
            add(FieldCount + 1 - field, (field == 0 ? -cross : cross) * turned * scale);
    }

    private Waves Kernel(Point at, Point source, Family family)
    {
        Complex k = Complex.Sqrt(waves.AcrossSquared(family.Permittivity));
        if (k.Imaginary < 0)
            k = -k;
        double dx = at.X - source.X, dz = at.Z - source.Z;
        if (!family.IsPeriodic)
            return Line(k, dx, dz, Complex.One);
        int reach = (int)(34 / (k.Imaginary * waves.PeriodNm)) + 2;
        Complex value = 0, x = 0, z = 0;
        for (int j = -reach; j <= reach; j++)
        {
            Waves image = Line(k, dx - j * waves.PeriodNm, dz, Complex.Exp(new Complex(0, waves.Kx0 * j * waves.PeriodNm)));
            (value, x, z) = (value + image.Value, x + image.X, z + image.Z);
        }
        return new Waves(value, x, z);
    }

    private static Waves Line(Complex k, double dx, double dz, Complex phase)
    {
        double r = Math.Sqrt(dx * dx + dz * dz);
        Complex slope = -k * SpecialFunctions.HankelH1(1, k * r) * phase / r;
        return new Waves(SpecialFunctions.HankelH1(0, k * r) * phase, slope * dx, slope * dz);
    }
}

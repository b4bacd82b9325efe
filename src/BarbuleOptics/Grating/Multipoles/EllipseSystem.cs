using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>The equations of one elliptical body for a number of sources; see <see cref="EllipseScatterer"/>.</summary>
internal sealed class EllipseSystem
{
    private readonly bool _hasCore;
    private readonly int _material;
    private readonly int _coreMaterial;
    private readonly double _radiusNm;
    private readonly OutlinePoint[] _points;
    private readonly OutlinePoint[] _corePoints = [];
    private readonly OutlinePoint[] _sources;
    private readonly Link[] _links;
    private readonly CylinderFunctions[] _atPoints;
    private readonly CylinderFunctions[] _atSources;
    private readonly RodMedium[] _media = new RodMedium[3];
    private Complex _k;

    /// <summary>The equations for <paramref name="count"/> sources on a quarter of each ellipse and multipoles 0 to <paramref name="top"/>.</summary>
    public EllipseSystem(EllipseOutline outline, EllipseOutline core, int material, int coreMaterial, int count, int top)
    {
        (_hasCore, _material, _coreMaterial, SourceCount, Top) = (core.HalfWidthNm > 0, material, coreMaterial, count, top);
        _radiusNm = Math.Max(outline.HalfWidthNm, outline.HalfHeightNm);
        int points = count + (count + 2) / 3;
        double inward = Inward(outline), coreInward = Inward(core);
        _points = outline.Quadrant(points, 0);
        _sources = outline.Quadrant(count, -inward);
        OutlinePoint[] around = outline.Quadrant(count, inward);
        _links = [new Link(0, 0, 0, 1, _points, _sources), new Link(0, 1, 1, -1, _points, around)];
        if (_hasCore)
        {
            _corePoints = core.Quadrant(points, 0);
            OutlinePoint[] inCore = core.Quadrant(count, -coreInward), aroundCore = core.Quadrant(count, coreInward);
            _links = [.. _links, new Link(0, 2, 1, -1, _points, inCore), new Link(1, 1, 1, 1, _corePoints, around), new Link(1, 2, 1, 1, _corePoints, inCore),
                new Link(1, 3, 2, -1, _corePoints, aroundCore)];
        }
        _atPoints = Array.ConvertAll(_points, _ => new CylinderFunctions());
        _atSources = Array.ConvertAll(_sources, _ => new CylinderFunctions());
    }

    /// <summary>A family of sources seen from an outline.</summary>
    private sealed class Link(int outline, int family, int medium, int sign, OutlinePoint[] points, OutlinePoint[] sources)
    {
        public int Outline { get; } = outline;

        public int Family { get; } = family;

        public int Medium { get; } = medium;

        public int Sign { get; } = sign;

        public SourceKernel Kernel { get; } = new(points, sources);
    }

    /// <summary>Sources on a quarter of each ellipse.</summary>
    public int SourceCount { get; }

    /// <summary>Largest multipole.</summary>
    public int Top { get; }

    /// <summary>A number of sources to begin with.</summary>
    public static int SourcesFor(EllipseOutline outline, EllipseOutline core, int top)
    {
        double distance = core.HalfWidthNm > 0 ? Math.Min(Inward(outline), Inward(core)) : Inward(outline);
        return Math.Max(5 + top / 3, (int)(3 / distance));
    }

    // Close to the line between the foci, where the field outside has its ends; not farther than a radius shrunk by exp(-0.8).
    private static double Inward(EllipseOutline outline) => Math.Min(0.8, 0.85 * outline.FocalDistance);

    /// <summary>Fills the tables of one wavelength.</summary>
    public void Prepare(GratingWaves waves)
    {
        Span<Complex> k = stackalloc Complex[3];
        for (int medium = 0; medium < (_hasCore ? 3 : 2); medium++)
        {
            Complex permittivity = medium == 0 ? waves.Matrix : waves.Permittivities[medium == 1 ? _material : _coreMaterial];
            k[medium] = LatticeSums.WaveNumber(waves, permittivity);
            _media[medium] = RodMedium.Of(waves, permittivity, k[medium]);
        }
        _k = k[0];
        foreach (Link link in _links)
            link.Kernel.Fill(k[link.Medium]);
        for (int i = 0; i < _points.Length; i++)
            _atPoints[i].SetRegular(_k * Radius(_points[i]), Top);
        for (int i = 0; i < _sources.Length; i++)
            _atSources[i].SetRegular(_k * Radius(_sources[i]), Top);
    }

    /// <summary>Solves for all multipoles of one parity and half.</summary>
    /// <param name="waves">The waves.</param>
    /// <param name="electricEven">The half, see <see cref="MirrorHalf"/>.</param>
    /// <param name="parity">0 for even multipoles, 1 for odd ones.</param>
    /// <returns>Null where the equations have no solution.</returns>
    public EllipseSolution? Solve(GratingWaves waves, bool electricEven, int parity)
    {
        int[] fields = waves.Field switch { RodField.Electric => [0], RodField.Magnetic => [1], _ => [0, 1] };
        int count = fields.Length, families = _hasCore ? 4 : 2, outlines = _hasCore ? 2 : 1;
        var columns = new List<(int Field, int Multipole)>();
        foreach (int field in fields)
        {
            for (int m = parity; m <= Top; m += 2)
            {
                if (m > 0 || IsEven(field, count, electricEven))
                    columns.Add((field, m));
            }
        }
        var matrix = new ComplexMatrix(outlines * _points.Length * 2 * count, families * SourceCount * count);
        var right = new ComplexMatrix(matrix.Rows, columns.Count);
        foreach (Link link in _links)
        {
            for (int place = 0; place < count; place++)
                FillLink(matrix, link, fields[place], place, count, Symmetry(fields[place], count, electricEven, parity), waves.K0);
        }
        for (int c = 0; c < columns.Count; c++)
            FillIncoming(right, c, columns[c].Field, count, columns[c].Multipole, IsEven(columns[c].Field, count, electricEven), waves.K0);
        double[] incoming = Norms(right, 0);
        if (!LeastSquares.TrySolve(matrix, right))
            return null;
        double[] left = Norms(right, matrix.Columns);
        double misfit = 0;
        for (int c = 0; c < columns.Count; c++)
            misfit = Math.Max(misfit, left[c] / incoming[c]);
        return double.IsFinite(misfit) ? new EllipseSolution(fields, [.. columns], right, misfit) : null;
    }

    private static bool IsEven(int field, int count, bool electricEven) => count == 1 || field == 0 ? electricEven : !electricEven;

    private static int Symmetry(int field, int count, bool electricEven, int parity) => IsEven(field, count, electricEven) ? parity : 3 - parity;

    /// <summary>Power into one outline, times the period, that incoming amplitudes of one half and parity make.</summary>
    /// <param name="solution">The solution of that half and parity.</param>
    /// <param name="outline">0 for the body's outline, 1 for the core's.</param>
    /// <param name="amplitudes">Incoming amplitudes by column of the solution.</param>
    /// <param name="electricEven">The half.</param>
    /// <param name="parity">The parity.</param>
    public double PowerInto(EllipseSolution solution, int outline, ReadOnlySpan<Complex> amplitudes, bool electricEven, int parity)
    {
        var strengths = new Complex[solution.Strengths.Rows];
        solution.Strengths.Apply(amplitudes, strengths);
        int count = solution.Fields.Length;
        double sum = 0;
        Span<Complex> fields = stackalloc Complex[2], fluxes = stackalloc Complex[2];
        for (int p = 0; p < _points.Length; p++)
        {
            fields.Clear();
            fluxes.Clear();
            foreach (Link link in _links)
            {
                // The fields on the body's side of either outline.
                if (link.Outline != outline || link.Medium != 1)
                    continue;
                for (int place = 0; place < count; place++)
                    AddFields(link, solution.Fields[place], place, count, Symmetry(solution.Fields[place], count, electricEven, parity), p, strengths, fields, fluxes);
            }
            double length = outline == 0 ? _points[p].Length : _corePoints[p].Length;
            for (int place = 0; place < count; place++)
                sum -= 4 * length * (Complex.Conjugate(fields[place]) * fluxes[place]).Imaginary;
        }
        return sum;
    }

    private void AddFields(
        Link link, int field, int place, int count, int symmetry, int point, Complex[] strengths, Span<Complex> fields, Span<Complex> fluxes)
    {
        RodMedium medium = _media[link.Medium];
        Complex weight = field == 0 ? medium.A : medium.B, cross = field == 0 ? medium.C : -medium.C;
        for (int s = 0; s < SourceCount; s++)
        {
            Complex strength = strengths[(link.Family * SourceCount + s) * count + place];
            fields[place] += link.Kernel.Value(symmetry, point, s) * strength;
            fluxes[place] += weight * link.Kernel.Normal(symmetry, point, s) * strength;
            if (count == 2)
                fluxes[1 - place] += cross * link.Kernel.Tangent(symmetry, point, s) * strength;
        }
    }

    // Conditions of a point: fields one by one, then fluxes over k0.
    private void FillLink(ComplexMatrix matrix, Link link, int field, int place, int count, int symmetry, double k0)
    {
        RodMedium medium = _media[link.Medium];
        Complex weight = (field == 0 ? medium.A : medium.B) * (link.Sign / k0), cross = (field == 0 ? medium.C : -medium.C) * (link.Sign / k0);
        for (int p = 0; p < _points.Length; p++)
        {
            int row = (link.Outline * _points.Length + p) * 2 * count;
            for (int s = 0; s < SourceCount; s++)
            {
                int column = (link.Family * SourceCount + s) * count + place;
                matrix[row + place, column] = link.Sign * link.Kernel.Value(symmetry, p, s);
                matrix[row + count + place, column] = weight * link.Kernel.Normal(symmetry, p, s);
                if (count == 2)
                    matrix[row + count + 1 - place, column] = cross * link.Kernel.Tangent(symmetry, p, s);
            }
        }
    }

    // i^m J_m(kr) cos(m theta), or sin, on the scale of IRowBody.
    private void FillIncoming(ComplexMatrix right, int column, int field, int count, int m, bool even, double k0)
    {
        int place = count == 2 ? field : 0;
        Complex weight = field == 0 ? _media[0].A : _media[0].B, cross = field == 0 ? _media[0].C : -_media[0].C;
        for (int p = 0; p < _points.Length; p++)
        {
            OutlinePoint at = _points[p];
            double r = Radius(at), angle = Math.Atan2(at.Z, at.X), x = at.X / r, z = at.Z / r;
            double scale = Sign(m) * Math.Pow(r / _radiusNm, m) * Math.Exp(_atPoints[p].Argument.Imaginary);
            (double wave, double turned) = even ? (Math.Cos(m * angle), -m * Math.Sin(m * angle)) : (Math.Sin(m * angle), m * Math.Cos(m * angle));
            Complex radial = scale / r * wave * _atPoints[p].JSlope[m], around = scale / r * turned * _atPoints[p].J[m];
            double normal = at.NormalX * x + at.NormalZ * z, tangent = at.NormalZ * x - at.NormalX * z;
            int row = p * 2 * count;
            right[row + place, column] = -scale * wave * _atPoints[p].J[m];
            right[row + count + place, column] = -weight / k0 * (radial * normal + around * tangent);
            if (count == 2)
                right[row + count + 1 - place, column] = -cross / k0 * (around * normal - radial * tangent);
        }
    }

    /// <summary>Amplitude of one outgoing multipole: H_0 of four mirrored sources holds 4 eps_m J_m(k r') cos(m theta') H_m cos(m theta), or sines.</summary>
    /// <param name="solution">The solution.</param>
    /// <param name="column">Which incoming multipole.</param>
    /// <param name="field">0 for Ey, 1 for Hy.</param>
    /// <param name="m">The outgoing multipole.</param>
    /// <param name="electricEven">The half.</param>
    public Complex Sent(EllipseSolution solution, int column, int field, int m, bool electricEven)
    {
        int count = solution.Fields.Length, place = count == 2 ? field : 0;
        bool even = IsEven(field, count, electricEven);
        Complex sum = Complex.Zero;
        for (int s = 0; s < SourceCount; s++)
        {
            double r = Radius(_sources[s]), angle = Math.Atan2(_sources[s].Z, _sources[s].X);
            double wave = even ? Math.Cos(m * angle) : Math.Sin(m * angle);
            double scale = Math.Pow(r / _radiusNm, m) * Math.Exp(_atSources[s].Argument.Imaginary) * wave;
            sum += scale * _atSources[s].J[m] * solution.Strengths[s * count + place, column];
        }
        return Sign(m) * (m == 0 ? 4 : 8) * sum;
    }

    // i^m without the factor i of odd m, which goes in and comes out again.
    private static double Sign(int m) => m / 2 % 2 == 0 ? 1 : -1;

    private static double Radius(in OutlinePoint point) => Math.Sqrt(point.X * point.X + point.Z * point.Z);

    private static double[] Norms(ComplexMatrix matrix, int firstRow)
    {
        var sums = new double[matrix.Columns];
        for (int i = firstRow; i < matrix.Rows; i++)
        {
            for (int c = 0; c < sums.Length; c++)
                sums[c] += Math.Pow(matrix[i, c].Magnitude, 2);
        }
        return Array.ConvertAll(sums, Math.Sqrt);
    }
}

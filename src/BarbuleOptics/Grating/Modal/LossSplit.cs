using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>Tells the losses of several absorbing materials of a slab apart by the fields inside.</summary>
internal sealed class LossSplit
{
    private readonly SlabShape _shape;
    private readonly int _depth;
    private readonly OperatorStore _store;
    private readonly ModalWaves _waves;
    private readonly ModalSector _sector;
    private readonly FieldRecord _record;
    private readonly ModalWorkspace _workspace;
    private readonly LossDensity _density;
    private readonly ComplexMatrix _between;
    private readonly Complex[] _bottom;
    private readonly Complex[] _plane;
    private readonly Complex[] _nodes;
    private readonly Complex[] _field;
    private readonly Complex[] _slope;
    private readonly (Complex[] X, Complex[] Z) _d;
    private readonly (Complex[] X, Complex[] Z) _across;

    /// <summary>Memory for one slab, field and resolution.</summary>
    public LossSplit(SlabShape shape, int harmonics, int mostOrder, RodField field, int depth)
    {
        _shape = shape;
        _depth = depth;
        _store = new OperatorStore(shape, harmonics);
        _waves = new ModalWaves(harmonics);
        _sector = ModalSector.Of(harmonics, field, false)[0];
        int size = _sector.Size, ports = (2 * mostOrder + 1) * (field == RodField.Both ? 2 : 1), count = 2 * harmonics + 1;
        _record = new FieldRecord(size, ports, DepthMesh.OrderAt(depth));
        _workspace = new ModalWorkspace(_sector, mostOrder, _record);
        _density = new LossDensity(shape, harmonics);
        _between = new ComplexMatrix(2 * ports, 2 * ports);
        _bottom = new Complex[size + 2 * ports];
        _plane = new Complex[2 * size + ports];
        _nodes = new Complex[(DepthMesh.OrderAt(depth) + 1) * size];
        _field = new Complex[size];
        _slope = new Complex[size];
        _d = (new Complex[count], new Complex[count]);
        _across = (new Complex[count], new Complex[count]);
    }

    /// <summary>Solves the slab the plain way and keeps what the fields follow from.</summary>
    public bool TryPrepare(GratingWaves light)
    {
        _waves.Set(light);
        _store.Use(light.Permittivities, _waves.Alpha, (_depth, 0));
        return (_shape.HasAxis && TryPrepare(light, true)) || TryPrepare(light, false);
    }

    private bool TryPrepare(GratingWaves light, bool symmetric)
    {
        _record.Clear();
        _workspace.Chain.IsSymmetric = symmetric;
        if (!_workspace.TryJoin(_waves, light, _shape.Intervals, _store, _depth) || !_workspace.Chain.TryEnd(_waves, light.Matrix, _between))
            return false;
        _record.End(_workspace.Chain);
        return true;
    }

    /// <summary>Adds losses by material.</summary>
    public void Add(GratingWaves light, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up, Span<double> byMaterial)
    {
        int size = _sector.Size, ports = down.Length;
        Span<Complex> top = _plane.AsSpan(2 * size, ports);
        for (int port = 0; port < ports; port++)
        {
            int n = port % light.OrderCount - light.MostOrder;
            bool isElectric = light.Field == RodField.Electric || (light.Field == RodField.Both && port < light.OrderCount);
            // Seen from the mirror axis; the columns carried along stand for minus the right side.
            Complex factor = -PlaneTerms.Incoming(_waves, _sector, light.Matrix, n, isElectric)
                * Complex.FromPolarCoordinates(1, 2 * Math.PI * n * _shape.AxisNm / _shape.PeriodNm);
            top[port] = factor * down[port];
            _bottom[size + port] = top[port];
            _bottom[size + ports + port] = factor * up[port];
        }
        FieldRecord.BackSubstitute(_record.LastRows, size, _bottom);
        _bottom.AsSpan(0, size).CopyTo(_plane.AsSpan(size));
        for (int e = _record.Elements.Length - 1; e >= 0; e--)
        {
            FieldRecord.Element element = _record.Elements[e];
            FieldRecord.BackSubstitute(element.TopRows, size, _plane);
            int inner = _nodes.Length - 2 * size;
            _plane.AsSpan(0, 2 * size).CopyTo(_nodes.AsSpan(inner));
            FieldRecord.BackSubstitute(element.InnerRows, inner, _nodes);
            AddElement(light, element, byMaterial);
            _plane.AsSpan(0, size).CopyTo(_plane.AsSpan(size));
        }
    }

    private void AddElement(GratingWaves light, FieldRecord.Element element, Span<double> byMaterial)
    {
        int size = _sector.Size, order = element.Rule.Order;
        for (int q = 0; q < element.Points.Count; q++)
        {
            Array.Clear(_field);
            Array.Clear(_slope);
            for (int node = 0; node <= order; node++)
            {
                int place = DepthElement.PlaceOf(node, order);
                double value = element.Rule.Values[q, node], slope = element.Rule.Slopes[q, node] * 2 / element.HeightNm;
                ReadOnlySpan<Complex> from = _nodes.AsSpan(place * size, size);
                for (int i = 0; i < size; i++)
                {
                    _field[i] += value * from[i];
                    _slope[i] += slope * from[i];
                }
            }
            (SlabInterval interval, double zNm, double weightNm, int number) = element.Points[q];
            if (_waves.Field != RodField.Electric)
                SetAcross(interval, zNm, number);
            ReadOnlySpan<Complex> along = _field.AsSpan(0, _sector.Electric.Count);
            _density.Add(interval, zNm, weightNm, _waves, light.Permittivities, along, _across, _d, byMaterial);
        }
    }

    private void SetAcross(SlabInterval interval, double zNm, int number)
    {
        int e = _sector.Electric.Count, h = e;
        Complex i = Complex.ImaginaryOne;
        for (int n = 0; n < _d.X.Length; n++)
        {
            double kx = _waves.Kx[n];
            _d.X[n] = -_slope[h + n];
            _d.Z[n] = i * kx * _field[h + n];
            if (e > 0)
            {
                _d.X[n] += _waves.Alpha * i * kx * _field[n];
                _d.Z[n] += _waves.Alpha * _slope[n];
            }
        }
        CutOperators operators = _store.At(number, interval, zNm, false)!;
        for (int n = 0; n < _d.X.Length; n++)
        {
            Complex x = Complex.Zero, z = Complex.Zero;
            ReadOnlySpan<Complex> xx = operators.Xx.Row(n), xz = operators.Xz.Row(n), zz = operators.Zz.Row(n);
            for (int c = 0; c < xx.Length; c++)
            {
                x += xx[c] * _d.X[c] + xz[c] * _d.Z[c];
                z += xz[c] * _d.X[c] + zz[c] * _d.Z[c];
            }
            _across.X[n] = x;
            _across.Z[n] = z;
        }
    }
}

using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>A slab solved with one set of harmonics and orders: sectors, their pieces, and what the planes answer.</summary>
internal sealed class ModalSpace
{
    private readonly SlabShape _shape;
    private readonly OperatorStore _store;
    private readonly CrowdedStore? _crowded;
    private readonly ModalWaves _waves;
    private readonly ModalWorkspace[] _workspaces;
    private readonly bool _halved;
    private readonly int _mostOrder;
    private readonly ComplexMatrix _between;
    private readonly ComplexMatrix _top;
    private readonly ComplexMatrix _topBottom;
    private readonly ComplexMatrix _bottomTop;
    private readonly ComplexMatrix _bottom;
    private readonly ScatteringBlock _block;
    private readonly Complex[] _outTop;
    private readonly Complex[] _outBottom;

    /// <summary>Memory for one slab, field and resolution.</summary>
    public ModalSpace(SlabShape shape, OperatorStore store, int harmonics, int mostOrder, RodField field, bool split, bool halved, CrowdedStore? crowded = null)
    {
        _shape = shape;
        _store = store;
        _crowded = crowded;
        _halved = halved;
        _mostOrder = mostOrder;
        _waves = new ModalWaves(harmonics);
        _workspaces = [.. ModalSector.Of(harmonics, field, split).Select(sector => new ModalWorkspace(sector, mostOrder, null, crowded))];
        int channels = (2 * mostOrder + 1) * (field == RodField.Both ? 2 : 1);
        _between = new ComplexMatrix(2 * channels, 2 * channels);
        _top = new ComplexMatrix(channels, channels);
        _topBottom = new ComplexMatrix(channels, channels);
        _bottomTop = new ComplexMatrix(channels, channels);
        _bottom = new ComplexMatrix(channels, channels);
        _block = new ScatteringBlock(channels);
        _outTop = new Complex[channels];
        _outBottom = new Complex[channels];
    }

    /// <summary>Solves for the fields at the planes that unit right sides at the planes make.</summary>
    public bool TrySolve(GratingWaves light, int depth, bool symmetric)
    {
        _waves.Set(light);
        _store.Use(light.Permittivities, _waves.Alpha, (depth, _halved ? 1 : 0));
        _crowded?.Use(light.Permittivities, _waves.Alpha);
        _crowded?.Planes.Set(_waves, light.Matrix);
        _top.Clear();
        _topBottom.Clear();
        _bottomTop.Clear();
        _bottom.Clear();
        foreach (ModalWorkspace workspace in _workspaces)
        {
            workspace.Chain.IsSymmetric = symmetric;
            if (!workspace.TryJoin(_waves, light, _halved ? _shape.HalfIntervals : _shape.Intervals, _store, depth))
                return false;
            if (!(_halved ? TryEndHalf(workspace) : TryEndWhole(workspace, light.Matrix)))
                return false;
        }
        return true;
    }

    private bool TryEndWhole(ModalWorkspace workspace, Complex matrix)
    {
        if (!workspace.Chain.TryEnd(_waves, matrix, _between))
            return false;
        int ports = workspace.Chain.Ports.Length;
        AddPorts(workspace, 0, 0, 1, false, _top);
        AddPorts(workspace, 0, ports, 1, false, _topBottom);
        AddPorts(workspace, ports, 0, 1, false, _bottomTop);
        AddPorts(workspace, ports, ports, 1, false, _bottom);
        return true;
    }

    // With G+ and G- the answers where E is even and odd about the middle, S = 1 for E and -1 for H: the answer at the top to the top is
    // (G+ + G-)/2, to the bottom (G+ - G-) S/2, and at the bottom S times the same mirrored.
    private bool TryEndHalf(ModalWorkspace workspace)
    {
        for (int parity = 1; parity >= -1; parity -= 2)
        {
            if (!workspace.Chain.TryEndAtMirror(parity > 0, _between))
                return false;
            AddPorts(workspace, 0, 0, 0.5, false, _top);
            AddPorts(workspace, 0, 0, 0.5 * parity, true, _topBottom);
        }
        return true;
    }

    private void AddPorts(ModalWorkspace workspace, int firstRow, int firstColumn, double factor, bool mirrorColumns, ComplexMatrix target)
    {
        ReadOnlySpan<int> ports = workspace.Chain.Ports;
        for (int row = 0; row < ports.Length; row++)
        {
            for (int column = 0; column < ports.Length; column++)
            {
                Complex value = factor * _between[firstRow + row, firstColumn + column];
                AddCombination(workspace.Sector, ports[row], ports[column], mirrorColumns, value, target);
            }
        }
    }

    private void AddCombination(in ModalSector sector, int row, int column, bool mirrorColumns, Complex value, ComplexMatrix target)
    {
        (int rowHarmonic, bool rowElectric) = PlaneTerms.Unknown(sector, row);
        (int columnHarmonic, bool columnElectric) = PlaneTerms.Unknown(sector, column);
        FieldBasis rows = rowElectric ? sector.Electric : sector.Magnetic, columns = columnElectric ? sector.Electric : sector.Magnetic;
        if (mirrorColumns && !columnElectric)
            value = -value;
        int rowImages = rows.HasPairs && rowHarmonic != 0 ? 2 : 1, columnImages = columns.HasPairs && columnHarmonic != 0 ? 2 : 1;
        for (int r = 0; r < rowImages; r++)
        {
            int m = r == 0 ? rowHarmonic : -rowHarmonic;
            for (int c = 0; c < columnImages; c++)
            {
                int n = c == 0 ? columnHarmonic : -columnHarmonic;
                target[Channel(sector, m, rowElectric), Channel(sector, n, columnElectric)] += rows.ShareOf(m) * columns.ShareOf(n) * value;
            }
        }
    }

    private int Channel(in ModalSector sector, int order, bool isElectric)
        => order + _mostOrder + (isElectric || sector.Electric.Count == 0 ? 0 : 2 * _mostOrder + 1);

    /// <summary>Turns fields at the planes into outgoing amplitudes.</summary>
    public void FillBlock(GratingWaves light, ScatteringBlock block)
    {
        int channels = light.ChannelCount;
        for (int column = 0; column < channels; column++)
        {
            int n = column % light.OrderCount - _mostOrder;
            bool isElectric = IsElectric(light, column);
            Complex right = PlaneTerms.Incoming(_waves, _workspaces[0].Sector, light.Matrix, n, isElectric);
            for (int row = 0; row < channels; row++)
            {
                int m = row % light.OrderCount - _mostOrder;
                // Waves counted from the mirror axis seen from the origin.
                Complex factor = right * (_shape.AxisNm == 0 ? Complex.One : Complex.FromPolarCoordinates(1, -2 * Math.PI * (m - n) * _shape.AxisNm / _shape.PeriodNm));
                Complex unit = row == column ? Complex.One : Complex.Zero;
                double mirror = IsElectric(light, row) == isElectric ? 1 : -1;
                _block.ReflectTop[row, column] = factor * _top[row, column] - unit;
                _block.TransmitUp[row, column] = factor * _topBottom[row, column];
                _block.TransmitDown[row, column] = factor * (_halved ? mirror * _topBottom[row, column] : _bottomTop[row, column]);
                _block.ReflectBottom[row, column] = factor * (_halved ? mirror * _top[row, column] : _bottom[row, column]) - unit;
            }
        }
        block.ReflectTop.CopyFrom(_block.ReflectTop);
        block.TransmitDown.CopyFrom(_block.TransmitDown);
        block.TransmitUp.CopyFrom(_block.TransmitUp);
        block.ReflectBottom.CopyFrom(_block.ReflectBottom);
    }

    /// <summary>Net power that enters through both planes with the orders kept, right after <see cref="FillBlock"/>.</summary>
    public double PowerIn(GratingWaves light, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up)
    {
        for (int row = 0; row < down.Length; row++)
        {
            Complex top = Complex.Zero, bottom = Complex.Zero;
            for (int column = 0; column < down.Length; column++)
            {
                top += _block.ReflectTop[row, column] * down[column] + _block.TransmitUp[row, column] * up[column];
                bottom += _block.TransmitDown[row, column] * down[column] + _block.ReflectBottom[row, column] * up[column];
            }
            _outTop[row] = top;
            _outBottom[row] = bottom;
        }
        return PowerDown(light, down, _outTop) - PowerDown(light, _outBottom, up);
    }

    // Sum of Im(conj(Ey) F_E + conj(Hy) F_H) over the orders, in the matrix.
    private double PowerDown(GratingWaves light, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up)
    {
        (Complex electric, Complex magnetic) = _waves.FluxFactors(light.Matrix);
        Complex cross = Complex.ImaginaryOne * _waves.Alpha * magnetic;
        double sum = 0;
        for (int channel = 0; channel < down.Length; channel++)
        {
            int order = channel % light.OrderCount;
            bool isElectric = IsElectric(light, channel);
            Complex field = down[channel] + up[channel];
            Complex flux = Complex.ImaginaryOne * light.Kz[order] * (isElectric ? electric : magnetic) * (down[channel] - up[channel]);
            if (light.Field == RodField.Both)
            {
                int other = isElectric ? channel + light.OrderCount : channel - light.OrderCount;
                flux += (isElectric ? cross : -cross) * light.Kx[order] * (down[other] + up[other]);
            }
            sum += field.Real * flux.Imaginary - field.Imaginary * flux.Real;
        }
        return sum;
    }

    private static bool IsElectric(GratingWaves light, int channel) => light.Field == RodField.Electric || (light.Field == RodField.Both && channel < light.OrderCount);
}

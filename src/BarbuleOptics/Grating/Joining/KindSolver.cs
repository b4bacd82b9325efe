using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Solves one kind of element within waves whose period holds one or several of its cells.</summary>
/// <remarks>In a period of m cells order n couples only to orders that differ by a multiple of m: one problem of the element's own
/// period for each remainder r, with the incident wave moved by 2 pi r over the long period.</remarks>
internal sealed class KindSolver(ElementKind kind, SharedAnswers shared)
{
    private readonly List<Part> _parts = [];
    private Complex[] _down = [];
    private Complex[] _up = [];
    private double[] _lost = [];
    private int _cells;

    /// <summary>Fills <paramref name="block"/>, in the polarizations of the channels.</summary>
    /// <returns>False where the element has no finite solution.</returns>
    public bool TryScatter(ChannelTable table, in Resolution resolution, ScatteringBlock block)
    {
        GratingWaves waves = table.Waves;
        _cells = Math.Max(1, (int)Math.Round(waves.PeriodNm / kind.PeriodNm));
        while (_parts.Count < _cells)
            _parts.Add(new Part(kind.Create(shared, shared.Of(kind.PeriodNm, _parts.Count))));
        if (_cells == 1)
        {
            if (!_parts[0].Element.TryScatter(waves, resolution, block))
                return false;
            table.ToPolarizations(block);
            return true;
        }
        Clear(block);
        for (int cell = 0; cell < _cells; cell++)
        {
            if (!_parts[cell].TryScatter(waves, Remainder(cell), _cells, kind.PeriodNm, resolution, block))
                return false;
        }
        table.ToPolarizations(block);
        SetFree(table, block);
        return true;
    }

    /// <summary>Adds the power lost in each material, in units of Re(conj(phi) psi).</summary>
    /// <param name="table">The channels.</param>
    /// <param name="resolution">As scattered.</param>
    /// <param name="down">Downward amplitudes at the top, by polarization.</param>
    /// <param name="up">Upward amplitudes at the bottom.</param>
    /// <param name="byMaterial">By the number of the material.</param>
    public void AddLoss(ChannelTable table, in Resolution resolution, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up, Span<double> byMaterial)
    {
        Reserve(table.Channels, byMaterial.Length);
        Span<Complex> rodsDown = _down.AsSpan(0, table.Channels), rodsUp = _up.AsSpan(0, table.Channels);
        table.ToRods(down, isUp: false, rodsDown);
        table.ToRods(up, isUp: true, rodsUp);
        Array.Clear(_lost);
        if (_cells == 1)
            _parts[0].Element.AddLoss(table.Waves, resolution, rodsDown, rodsUp, _lost);
        for (int cell = 0; _cells > 1 && cell < _cells; cell++)
            _parts[cell].AddLoss(table.Waves, Remainder(cell), _cells, resolution, rodsDown, rodsUp, _lost);
        for (int material = 0; material < byMaterial.Length; material++)
            byMaterial[material] += _lost[material] / table.Waves.K0;
        for (int channel = 0; _cells > 1 && channel < table.Channels; channel++)
        {
            if (IsFree(table, channel))
                byMaterial[Section.Matrix] += LayerLoss.Of(table, channel, Section.Matrix, kind.HeightNm, down[channel], up[channel]);
        }
    }

    private void Reserve(int channels, int materials)
    {
        if (_down.Length < channels)
            (_down, _up) = (new Complex[channels], new Complex[channels]);
        if (_lost.Length != materials)
            _lost = new double[materials];
    }

    // Remainders around zero.
    private int Remainder(int cell) => 2 * cell > _cells ? cell - _cells : cell;

    // Orders from -M to M do not fill every remainder evenly; the outermost ones, left over, pass as if nothing were there.
    private bool IsFree(ChannelTable table, int channel)
    {
        int order = table.OrderOf(channel), cell = (order % _cells + _cells) % _cells, remainder = Remainder(cell);
        int most = Part.MostOrder(table.Waves.MostOrder, remainder, _cells);
        return Math.Abs((order - remainder) / _cells) > most;
    }

    private void SetFree(ChannelTable table, ScatteringBlock block)
    {
        for (int channel = 0; channel < block.Channels; channel++)
        {
            if (!IsFree(table, channel))
                continue;
            Complex factor = Complex.Exp(Complex.ImaginaryOne * table.Kz(Section.Matrix)[channel % table.Orders] * kind.HeightNm);
            block.TransmitDown[channel, channel] = factor;
            block.TransmitUp[channel, channel] = factor;
        }
    }

    private static void Clear(ScatteringBlock block)
    {
        block.ReflectTop.Clear();
        block.TransmitDown.Clear();
        block.TransmitUp.Clear();
        block.ReflectBottom.Clear();
    }

    /// <summary>The problem of one remainder.</summary>
    private sealed class Part(IGratingElement element)
    {
        private readonly GratingWaves _waves = new();
        private readonly Dictionary<int, ScatteringBlock> _blocks = [];
        private Complex[] _down = [];
        private Complex[] _up = [];
        private int _most;

        public IGratingElement Element { get; } = element;

        /// <summary>Largest order of the own period all of whose orders -M..M the long period has; -1 for none.</summary>
        public static int MostOrder(int mostOfAll, int remainder, int cells) => mostOfAll < Math.Abs(remainder) ? -1 : (mostOfAll - Math.Abs(remainder)) / cells;

        public bool TryScatter(GratingWaves waves, int remainder, int cells, double periodNm, in Resolution resolution, ScatteringBlock block)
        {
            _most = MostOrder(waves.MostOrder, remainder, cells);
            if (_most < 0)
                return true;
            _waves.Set(
                waves.WavelengthNm, waves.Kx0 + 2 * Math.PI * remainder / waves.PeriodNm, waves.Ky, periodNm, waves.Permittivities, _most, waves.Field);
            if (!_blocks.TryGetValue(_waves.ChannelCount, out ScatteringBlock? own))
                own = _blocks[_waves.ChannelCount] = new ScatteringBlock(_waves.ChannelCount);
            if (!Element.TryScatter(_waves, At(resolution), own))
                return false;
            for (int to = 0; to < own.Channels; to++)
            {
                int row = Whole(to, waves, remainder, cells);
                for (int from = 0; from < own.Channels; from++)
                {
                    int column = Whole(from, waves, remainder, cells);
                    block.ReflectTop[row, column] = own.ReflectTop[to, from];
                    block.TransmitDown[row, column] = own.TransmitDown[to, from];
                    block.TransmitUp[row, column] = own.TransmitUp[to, from];
                    block.ReflectBottom[row, column] = own.ReflectBottom[to, from];
                }
            }
            return true;
        }

        public void AddLoss(
            GratingWaves waves, int remainder, int cells, in Resolution resolution, ReadOnlySpan<Complex> down, ReadOnlySpan<Complex> up, Span<double> byMaterial)
        {
            if (_most < 0)
                return;
            int channels = _waves.ChannelCount;
            if (_down.Length < channels)
                (_down, _up) = (new Complex[channels], new Complex[channels]);
            for (int channel = 0; channel < channels; channel++)
            {
                int whole = Whole(channel, waves, remainder, cells);
                _down[channel] = down[whole];
                _up[channel] = up[whole];
            }
            Element.AddLoss(_waves, At(resolution), _down.AsSpan(0, channels), _up.AsSpan(0, channels), byMaterial);
        }

        private Resolution At(in Resolution resolution) => resolution with { Orders = _most, Harmonics = Math.Max(resolution.Harmonics, _most) };

        // The channel of the long period.
        private int Whole(int channel, GratingWaves waves, int remainder, int cells)
        {
            int orders = _waves.OrderCount;
            return remainder + cells * (channel % orders - _most) + waves.MostOrder + channel / orders * waves.OrderCount;
        }
    }
}

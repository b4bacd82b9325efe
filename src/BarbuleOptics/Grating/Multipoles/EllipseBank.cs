using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>One elliptical body at several wavelengths: its answers, which take milliseconds each and know nothing of the direction of the
/// light, are kept for the next direction.</summary>
internal sealed class EllipseBank(EllipseOutline outline, EllipseOutline core, int material, int coreMaterial) : IRowBody
{
    /// <summary>Wavelengths kept; each holds about a megabyte.</summary>
    private const int MostKept = 32;

    /// <summary>Multipoles solved beyond those asked for: other directions and the next finer step ask for more.</summary>
    private const int Ahead = 6;

    private readonly Dictionary<double, EllipseScatterer> _kept = [];
    private int _top;
    private int _sources;
    private readonly EllipseScatterer _any = new(outline, core, material, coreMaterial);
    private EllipseScatterer? _current;

    /// <inheritdoc/>
    public double RadiusNm => _any.RadiusNm;

    /// <inheritdoc/>
    public bool IsRound => false;

    /// <inheritdoc/>
    public double LeastPlaneNm => _any.LeastPlaneNm;

    /// <inheritdoc/>
    public int MultipolesFor(double kx) => _any.MultipolesFor(kx);

    /// <inheritdoc/>
    public bool TryPrepare(GratingWaves waves, int top)
    {
        _current = At(waves);
        // What the last wavelength asked for at most, this one will.
        if (top > _top)
            _top = top + Ahead;
        bool solved = _current.TryPrepare(waves, _top);
        _sources = Math.Max(_sources, _current.SourceCount);
        return solved;
    }

    /// <inheritdoc/>
    public Complex Answer(int to, int from, bool electricEven, int outgoing, int incoming) => _current!.Answer(to, from, electricEven, outgoing, incoming);

    /// <inheritdoc/>
    public (double Body, double Core) PowerInto(GratingWaves waves, MirrorHalf half, int member) => At(waves).PowerInto(waves, half, member);

    private EllipseScatterer At(GratingWaves waves)
    {
        if (_kept.TryGetValue(waves.K0, out EllipseScatterer? known))
            return known;
        if (_kept.Count >= MostKept)
            _kept.Clear();
        return _kept[waves.K0] = new EllipseScatterer(outline, core, material, coreMaterial, _sources);
    }
}

using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>Answers of one flattened rod, solid or with a core, at the wavelengths of a pack, by <see cref="EllipseLanes"/>; on the scale of
/// <see cref="RodLanes{TLanes}"/>, with s = |k| radius/2: b_m m!/s^m from e_l a_l s^l/l!, e_0 = 1, else 2.</summary>
/// <remarks>Answers are kept for several numbers of multipoles, for the fields and directions that need them: they cost far more than a row.</remarks>
internal sealed class FlatRodLanes<TLanes>(EllipseOutline outline, EllipseOutline core, int material, int coreMaterial)
    where TLanes : struct, ILanes<TLanes>
{
    /// <summary>Most multipoles: with 24 the answers of a rod of aspect 2.4 are right to 1e-7, with 28 to 4e-6, and beyond no longer.</summary>
    public const int MostMultipoles = 24;

    /// <summary>Multipoles are solved in steps of so many.</summary>
    private const int Step = 4;

    private readonly LaneBuffer<TLanes>?[] _answers = new LaneBuffer<TLanes>?[MostMultipoles / Step + 2];
    private readonly bool[] _solved = new bool[MostMultipoles / Step + 2];
    private readonly bool[] _known = new bool[MostMultipoles / Step + 2];
    private PackLanes<TLanes>? _pack;
    private int _version;
    private int _top;
    private LaneBuffer<TLanes> _current = null!;

    /// <summary>Radius of the circle round the rod, in nm.</summary>
    public double RadiusNm { get; } = Math.Max(outline.HalfWidthNm, outline.HalfHeightNm);

    /// <summary>Multipoles that waves of change <paramref name="kx"/> along the row need (<see cref="EllipseScatterer"/>).</summary>
    public static int MultipolesFor(double kx, double radiusNm) => (int)Math.Ceiling(2.2 * kx * radiusNm);

    /// <summary>The answers of one multipole, from incoming ones on: every second one has an answer.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ref double Answers(RodField field, int sine, int outgoing, int incoming)
        => ref _current.At(((2 * (int)field + sine) * (_top + 1) + outgoing) * (_top + 1) + incoming);

    /// <summary>Makes multipoles 0 to <paramref name="top"/> ready.</summary>
    /// <param name="pack">The wavelengths.</param>
    /// <param name="top">Largest multipole.</param>
    /// <param name="ellipse">Solves them; its memory serves all packs.</param>
    /// <returns>False where they cannot be solved.</returns>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public bool TryPrepare(PackLanes<TLanes> pack, int top, Func<int, EllipseLanes> ellipse)
    {
        if (!ReferenceEquals(pack, _pack) || pack.Version != _version)
        {
            (_pack, _version) = (pack, pack.Version);
            Array.Clear(_known);
        }
        int step = (top + Step - 1) / Step;
        _top = step * Step;
        _current = _answers[step] ??= new LaneBuffer<TLanes>();
        if (_known[step])
            return _solved[step];
        _known[step] = true;
        _current.Reserve(4 * (_top + 1) * (_top + 1));
        EllipseLanes solver = ellipse(step);
        _solved[step] = solver.TrySolve(_top, pack.WaveNumber(Section.Matrix), pack.WaveNumber(material), pack.WaveNumber(coreMaterial));
        if (_solved[step])
            Store(solver, TLanes.Broadcast(RadiusNm / 2) * TLanes.Sqrt(pack.WaveNumber(Section.Matrix).Norm));
        return _solved[step];
    }

    /// <summary>Whether the losses of the rod cannot be found from its amplitudes alone, by lane. A rod that loses nothing counts among them: its answers keep
    /// energy to 1e-9 only, and nothing there could take the rest.</summary>
    public TLanes NeedsFields(PackLanes<TLanes> pack)
    {
        TLanes zero = TLanes.Broadcast(0), matrix = TLanes.LessThan(zero, pack.Permittivity(Section.Matrix).Imaginary);
        TLanes own = pack.Permittivity(material).Imaginary, other = core.HalfWidthNm > 0 ? pack.Permittivity(coreMaterial).Imaginary : zero;
        TLanes both = TLanes.LessThan(zero, TLanes.Min(own, other)), any = TLanes.LessThan(zero, TLanes.Max(own, other));
        return TLanes.Select(any, TLanes.Select(matrix, matrix, both), TLanes.LessThan(zero, TLanes.Broadcast(1)));
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Store(EllipseLanes solver, TLanes s)
    {
        TLanes inverse = TLanes.Broadcast(1) / s;
        for (int table = 0; table < 4; table++)
        {
            TLanes row = TLanes.Broadcast(1);
            for (int outgoing = 0; outgoing <= _top; outgoing++)
            {
                if (outgoing > 0)
                    row *= TLanes.Broadcast(outgoing) * inverse;
                TLanes scale = row;
                for (int incoming = 0; incoming <= _top; incoming++)
                {
                    if (incoming > 0)
                        scale *= TLanes.Broadcast(incoming) * inverse;
                    bool answers = (incoming + outgoing) % 2 == 0 && (table % 2 == 0 || (incoming > 0 && outgoing > 0));
                    ComplexLanes<TLanes> value = answers
                        ? solver.Answer<TLanes>(table >= 2, table % 2 == 1, outgoing, incoming) : ComplexLanes<TLanes>.Broadcast(0);
                    _current[(table * (_top + 1) + outgoing) * (_top + 1) + incoming] = TLanes.Broadcast(incoming == 0 ? 1 : 2) * scale * value;
                }
            }
        }
    }
}

using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>How every order travels in every medium, at the wavelengths of a pack, for light without a wave vector along the rods.</summary>
/// <remarks>Conventions of <see cref="GratingWaves"/>: orders -M to M, lengths in nm, Im kz >= 0.</remarks>
internal sealed class ChannelLanes<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    private readonly LaneBuffer<TLanes> _kx = new();
    private readonly LaneBuffer<TLanes> _kz = new();
    private readonly LaneBuffer<TLanes> _eta = new();
    private PackLanes<TLanes> _pack = null!;
    private int _media;

    /// <summary>The pack.</summary>
    public PackLanes<TLanes> Pack => _pack;

    /// <summary>The period, in nm.</summary>
    public double PeriodNm { get; private set; }

    /// <summary>Largest order, M.</summary>
    public int MostOrder { get; private set; }

    /// <summary>Number of orders.</summary>
    public int Orders => 2 * MostOrder + 1;

    /// <summary>The field along the rods that admittances stand for.</summary>
    public RodField Field { get; private set; }

    /// <summary>kx0 P/(2 pi).</summary>
    public TLanes Turns { get; private set; }

    /// <summary>Least |kz|^2/k0^2 of any order in any medium.</summary>
    public TLanes LeastDepth { get; private set; }

    /// <summary>Wave vector across the rods of the order at a place, in 1/nm.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public TLanes Kx(int place) => _kx.Real(place);

    /// <summary>The largest of its absolute values.</summary>
    public double LargestKx(int place)
    {
        double largest = 0;
        ref double first = ref _kx.RealAt(place);
        for (int lane = 0; lane < TLanes.Count; lane++)
            largest = Math.Max(largest, Math.Abs(Unsafe.Add(ref first, lane)));
        return largest;
    }

    /// <summary>Its wave vector in depth in a medium, in 1/nm.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> Kz(int medium, int place) => _kz[medium * Orders + place];

    /// <summary>Its admittance in a medium: kz/k0, or kz/(k0 e) with the magnetic field along the rods.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> Eta(int medium, int place) => _eta[medium * Orders + place];

    /// <summary>Where an admittance stands.</summary>
    public ref double EtaAt(int medium, int place) => ref _eta.At(medium * Orders + place);

    /// <summary>Describes one direction.</summary>
    /// <param name="pack">The wavelengths.</param>
    /// <param name="sine">Sine of the angle of incidence.</param>
    /// <param name="cosine">Its cosine.</param>
    /// <param name="periodNm">The period, in nm.</param>
    /// <param name="mostOrder">Largest order.</param>
    /// <param name="media">Number of media.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Set(PackLanes<TLanes> pack, double sine, double cosine, double periodNm, int mostOrder, int media)
    {
        (_pack, PeriodNm, MostOrder, _media) = (pack, periodNm, mostOrder, media);
        _kx.Reserve(Orders);
        _kz.Reserve(media * Orders);
        _eta.Reserve(media * Orders);
        TLanes k0 = pack.K0, index = pack.Index, kx0 = k0 * index * TLanes.Broadcast(sine), scale = TLanes.Broadcast(1) / (k0 * k0);
        Turns = kx0 * TLanes.Broadcast(periodNm / (2 * Math.PI));
        LeastDepth = TLanes.Broadcast(double.MaxValue);
        for (int place = 0; place < Orders; place++)
        {
            TLanes kx = kx0 + TLanes.Broadcast(2 * Math.PI * (place - mostOrder) / periodNm);
            _kx.SetReal(place, kx);
            var along = new ComplexLanes<TLanes>(kx, TLanes.Broadcast(0));
            for (int medium = 0; medium < media; medium++)
            {
                ComplexLanes<TLanes> k = pack.WaveNumber(medium);
                ComplexLanes<TLanes> kz = place == mostOrder ? Zeroth(medium, index, cosine) : ((k - along) * (k + along)).PassiveRoot();
                _kz[medium * Orders + place] = kz;
                LeastDepth = TLanes.Min(LeastDepth, scale * kz.Norm);
            }
        }
    }

    /// <summary>Finds the admittances for one field along the rods.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void SetField(RodField field)
    {
        Field = field;
        TLanes inverse = TLanes.Broadcast(1) / _pack.K0;
        for (int medium = 0; medium < _media; medium++)
        {
            ComplexLanes<TLanes> share = ComplexLanes<TLanes>.Broadcast(1);
            if (field == RodField.Magnetic)
                share = _pack.Permittivity(medium).Reciprocal();
            share = inverse * share;
            for (int place = 0; place < Orders; place++)
                _eta[medium * Orders + place] = share * _kz[medium * Orders + place];
        }
    }

    // From the cosine, so that near grazing incidence the surround and media much like it keep their digits.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private ComplexLanes<TLanes> Zeroth(int medium, TLanes index, double cosine)
    {
        ComplexLanes<TLanes> permittivity = _pack.Permittivity(medium);
        TLanes normal = index * TLanes.Broadcast(cosine);
        var squared = new ComplexLanes<TLanes>(
            TLanes.MultiplyAdd(normal, normal, TLanes.SubtractProduct(index, index, permittivity.Real)), permittivity.Imaginary);
        return _pack.K0 * squared.PassiveRoot();
    }
}

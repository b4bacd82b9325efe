using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;

namespace BarbuleOptics.Grating.Modal.Lanes;

/// <summary>Light of one direction and several wavelengths, one a lane, as slabs take it: no wave vector along the rods.</summary>
internal sealed class SlabLight
{
    private double[] _k0 = [];
    private double[] _kx0 = [];
    private double[] _permittivities = [];

    /// <summary>The period, in nm.</summary>
    public double PeriodNm { get; private set; }

    /// <summary>Vacuum wave numbers, in 1/nm.</summary>
    public ReadOnlySpan<double> K0 => _k0;

    /// <summary>Wave vectors of the incident light across the rods, in 1/nm.</summary>
    public ReadOnlySpan<double> Kx0 => _kx0;

    /// <summary>Permittivities: for each material of the section the real parts, then the imaginary ones.</summary>
    public Span<double> Permittivities => _permittivities;

    /// <summary>Permittivity of a material.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ComplexLanes<TLanes> PermittivityOf<TLanes>(int material)
        where TLanes : struct, ILanes<TLanes>
        => ComplexLanes<TLanes>.Load(ref _permittivities[material * ComplexLanes<TLanes>.Stride]);

    /// <summary>Number of materials.</summary>
    public int Materials { get; private set; }

    /// <summary>Whether the light falls straight on the surface in all lanes.</summary>
    public bool IsNormal { get; private set; }

    /// <summary>Largest wave number in any material, in 1/nm.</summary>
    public double MostWave { get; private set; }

    /// <summary>Largest |kx0|, in 1/nm.</summary>
    public double MostAcross { get; private set; }

    /// <summary>Largest ratio of the sizes of two permittivities.</summary>
    public double MostContrast { get; private set; }

    /// <summary>Takes the light; permittivities, in their lanes, are set by the caller before.</summary>
    public void Set(ReadOnlySpan<double> k0, ReadOnlySpan<double> kx0, double periodNm)
    {
        int lanes = k0.Length;
        PeriodNm = periodNm;
        k0.CopyTo(_k0);
        kx0.CopyTo(_kx0);
        (IsNormal, MostWave, MostAcross, MostContrast) = (true, 0, 0, 1);
        for (int lane = 0; lane < lanes; lane++)
        {
            IsNormal &= kx0[lane] == 0;
            MostAcross = Math.Max(MostAcross, Math.Abs(kx0[lane]));
            double most = 0, least = double.PositiveInfinity;
            for (int material = 0; material < Materials; material++)
            {
                double squared = double.Hypot(_permittivities[2 * material * lanes + lane], _permittivities[(2 * material + 1) * lanes + lane]);
                (most, least) = (Math.Max(most, squared), Math.Min(least, squared));
            }
            MostWave = Math.Max(MostWave, k0[lane] * Math.Sqrt(most));
            MostContrast = Math.Max(MostContrast, most / least);
        }
    }

    /// <summary>Makes room for a number of lanes and materials.</summary>
    public void Reserve(int lanes, int materials)
    {
        Materials = materials;
        if (_k0.Length != lanes)
            (_k0, _kx0) = (new double[lanes], new double[lanes]);
        if (_permittivities.Length != 2 * lanes * materials)
            _permittivities = new double[2 * lanes * materials];
    }
}

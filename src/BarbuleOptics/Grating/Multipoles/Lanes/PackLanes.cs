using System.Numerics;
using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Multipoles.Lanes;

/// <summary>As many wavelengths as a vector has lanes, and all that depends on the wavelength alone: the media there.</summary>
/// <remarks>Media are numbered as in <see cref="Joining.StackPlan"/>. Lanes left over repeat the last wavelength.</remarks>
internal sealed class PackLanes<TLanes>
    where TLanes : struct, ILanes<TLanes>
{
    private readonly int[] _wavelengths = new int[TLanes.Count];
    private readonly LaneBuffer<TLanes> _reals = new();
    private readonly LaneBuffer<TLanes> _permittivities = new();
    private readonly LaneBuffer<TLanes> _k = new();
    private double[] _largest = [];
    private bool[] _absorbs = [];

    /// <summary>A pack.</summary>
    /// <param name="number">Its number among those of one solver, by which others keep what belongs to it.</param>
    public PackLanes(int number = 0)
    {
        Number = number;
        _reals.Reserve(1);
    }

    /// <summary>Its number among those of one solver.</summary>
    public int Number { get; }

    /// <summary>Number of lanes in use.</summary>
    public int Count { get; private set; }

    /// <summary>A number that changes whenever the wavelengths do.</summary>
    public int Version { get; private set; }

    /// <summary>Positions of the wavelengths in the structure.</summary>
    public ReadOnlySpan<int> Wavelengths => _wavelengths.AsSpan(0, Count);

    /// <summary>Vacuum wave numbers, in 1/nm.</summary>
    public TLanes K0 => _reals.Real(0);

    /// <summary>Index of the surround.</summary>
    public TLanes Index => _reals.Real(1);

    /// <summary>Permittivity of a medium.</summary>
    public ComplexLanes<TLanes> Permittivity(int medium) => _permittivities[medium];

    /// <summary>Wave number in a medium, in 1/nm; Im >= 0.</summary>
    public ComplexLanes<TLanes> WaveNumber(int medium) => _k[medium];

    /// <summary>The largest of their absolute values.</summary>
    public double LargestWaveNumber(int medium) => _largest[medium];

    /// <summary>Whether a medium absorbs in any lane.</summary>
    public bool Absorbs(int medium) => _absorbs[medium];

    /// <summary>Takes wavelengths over.</summary>
    /// <param name="structure">The structure.</param>
    /// <param name="wavelengths">Positions of at most as many wavelengths as there are lanes.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void Set(SectionPermittivities structure, ReadOnlySpan<int> wavelengths)
    {
        int media = structure.MaterialCount + 3;
        Count = wavelengths.Length;
        Version++;
        _permittivities.Reserve(media);
        _k.Reserve(media);
        if (_absorbs.Length != media)
            (_absorbs, _largest) = (new bool[media], new double[media]);
        Array.Clear(_absorbs);
        Array.Clear(_largest);
        for (int lane = 0; lane < TLanes.Count; lane++)
        {
            int wavelength = _wavelengths[lane] = wavelengths[Math.Min(lane, Count - 1)];
            double index = structure.SurroundIndex[wavelength], k0 = 2 * Math.PI / structure.WavelengthsNm[wavelength];
            Unsafe.Add(ref _reals.RealAt(0), lane) = k0;
            Unsafe.Add(ref _reals.RealAt(1), lane) = index;
            ReadOnlySpan<Complex> inside = structure.Inside(wavelength);
            for (int medium = 0; medium < inside.Length; medium++)
                SetMedium(medium, lane, inside[medium], k0);
            Complex backing = structure.Backing[wavelength];
            SetMedium(media - 3, lane, index * index, k0);
            SetMedium(media - 2, lane, backing, k0);
            SetMedium(media - 1, lane, structure.Behind.IsEmpty ? backing : structure.Behind[wavelength], k0);
        }
        for (int medium = 0; medium < media; medium++)
            _k[medium] = K0 * _permittivities[medium].PassiveRoot();
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void SetMedium(int medium, int lane, Complex permittivity, double k0)
    {
        Unsafe.Add(ref _permittivities.At(medium), lane) = permittivity.Real;
        Unsafe.Add(ref _permittivities.At(medium), lane + TLanes.Count) = permittivity.Imaginary;
        _absorbs[medium] |= permittivity.Imaginary != 0;
        _largest[medium] = Math.Max(_largest[medium], k0 * Math.Sqrt(Complex.Abs(permittivity)));
    }
}

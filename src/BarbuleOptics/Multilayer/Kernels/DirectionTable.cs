using System.Runtime.CompilerServices;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Multilayer.Kernels;

/// <summary>What the amplitude kernel reads for one direction of the light: rates of each medium and reflections of each face, vector after vector.</summary>
/// <remarks>Of each medium four vectors: turns of the round-trip phase a nm and growth in powers of two a nm (0 or below), for s and for p. Of
/// each face four: real and imaginary part of the reflection (eta above - eta below)/(eta above + eta below), for s and for p.
/// Two media more are <see cref="Surround"/> and <see cref="Backing"/>.</remarks>
internal sealed class DirectionTable
{
    /// <summary>A face where the sum of the admittances loses more of their sizes than this is left to the field recursion.</summary>
    private const double LeastSumShare = 0.05;

    private readonly int _lanes, _vectors, _media;
    private readonly LaneMemory _admittances;
    private double[] _growths = [];
    private int _faces, _used;

    /// <summary>Room for a number of media.</summary>
    public DirectionTable(int lanes, int vectors, int media)
    {
        (_lanes, _vectors, _media) = (lanes, vectors, media);
        Rates = new LaneMemory(Values * lanes * vectors * media);
        _admittances = new LaneMemory(Values * lanes * vectors * (media + 2));
        Steepness = new double[media];
        IsLossy = new bool[media];
    }

    /// <summary>Vectors of a medium or a face.</summary>
    public const int Values = 4;

    /// <summary>Angle of incidence in degrees; NaN while nothing is known.</summary>
    public double Degrees { get; private set; } = double.NaN;

    /// <summary>Rates of the media.</summary>
    public LaneMemory Rates { get; }

    /// <summary>Reflections of the faces.</summary>
    public LaneMemory Faces { get; private set; } = new(0);

    /// <summary>Doubles from one vector of wavelengths to the next in <see cref="Rates"/>.</summary>
    public int RateStride => Values * _lanes * _media;

    /// <summary>Doubles from one vector of wavelengths to the next in <see cref="Faces"/>.</summary>
    public int FaceStride => Values * _lanes * _growths.Length;

    /// <summary>For each medium the largest |2 kz| at any wavelength in either polarization, in radians a nm.</summary>
    public double[] Steepness { get; }

    /// <summary>For each medium whether a wave in it decays at any wavelength, in either polarization.</summary>
    public bool[] IsLossy { get; }

    /// <summary>Number that stands for the surround.</summary>
    public int Surround => _media;

    /// <summary>Number that stands for the backing.</summary>
    public int Backing => _media + 1;

    /// <summary>1 + the largest modulus of a face's reflection; infinite where the face is not for this kernel.</summary>
    public double GrowthOf(int face) => _growths[face];

    /// <summary>The largest of <see cref="Steepness"/>.</summary>
    public double MostSteepness => Steepness.Max();

    /// <summary>Forgets what it knows.</summary>
    public void Clear() => Degrees = double.NaN;

    /// <summary>Forgets the faces.</summary>
    public void ForgetFaces() => _faces = 0;

    /// <summary>Fills the media's part.</summary>
    public void Fill<TLanes>(FilmStack stack, int first, int count, double degrees, double sine, double cosine)
        where TLanes : struct, ILanes<TLanes>
    {
        Array.Clear(Steepness);
        Array.Clear(IsLossy);
        _used = LaneBlock.Vectors(count, _lanes);
        FillMedia<TLanes>(new MediaLanes<TLanes>(stack, first, count), stack.Media.MediumCount, sine, cosine);
        Degrees = degrees;
        _faces = 0;
    }

    /// <summary>Fills the faces that appeared since.</summary>
    public void FillFaces<TLanes>(PairRegistry pairs)
        where TLanes : struct, ILanes<TLanes>
    {
        if (_faces == pairs.Count)
            return;
        if (pairs.Count > _growths.Length)
        {
            // Vectors lie close together, for all of them are read at each pass.
            _growths = new double[_faces == 0 ? pairs.Count : 2 * pairs.Count];
            Faces = new LaneMemory(FaceStride * _vectors);
            _faces = 0;
        }
        FillFaces<TLanes>(pairs, _faces);
        _faces = pairs.Count;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void FillMedia<TLanes>(in MediaLanes<TLanes> media, int mediumCount, double sine, double cosine)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes one = TLanes.Broadcast(1);
        for (int vector = 0; vector < _used; vector++)
        {
            var light = new LightLanes<TLanes>(media.SurroundIndex(vector), sine, cosine);
            TLanes wavesPerNm = one / media.WavelengthNm(vector);
            for (int medium = 0; medium < mediumCount; medium++)
            {
                ComplexLanes<TLanes> x = media.X(medium, vector), y = media.Y(medium, vector), z = media.Z(medium, vector);
                ComplexLanes<TLanes> s = light.DepthS(y);
                (ComplexLanes<TLanes> p, ComplexLanes<TLanes> admittance, _, _) = light.WaveP(x, z);
                SetAdmittances(medium, vector, s, admittance);
                ref double rates = ref Rates[vector * RateStride + medium * Values * _lanes];
                SetRates(ref rates, medium, wavesPerNm, s);
                SetRates(ref Unsafe.Add(ref rates, 2 * TLanes.Count), medium, wavesPerNm, p);
            }
            TLanes zero = TLanes.Broadcast(0);
            SetAdmittances(_media, vector, new ComplexLanes<TLanes>(light.SurroundS, zero), new ComplexLanes<TLanes>(light.SurroundP, zero));
            ComplexLanes<TLanes> backing = media.Backing(vector);
            SetAdmittances(_media + 1, vector, light.DepthS(backing), light.WaveP(backing, backing).Admittance);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private void SetRates<TLanes>(ref double rates, int medium, TLanes wavesPerNm, in ComplexLanes<TLanes> depth)
        where TLanes : struct, ILanes<TLanes>
    {
        TLanes.Store(TLanes.Broadcast(2) * wavesPerNm * depth.Real, ref rates);
        TLanes.Store(TLanes.Broadcast(-4 * Math.PI / 0.693147180559945309) * wavesPerNm * depth.Imaginary, ref Unsafe.Add(ref rates, TLanes.Count));
        Steepness[medium] = Math.Max(Steepness[medium], LaneBlock.Largest(TLanes.Broadcast(4 * Math.PI) * wavesPerNm * TLanes.Sqrt(depth.Norm)));
        IsLossy[medium] |= TLanes.Any(TLanes.LessThan(TLanes.Broadcast(0), depth.Imaginary));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private void SetAdmittances<TLanes>(int medium, int vector, in ComplexLanes<TLanes> s, in ComplexLanes<TLanes> p)
        where TLanes : struct, ILanes<TLanes>
    {
        ref double place = ref AdmittanceOf(medium, vector);
        ComplexLanes<TLanes>.Store(s, ref place);
        ComplexLanes<TLanes>.Store(p, ref Unsafe.Add(ref place, ComplexLanes<TLanes>.Stride));
    }

    private ref double AdmittanceOf(int medium, int vector) => ref _admittances[(vector * (_media + 2) + medium) * Values * _lanes];

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void FillFaces<TLanes>(PairRegistry pairs, int from)
        where TLanes : struct, ILanes<TLanes>
    {
        _growths.AsSpan(from).Fill(1);
        for (int vector = 0; vector < _used; vector++)
        {
            for (int face = from; face < pairs.Count; face++)
            {
                (int above, int below) = pairs[face];
                ref double one = ref AdmittanceOf(above, vector), other = ref AdmittanceOf(below, vector);
                ref double place = ref Faces[vector * FaceStride + face * Values * _lanes];
                for (int part = 0; part < 2; part++)
                {
                    int at = part * ComplexLanes<TLanes>.Stride;
                    ComplexLanes<TLanes> upper = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref one, at)), lower = ComplexLanes<TLanes>.Load(ref Unsafe.Add(ref other, at));
                    ComplexLanes<TLanes> sum = upper + lower;
                    ComplexLanes<TLanes> reflection = (upper - lower) * sum.Reciprocal();
                    ComplexLanes<TLanes>.Store(reflection, ref Unsafe.Add(ref place, at));
                    double growth = 1 + Math.Sqrt(LaneBlock.Largest(reflection.Norm));
                    bool isSound = LaneBlock.Largest((upper.Norm + lower.Norm) / sum.Norm) < 1 / (LeastSumShare * LeastSumShare);
                    _growths[face] = isSound ? Math.Max(_growths[face], growth) : double.PositiveInfinity;
                }
            }
        }
    }
}

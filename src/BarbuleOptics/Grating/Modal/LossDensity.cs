using System.Numerics;

namespace BarbuleOptics.Grating.Modal;

/// <summary>Power lost in each material at one depth: k0^2 Im(e) times the mean over x of |E|^2 within it.</summary>
/// <remarks>Of the field across the rods the part along a wall is taken from E, the part along its normal from d, both of which are
/// smooth there (<see cref="CutOperators"/>); between walls the normal is continued like in the operators.</remarks>
internal sealed class LossDensity(SlabShape shape, int harmonics)
{
    private readonly SlabCut _cut = new(shape);
    private readonly Complex[] _inside = new Complex[4 * harmonics + 1];
    private readonly Complex[] _insideXX = new Complex[4 * harmonics + 1];
    private readonly Complex[] _insideXZ = new Complex[4 * harmonics + 1];

    /// <summary>Adds the loss at a depth, times <paramref name="weightNm"/>, to <paramref name="byMaterial"/>.</summary>
    /// <param name="interval">The interval of the depth.</param>
    /// <param name="zNm">The depth below the slab's top, in nm.</param>
    /// <param name="weightNm">Weight of integration, in nm.</param>
    /// <param name="waves">The harmonics.</param>
    /// <param name="permittivities">By the number of the material.</param>
    /// <param name="along">Ey by harmonic.</param>
    /// <param name="across">Ex and Ez by harmonic, times k0/i; empty where E is followed alone.</param>
    /// <param name="d">d_x and d_z by harmonic; empty where E is followed alone.</param>
    /// <param name="byMaterial">By the number of the material.</param>
    public void Add(
        SlabInterval interval, double zNm, double weightNm, ModalWaves waves, ReadOnlySpan<Complex> permittivities,
        ReadOnlySpan<Complex> along, (Complex[] X, Complex[] Z) across, (Complex[] X, Complex[] Z) d, Span<double> byMaterial)
    {
        _cut.Set(interval, zNm);
        double k2 = waves.K0 * waves.K0;
        for (int m = 0; m < permittivities.Length; m++)
        {
            if (permittivities[m].Imaginary == 0 || !_cut.TransformInside(m, _inside, _insideXX, _insideXZ))
                continue;
            double sum = along.IsEmpty ? 0 : k2 * Mean(_inside, along, along);
            if (waves.Field != RodField.Electric)
            {
                double normal = 1 / (permittivities[m] - waves.Alpha * waves.Alpha).Magnitude;
                sum += Mean(_inside, across.X, across.X) - Mean(_insideXX, across.X, across.X) + Mean(_insideXX, across.Z, across.Z)
                    - 2 * Mean(_insideXZ, across.X, across.Z);
                sum += normal * normal * (Mean(_insideXX, d.X, d.X) + Mean(_inside, d.Z, d.Z) - Mean(_insideXX, d.Z, d.Z) + 2 * Mean(_insideXZ, d.X, d.Z));
            }
            byMaterial[m] += weightNm * permittivities[m].Imaginary * sum;
        }
    }

    // Real part of the mean over x of conj(first) times a function times second.
    private double Mean(Complex[] coefficients, ReadOnlySpan<Complex> first, ReadOnlySpan<Complex> second)
    {
        double sum = 0;
        for (int a = 0; a < first.Length; a++)
        {
            Complex row = Complex.Zero;
            for (int b = 0; b < second.Length; b++)
                row += coefficients[a - b + 2 * harmonics] * second[b];
            sum += first[a].Real * row.Real + first[a].Imaginary * row.Imaginary;
        }
        return sum;
    }
}

using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using Amplitudes = MathNet.Numerics.LinearAlgebra.Vector<System.Numerics.Complex>;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>A second opinion on gratings: plain Fourier modal method with an eigenvalue problem in each slice.</summary>
/// <remarks>
/// Time factor exp(-i w t). Shares no code with the product: its own slices, equations (<see cref="PlainBasis"/>), modes
/// (<see cref="PlainModes"/>), and the reflection of everything below carried upward from the backing, where only decaying exponentials appear.
/// How near it comes, measured (<see cref="PlainModalTests"/>): films 1e-13; lamellar gratings of dielectrics 1e-5 at 40
/// harmonics in s and 3e-5 in p; metal in p 6e-3 at 10 and 2e-3 at 40 harmonics, like 1/N. A curved body is a staircase of
/// slices, each with vertical faces: in s the error falls with the square of the slices, in p like 1/N however thin they are
/// (the true field turns with the normal, the staircase's does not).
/// </remarks>
internal static class PlainModalSolver
{
    /// <summary>Powers of all orders.</summary>
    /// <param name="grating">What is lit.</param>
    /// <param name="light">The incident wave.</param>
    /// <param name="harmonics">Largest order kept, N: orders run from -N to N.</param>
    /// <param name="keepBoth">Whether both pairs of fields are kept where one would do.</param>
    public static PlainAnswer Solve(PlainGrating grating, PlainLight light, int harmonics, bool keepBoth = false)
    {
        var basis = new PlainBasis(grating, light, harmonics, keepBoth);
        Complex surround = grating.SurroundIndex * grating.SurroundIndex;
        PlainModes above = PlainModes.OfFilm(surround, basis), back = PlainModes.OfFilm(grating.Backing, basis);
        Amplitudes incident = Incident(grating, light, basis);

        // E and H at the top of what lies below, for unit amplitudes of its downward waves; the amplitudes themselves stand for
        // the path down to the backing.
        Matrix<Complex> e = back.W, h = back.V, path = Matrix<Complex>.Build.DenseIdentity(e.RowCount);
        var known = new Dictionary<string, PlainModes>();
        for (int s = grating.Slices.Count - 1; s >= 0; s--)
        {
            PlainSlice slice = grating.Slices[s];
            string pattern = slice.Pattern;
            if (!known.TryGetValue(pattern, out PlainModes? modes))
                known[pattern] = modes = PlainModes.Of(slice, basis);
            (Matrix<Complex> down, Matrix<Complex> up) = Split(modes, e, h);
            Matrix<Complex> fade = Diagonal([.. modes.Gamma.Select(g => Complex.Exp(Complex.ImaginaryOne * g * light.K0 * slice.ThicknessNm))]);
            Matrix<Complex> entered = down.Inverse() * fade;
            Matrix<Complex> returned = fade * (up * entered);
            e = modes.W * (Unit(e.RowCount) + returned);
            h = modes.V * (Unit(e.RowCount) - returned);
            path *= entered;
        }

        (Matrix<Complex> toDown, Matrix<Complex> toUp) = Split(above, e, h);
        Amplitudes first = toDown.Solve(incident);
        Amplitudes reflected = toUp * first, transmitted = path * first;
        double unit = Flux(above, basis, incident).Sum();
        return new PlainAnswer(
            [.. Flux(above, basis, reflected).Select(power => power / unit)], [.. Flux(back, basis, transmitted).Select(power => power / unit)]);
    }

    /// <summary>Downward and upward amplitudes of modes that make the fields e and h.</summary>
    private static (Matrix<Complex> Down, Matrix<Complex> Up) Split(PlainModes modes, Matrix<Complex> e, Matrix<Complex> h)
    {
        Matrix<Complex> sum = modes.W.Solve(e), difference = modes.V.Solve(h);
        return ((sum + difference) / 2, (sum - difference) / 2);
    }

    /// <summary>Tangential electric field of the incident wave: s along (-sin axis, cos axis), p in the plane of incidence.</summary>
    private static Amplitudes Incident(PlainGrating grating, PlainLight light, PlainBasis basis)
    {
        int zeroth = basis.K.Length / 2;
        Amplitudes incident = Amplitudes.Build.Dense(basis.HasX && basis.HasY ? 2 * basis.K.Length : basis.K.Length);
        double ex = light.IsP ? light.Across : -light.Along, ey = light.IsP ? light.Along : light.Across;
        if (basis.HasX)
            incident[basis.Place(true, zeroth)] = ex;
        if (basis.HasY)
            incident[basis.Place(false, zeroth)] = ey;
        return incident;
    }

    /// <summary>Power Re(Ex conj(Hy) - Ey conj(Hx)) of each order of plane waves of one direction.</summary>
    private static double[] Flux(PlainModes waves, PlainBasis basis, Amplitudes e)
    {
        Amplitudes h = waves.V * e;
        int count = basis.K.Length;
        bool both = basis.HasX && basis.HasY;
        return [.. Enumerable.Range(0, count).Select(i => (both
            ? e[i] * Complex.Conjugate(h[i + count]) - e[i + count] * Complex.Conjugate(h[i])
            : (basis.HasX ? 1 : -1) * e[i] * Complex.Conjugate(h[i])).Real)];
    }

    private static Matrix<Complex> Diagonal(Complex[] values) => Matrix<Complex>.Build.DiagonalOfDiagonalArray(values);

    private static Matrix<Complex> Unit(int size) => Matrix<Complex>.Build.DenseIdentity(size);
}

using MathNet.Numerics.LinearAlgebra;
using Complex = System.Numerics.Complex;

namespace BarbuleOptics.Tests.Multilayer;

/// <summary>A second way to solve a stack: Maxwell's equations for (Ex, Ey, Hx, Hy) as a first-order system, its matrix exponential by
/// scaling and squaring, and one linear system for the outgoing waves. Takes no root inside a film and no account of s and p there.
/// For films of a few wavelengths: what decays is not told from what grows.</summary>
/// <remarks>Berreman 1972, J. Opt. Soc. Am. 62, 502 (from memory); written out from curl E = i k0 H, curl H = -i k0 e E.</remarks>
internal sealed class MaxwellMatrix
{
    private const int Ex = 0, Ey = 1, Hx = 2, Hy = 3;
    private readonly TestStack _stack;
    private readonly double _k0;
    private readonly double _lateral; // kx/k0
    private readonly double _cosine;

    public MaxwellMatrix(TestStack stack, double degrees)
    {
        _stack = stack;
        _k0 = 2 * Math.PI / stack.WavelengthNm;
        _lateral = stack.SurroundIndex * Math.Sin(double.DegreesToRadians(degrees));
        _cosine = Math.Cos(double.DegreesToRadians(degrees));
    }

    /// <summary>R, T and the loss of each film, the last from the flux at its two faces.</summary>
    public Powers Solve(bool isP)
    {
        double n = _stack.SurroundIndex;
        Vector<Complex> incident = isP ? Wave(_cosine, n) : Wave(1, n * _cosine, isS: true);
        Vector<Complex>[] reflected = [Wave(1, -n * _cosine, isS: true), Wave(-_cosine, n)];
        Complex kz = Forward(_stack.Backing - _lateral * _lateral);
        Vector<Complex>[] transmitted = [Wave(1, kz, isS: true), Wave(kz, _stack.Backing)];

        // fields at the last face = through * (incident + reflected) = transmitted
        Matrix<Complex>[] films = [.. _stack.Films.Select(Exponential)];
        Matrix<Complex> through = films.Aggregate(Matrix<Complex>.Build.DenseIdentity(4), (above, film) => film * above);
        Matrix<Complex> system = Matrix<Complex>.Build.DenseOfColumnVectors(
            through * reflected[0], through * reflected[1], -transmitted[0], -transmitted[1]);
        Vector<Complex> amplitudes = system.Solve(-(through * incident));

        Vector<Complex> returned = reflected[0] * amplitudes[0] + reflected[1] * amplitudes[1];
        double unit = Flux(incident);
        Vector<Complex> field = incident + returned;
        double[] lost = new double[films.Length];
        for (int i = 0; i < films.Length; i++)
        {
            Vector<Complex> below = films[i] * field;
            lost[i] = (Flux(field) - Flux(below)) / unit;
            field = below;
        }
        return new Powers(-Flux(returned) / unit, Flux(field) / unit, lost.Sum(), lost);
    }

    // s: Ey = 1, Hx = -kz; p: Ex and Hy.
    private static Vector<Complex> Wave(Complex first, Complex second, bool isS = false)
        => Vector<Complex>.Build.Dense(isS ? [0, first, -second, 0] : [first, 0, 0, second]);

    private static double Flux(Vector<Complex> field)
        => (field[Ex] * Complex.Conjugate(field[Hy]) - field[Ey] * Complex.Conjugate(field[Hx])).Real;

    private static Complex Forward(Complex square)
    {
        Complex root = Complex.Sqrt(square);
        return root.Imaginary < 0 || (root.Imaginary == 0 && root.Real < 0) ? -root : root;
    }

    private Matrix<Complex> Exponential(Film film)
    {
        Complex i = Complex.ImaginaryOne;
        Matrix<Complex> rate = Matrix<Complex>.Build.Dense(4, 4);
        rate[Ex, Hy] = i * (1 - _lateral * _lateral / film.Permittivity.Z);
        rate[Hy, Ex] = i * film.Permittivity.X;
        rate[Ey, Hx] = -i;
        rate[Hx, Ey] = -i * (film.Permittivity.Y - _lateral * _lateral);
        const int Halvings = 12;
        Matrix<Complex> step = rate * (_k0 * film.ThicknessNm / (1 << Halvings));
        Matrix<Complex> term = Matrix<Complex>.Build.DenseIdentity(4);
        Matrix<Complex> sum = term;
        for (int n = 1; n <= 12; n++)
        {
            term = term * step / n;
            sum += term;
        }
        for (int n = 0; n < Halvings; n++)
            sum *= sum;
        return sum;
    }
}

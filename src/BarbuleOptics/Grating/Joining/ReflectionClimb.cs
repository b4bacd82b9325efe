using System.Numerics;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Takes a <see cref="Reflection"/> from the far side of a piece to the near side.</summary>
/// <remarks>
/// With G what the far side reflects, R and r the piece's own reflection on its near and far side, T into it and T' out of it again:
/// X = (1 - r G)^-1 T are the amplitudes that leave it on the far side, and R + T' G X is what the near side reflects.
/// No factor grows.
/// </remarks>
internal sealed class ReflectionClimb(int channels)
{
    private readonly ComplexMatrix _round = new(channels, channels);
    private readonly ComplexMatrix _back = new(channels, channels);
    private readonly LinearSolver _solver = new(channels);

    /// <summary>Through an element.</summary>
    /// <param name="block">The element.</param>
    /// <param name="fromBelow">Whether the light comes from below.</param>
    /// <param name="reflection">That of the far side; becomes that of the near side.</param>
    /// <param name="passed">Receives X.</param>
    /// <returns>False where there is no finite solution.</returns>
    public bool TryElement(ScatteringBlock block, bool fromBelow, Reflection reflection, ComplexMatrix passed)
    {
        ComplexMatrix own = fromBelow ? block.ReflectBottom : block.ReflectTop, far = fromBelow ? block.ReflectTop : block.ReflectBottom;
        ComplexMatrix inward = fromBelow ? block.TransmitUp : block.TransmitDown, outward = fromBelow ? block.TransmitDown : block.TransmitUp;
        SetTimes(_round, far, reflection);
        for (int row = 0; row < channels; row++)
        {
            Span<Complex> elements = _round.Row(row);
            for (int column = 0; column < channels; column++)
                elements[column] = -elements[column];
            elements[row] += Complex.One;
        }
        if (!_solver.TryFactor(_round))
            return false;
        passed.CopyFrom(inward);
        _solver.Solve(passed);
        SetTimes(_back, reflection, passed);
        ComplexMatrix result = reflection.MakeFull();
        result.CopyFrom(own);
        result.AddProduct(outward, _back);
        return true;
    }

    /// <summary>Through a plane between two media.</summary>
    /// <param name="near">Admittances on the near side.</param>
    /// <param name="far">Admittances on the far side.</param>
    /// <param name="reflection">That of the far side; becomes that of the near side.</param>
    /// <param name="passed">Receives X, unless the reflection is diagonal.</param>
    /// <returns>False where there is no finite solution.</returns>
    public bool TryInterface(ReadOnlySpan<Complex> near, ReadOnlySpan<Complex> far, Reflection reflection, ComplexMatrix passed)
    {
        if (reflection.IsDiagonal)
        {
            Span<Complex> diagonal = reflection.Diagonal;
            for (int i = 0; i < channels; i++)
            {
                Complex r = Bounce(near[i], far[i]);
                diagonal[i] = (r + diagonal[i]) / (Complex.One + r * diagonal[i]);
            }
            return true;
        }
        ComplexMatrix gamma = reflection.Full;
        passed.Clear();
        for (int row = 0; row < channels; row++)
        {
            Complex r = Bounce(near[row], far[row]);
            Span<Complex> from = gamma.Row(row), to = _round.Row(row);
            for (int column = 0; column < channels; column++)
                to[column] = r * from[column];
            to[row] += Complex.One;
            passed[row, row] = Complex.One + r;
        }
        if (!_solver.TryFactor(_round))
            return false;
        _solver.Solve(passed);
        _back.SetProduct(gamma, passed);
        for (int row = 0; row < channels; row++)
        {
            Complex r = Bounce(near[row], far[row]);
            Span<Complex> from = _back.Row(row), to = gamma.Row(row);
            for (int column = 0; column < channels; column++)
                to[column] = (Complex.One - r) * from[column];
            to[row] += r;
        }
        return true;
    }

    /// <summary>The factor by which a channel passes an interface behind which all is diagonal.</summary>
    public static Complex Passed(Complex near, Complex far, Complex reflection)
    {
        Complex r = Bounce(near, far);
        return (Complex.One + r) / (Complex.One + r * reflection);
    }

    // (near - far)/(near + far), of phi: what passes is 1 + r, and 1 - r the other way.
    private static Complex Bounce(Complex near, Complex far) => near == far ? Complex.Zero : (near - far) / (near + far);

    private static void SetTimes(ComplexMatrix result, ComplexMatrix left, Reflection right)
    {
        if (!right.IsDiagonal)
        {
            result.SetProduct(left, right.Full);
            return;
        }
        for (int row = 0; row < left.Rows; row++)
        {
            Span<Complex> from = left.Row(row), to = result.Row(row);
            for (int column = 0; column < from.Length; column++)
                to[column] = from[column] * right.Diagonal[column];
        }
    }

    private static void SetTimes(ComplexMatrix result, Reflection left, ComplexMatrix right)
    {
        if (!left.IsDiagonal)
        {
            result.SetProduct(left.Full, right);
            return;
        }
        for (int row = 0; row < right.Rows; row++)
        {
            Span<Complex> from = right.Row(row), to = result.Row(row);
            for (int column = 0; column < from.Length; column++)
                to[column] = left.Diagonal[row] * from[column];
        }
    }
}

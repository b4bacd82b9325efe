namespace BarbuleOptics.Grating.Modal;

/// <summary>The operators of one interval of upright walls over the crowded harmonics, for any direction.</summary>
/// <remarks>
/// With f = dx/du, [.] the matrix of Fourier products in u, D E = f dE/dx and xi = 1/e. Continuous across a wall are E, H, their slopes
/// in depth h = dH/dz, the flux f_E = dE/dx + alpha xi s, s = alpha f_E - h, and the field along z, proportional to (alpha f dE/dz + D H)/(f (e - alpha^2)).
/// So D E = (f - alpha^2 f xi) f_E + alpha f xi h gives f_E = A (D E - alpha X h), A = ([f] - alpha^2 X)^-1, X = [f xi];
/// -f xi s = (X + alpha^2 X A X) h - alpha X A D E; and Q = ([f e] - alpha^2 [f])^-1 stands between alpha f dE/dz + D H and its test functions.
/// </remarks>
internal sealed class CrowdedOperators
{
    /// <summary>Operators over 2 N + 1 harmonics.</summary>
    public CrowdedOperators(int harmonics)
    {
        int count = 2 * harmonics + 1;
        (Permittivity, Q, A) = (new ComplexMatrix(count, count), new ComplexMatrix(count, count), new ComplexMatrix(count, count));
        (QSlope, SlopeQ, SlopeQSlope) = (new ComplexMatrix(count, count), new ComplexMatrix(count, count), new ComplexMatrix(count, count));
        (X, AX, XA) = (new ComplexMatrix(count, count), new ComplexMatrix(count, count), new ComplexMatrix(count, count));
        XWhole = new ComplexMatrix(count, count);
    }

    /// <summary>[f e].</summary>
    public ComplexMatrix Permittivity { get; }

    /// <summary>Q.</summary>
    public ComplexMatrix Q { get; }

    /// <summary>A.</summary>
    public ComplexMatrix A { get; }

    /// <summary>Q [f].</summary>
    public ComplexMatrix QSlope { get; }

    /// <summary>[f] Q.</summary>
    public ComplexMatrix SlopeQ { get; }

    /// <summary>[f] Q [f].</summary>
    public ComplexMatrix SlopeQSlope { get; }

    /// <summary>[f/e].</summary>
    public ComplexMatrix X { get; }

    /// <summary>A X.</summary>
    public ComplexMatrix AX { get; }

    /// <summary>X A.</summary>
    public ComplexMatrix XA { get; }

    /// <summary>X + alpha^2 X A X.</summary>
    public ComplexMatrix XWhole { get; }
}

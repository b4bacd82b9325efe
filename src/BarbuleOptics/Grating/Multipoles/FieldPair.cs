using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>A 2 by 2 matrix between the electric and the magnetic field along the rods, of one multipole order.</summary>
internal readonly record struct FieldPair(Complex EE, Complex EH, Complex HE, Complex HH)
{
    /// <summary>No coupling between the fields.</summary>
    public static FieldPair Diagonal(Complex electric, Complex magnetic) => new(electric, Complex.Zero, Complex.Zero, magnetic);

    public static FieldPair operator +(in FieldPair x, in FieldPair y) => new(x.EE + y.EE, x.EH + y.EH, x.HE + y.HE, x.HH + y.HH);

    public static FieldPair operator -(in FieldPair x, in FieldPair y) => new(x.EE - y.EE, x.EH - y.EH, x.HE - y.HE, x.HH - y.HH);

    public static FieldPair operator *(Complex factor, in FieldPair x) => new(factor * x.EE, factor * x.EH, factor * x.HE, factor * x.HH);

    public static FieldPair operator *(in FieldPair x, in FieldPair y) => new(
        x.EE * y.EE + x.EH * y.HE, x.EE * y.EH + x.EH * y.HH, x.HE * y.EE + x.HH * y.HE, x.HE * y.EH + x.HH * y.HH);

    /// <summary>The inverse; not finite where there is none.</summary>
    public FieldPair Inverse()
    {
        Complex inverse = 1 / (EE * HH - EH * HE);
        return new FieldPair(HH * inverse, -EH * inverse, -HE * inverse, EE * inverse);
    }
}

namespace BarbuleOptics.Grating.Modal;

/// <summary>The unknowns at one depth: combinations of the harmonics of E, then those of H.</summary>
/// <param name="Electric">Combinations of E = Ey; none where H is followed alone.</param>
/// <param name="Magnetic">Combinations of H = Hy; none where E is followed alone.</param>
internal readonly record struct ModalSector(FieldBasis Electric, FieldBasis Magnetic)
{
    /// <summary>Number of unknowns.</summary>
    public int Size => Electric.Count + Magnetic.Count;

    /// <summary>Sign of the equations of H: with both fields they are taken negative, which makes the whole symmetric where the
    /// bodies have an upright mirror axis.</summary>
    public double MagneticSign => Electric.Count > 0 ? -1 : 1;

    /// <summary>The sectors that do not mix.</summary>
    /// <param name="harmonics">Largest harmonic, N.</param>
    /// <param name="field">Which fields are followed.</param>
    /// <param name="split">Whether even and odd combinations are told apart: a mirror turns Hy of the other parity than Ey.</param>
    public static ModalSector[] Of(int harmonics, RodField field, bool split)
    {
        FieldBasis all = FieldBasis.All(harmonics), even = FieldBasis.Even(harmonics), odd = FieldBasis.Odd(harmonics);
        return (field, split) switch
        {
            (RodField.Electric, false) => [new(all, FieldBasis.None)],
            (RodField.Electric, true) => [new(even, FieldBasis.None), new(odd, FieldBasis.None)],
            (RodField.Magnetic, false) => [new(FieldBasis.None, all)],
            (RodField.Magnetic, true) => [new(FieldBasis.None, even), new(FieldBasis.None, odd)],
            (_, false) => [new(all, all)],
            _ => [new(even, odd), new(odd, even)],
        };
    }
}

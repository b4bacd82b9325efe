using BarbuleOptics.Grating.Multipoles;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>What the elements of one thread share: lattice sums by the period and remainder they serve, answers of flattened rods by their outlines.</summary>
internal sealed class SharedAnswers
{
    private readonly Dictionary<(double PeriodNm, int Cell), LatticeSums> _sums = [];
    private readonly Dictionary<(Outline Outer, Outline? Core, int Material, int CoreMaterial), EllipseBank> _ellipses = [];

    /// <summary>The sums of one period and remainder.</summary>
    public LatticeSums Of(double periodNm, int cell)
    {
        if (!_sums.TryGetValue((periodNm, cell), out LatticeSums? sums))
            sums = _sums[(periodNm, cell)] = new LatticeSums();
        return sums;
    }

    /// <summary>The answers of one flattened rod, wherever its planes lie.</summary>
    public EllipseBank Of(CellRod rod)
    {
        (Outline, Outline?, int, int) key = (rod.Outer, rod.Core, rod.Material, rod.CoreMaterial);
        if (!_ellipses.TryGetValue(key, out EllipseBank? bank))
            bank = _ellipses[key] = new EllipseBank(Ellipse(rod.Outer), rod.Core is Outline core ? Ellipse(core) : default, rod.Material, rod.CoreMaterial);
        return bank;
    }

    private static EllipseOutline Ellipse(Outline outline) => new(outline.HalfWidthNm, outline.HalfHeightNm);
}

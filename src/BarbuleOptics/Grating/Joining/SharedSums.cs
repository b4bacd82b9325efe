using BarbuleOptics.Grating.Multipoles;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Lattice sums by the period and remainder they serve.</summary>
internal sealed class SharedSums
{
    private readonly Dictionary<(double PeriodNm, int Cell), LatticeSums> _sums = [];

    /// <summary>The sums of one period and remainder.</summary>
    public LatticeSums Of(double periodNm, int cell)
    {
        if (!_sums.TryGetValue((periodNm, cell), out LatticeSums? sums))
            sums = _sums[(periodNm, cell)] = new LatticeSums();
        return sums;
    }
}

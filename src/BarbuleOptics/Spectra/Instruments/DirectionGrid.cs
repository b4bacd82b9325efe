namespace BarbuleOptics.Spectra.Instruments;

/// <summary>The few directions at which a structure is solved so that the signal of an instrument follows as a weighted sum.</summary>
/// <remarks>The weights of the points depend on the instrument alone, so that one sum serves every wavelength.</remarks>
internal sealed class DirectionGrid(LocalDirections directions)
{
    private readonly DirectionBox _box = new(directions.Samples.Select(direction => (direction.SineSquared, direction.AcrossShare)));

    /// <summary>Highest useful level in the angle of incidence.</summary>
    public int MostSine => _box.MostSine;

    /// <summary>Highest useful level in azimuth.</summary>
    public int MostAcross => _box.MostAcross;

    /// <summary>Points and weights at two levels; points without weight are left out.</summary>
    public List<GridDirection> At(int sineLevel, int acrossLevel)
    {
        double[] sums = new double[DirectionBox.Count(sineLevel, acrossLevel)], one = new double[sums.Length];
        foreach (LocalDirection direction in directions.Samples)
        {
            _box.Fill(direction.SineSquared, direction.AcrossShare, sineLevel, acrossLevel, one);
            for (int i = 0; i < sums.Length; i++)
                sums[i] += direction.Weight * one[i];
        }
        double least = 1e-9 * directions.Share;
        return [.. _box.Nodes(sineLevel, acrossLevel).Zip(sums, (node, weight) => node with { Weight = weight }).Where(node => Math.Abs(node.Weight) > least)];
    }
}

using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Prediction;

/// <summary>Where a solver writes the account of a block of wavelengths, row after row.</summary>
internal sealed class BeamScratch(BeamAccount beam, int length)
{
    private readonly double[] _reflected = new double[beam.Sides[0].Fan.Count * length];
    private readonly double[] _transmitted = new double[beam.Sides[1].Fan.Count * length];
    private readonly double[] _losses = new double[beam.Losses.Length * length];
    private readonly double[] _errors = new double[length];

    /// <summary>The same response with places for the account.</summary>
    public SolverResponse Within(SolverResponse powers) => new()
    {
        Reflectance = powers.Reflectance,
        Transmittance = powers.Transmittance,
        Absorptance = powers.Absorptance,
        DiffractedReflectance = powers.DiffractedReflectance,
        MaterialAbsorptance = _losses,
        ReflectedOrders = _reflected,
        TransmittedOrders = _transmitted,
        ErrorEstimates = _errors,
    };

    /// <summary>Copies the rows to their places in the account of the whole grid.</summary>
    public void CopyTo(BeamAccount account, int first)
    {
        Copy(_reflected, account.Sides[0].Efficiencies, first);
        Copy(_transmitted, account.Sides[1].Efficiencies, first);
        Copy(_losses, account.Losses, first);
        _errors.CopyTo(account.Errors.AsSpan(first));
    }

    private void Copy(double[] block, double[][] rows, int first)
    {
        for (int row = 0; row < rows.Length; row++)
            block.AsSpan(row * length, length).CopyTo(rows[row].AsSpan(first));
    }
}

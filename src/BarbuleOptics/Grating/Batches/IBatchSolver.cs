namespace BarbuleOptics.Grating.Batches;

/// <summary>Solves one section for whole blocks of wavelengths; belongs to one thread.</summary>
internal interface IBatchSolver
{
    /// <summary>Fills the answers, those of one wavelength after another.</summary>
    /// <param name="request">What is asked for.</param>
    /// <param name="electric">Receives those with the electric field along the rods; empty when not asked for.</param>
    /// <param name="magnetic">Receives those with the magnetic field along them.</param>
    /// <remarks>Where a wavelength has to be left to the scalar code its error is NaN.</remarks>
    void Solve(in BatchRequest request, Span<double> electric, Span<double> magnetic);
}

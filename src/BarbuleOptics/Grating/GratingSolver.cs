using BarbuleOptics.Grating.Batches;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Grating;

/// <summary>Solves a section as it is: infinite, flat and perfectly periodic, with every order of diffraction.</summary>
/// <remarks>
/// Rows of round rods by multipoles, other bodies by Fourier modal slabs, joined with flat interfaces and films by a recursion in which nothing
/// grows. Resolution rises until answers agree; the estimate returned says to what. R counts both outgoing polarizations. The powers
/// R, diffracted R, T and A are found one by one, none as what is left of the others, and that they add up to 1 is tested. A of a row of rods
/// is integrated over the rods; that of a modal slab is the net power through its two planes, which Galerkin's method makes equal to its loss, and the
/// integral over the bodies only splits it among several materials.
/// </remarks>
public sealed class GratingSolver : ISpectralSolver<SectionPermittivities, GratingWorkspace>
{
    /// <summary>One group of a batch.</summary>
    private const int VectorBlock = 64;

    /// <summary>Enough for what one wavelength teaches the next.</summary>
    private const int ScalarBlock = 16;

    /// <summary>A solver that refines until its estimate of the largest error of R, T, A and diffracted R is <paramref name="accuracy"/> or less.</summary>
    /// <param name="accuracy">Largest absolute error asked for; above 0.</param>
    public GratingSolver(double accuracy) => Accuracy = Guard.Positive(accuracy);

    /// <summary>Largest absolute error asked for.</summary>
    public double Accuracy { get; }

    /// <summary>Wavelengths that are best solved together.</summary>
    internal static int BlockOf(Section section) => BatchSolvers.Covers(section) ? VectorBlock : ScalarBlock;

    /// <inheritdoc/>
    public GratingWorkspace CreateWorkspace(SectionPermittivities structure)
    {
        ArgumentNullException.ThrowIfNull(structure);
        return new GratingWorkspace(structure.Section);
    }

    /// <inheritdoc/>
    /// <exception cref="ArgumentException">A span that is to be filled has the wrong length, no polarization is asked for, or the workspace was made
    /// for another section.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The block lies outside the structure's wavelengths, or the angle outside 0 to below
    /// 90 degrees.</exception>
    /// <exception cref="ArithmeticException">The equations have no finite solution at some wavelength.</exception>
    public double Solve(SectionPermittivities structure, in SolverRequest request, GratingWorkspace workspace, in SolverResponse response)
    {
        GratingRequestCheck.Check(structure, request, workspace, response);
        var layout = new OutcomeLayout(
            structure.MaterialCount, workspace.Solver.BackingMaterial, Most(response.ReflectedOrders, request.Count), Most(response.TransmittedOrders, request.Count));
        bool hasTransmitted = (request.Outputs & SolverOutputs.Transmittance) != 0 || !response.TransmittedOrders.IsEmpty;
        bool hasLost = (request.Outputs & SolverOutputs.Absorptance) != 0 || !response.MaterialAbsorptance.IsEmpty;
        workspace.Prepare(structure, request, layout, hasTransmitted, hasLost);
        if ((request.Polarization & ~workspace.Known) != 0)
            SolveBlock(structure, request, workspace, layout, hasTransmitted, hasLost);
        return Fill(request, workspace, layout, response);
    }

    private static int Most(ReadOnlySpan<double> orders, int count) => orders.IsEmpty || count == 0 ? 0 : (orders.Length / count - 1) / 2;

    private void SolveBlock(
        SectionPermittivities structure, in SolverRequest request, GratingWorkspace workspace, in OutcomeLayout layout, bool hasTransmitted, bool hasLost)
    {
        (double across, double along) = IncidentDirection.Of(structure.Section, request.Incidence);
        workspace.Solver.StartBlock();
        if (along != 0)
        {
            for (int at = 0; at < request.Count; at++)
            {
                workspace.Solver.Solve(
                    structure, request.First + at, request.Incidence, RodField.Both, Accuracy, layout, workspace.Outcome(at, Polarizations.S), workspace.Outcome(at, Polarizations.P));
            }
            workspace.Mark(Polarizations.Unpolarized);
            return;
        }
        // With the light straight from above rods at an angle need both fields.
        bool turns = across == 0 && !structure.Section.IsAcross;
        Polarizations wanted = turns ? Polarizations.Unpolarized : request.Polarization & ~workspace.Known;
        if (workspace.Batch is IBatchSolver batch)
        {
            // The sine of the complement keeps its digits at grazing incidence.
            var asked = new BatchRequest(
                structure, request.First, request.Count, across, Math.Sin(double.DegreesToRadians(90 - request.Incidence.Degrees)), Accuracy, hasTransmitted, hasLost, layout);
            batch.Solve(
                asked, (wanted & Polarizations.S) != 0 ? workspace.Outcomes(Polarizations.S) : [], (wanted & Polarizations.P) != 0 ? workspace.Outcomes(Polarizations.P) : []);
        }
        SolveOneByOne(structure, request, workspace, layout, wanted);
        for (int at = 0; at < request.Count && turns; at++)
            Turn(structure.Section, workspace.Outcome(at, Polarizations.S), workspace.Outcome(at, Polarizations.P));
        workspace.Mark(wanted);
    }

    // The wavelengths that the batch left, whose error is not a number; all of them without one.
    private void SolveOneByOne(
        SectionPermittivities structure, in SolverRequest request, GratingWorkspace workspace, in OutcomeLayout layout, Polarizations wanted)
    {
        for (int at = 0; at < request.Count; at++)
        {
            Span<double> s = workspace.Outcome(at, Polarizations.S), p = workspace.Outcome(at, Polarizations.P);
            if ((wanted & Polarizations.S) != 0 && (workspace.Batch is null || double.IsNaN(s[OutcomeLayout.Error])))
                workspace.Solver.Solve(structure, request.First + at, request.Incidence, RodField.Electric, Accuracy, layout, s, []);
            if ((wanted & Polarizations.P) != 0 && (workspace.Batch is null || double.IsNaN(p[OutcomeLayout.Error])))
                workspace.Solver.Solve(structure, request.First + at, request.Incidence, RodField.Magnetic, Accuracy, layout, p, []);
        }
    }

    // At normal incidence s has its electric field at the axis angle from the rods, and the powers of both parts add.
    private static void Turn(Section section, Span<double> s, Span<double> p)
    {
        double cosine = section.IsAlong ? 0 : Math.Cos(section.Axis.Radians);
        double alongRods = cosine * cosine, acrossRods = section.IsAlong ? 1 : Math.Sin(section.Axis.Radians) * Math.Sin(section.Axis.Radians);
        for (int i = 0; i < s.Length; i++)
            (s[i], p[i]) = (alongRods * s[i] + acrossRods * p[i], acrossRods * s[i] + alongRods * p[i]);
    }

    private static double Fill(in SolverRequest request, GratingWorkspace workspace, in OutcomeLayout layout, in SolverResponse response)
    {
        double largest = 0;
        for (int at = 0; at < request.Count; at++)
        {
            ReadOnlySpan<double> outcome = workspace.Mean(at, request.Polarization);
            largest = Math.Max(largest, outcome[OutcomeLayout.Error]);
            Set(response.Reflectance, at, outcome[OutcomeLayout.Reflected]);
            Set(response.DiffractedReflectance, at, outcome[OutcomeLayout.Diffracted]);
            Set(response.ErrorEstimates, at, outcome[OutcomeLayout.Error]);
            if ((request.Outputs & SolverOutputs.Transmittance) != 0)
                Set(response.Transmittance, at, outcome[OutcomeLayout.Transmitted]);
            if ((request.Outputs & SolverOutputs.Absorptance) != 0)
                Set(response.Absorptance, at, outcome[OutcomeLayout.Lost]);
            Spread(response.MaterialAbsorptance, at, request.Count, outcome.Slice(OutcomeLayout.FirstMaterial, layout.Materials));
            Spread(response.ReflectedOrders, at, request.Count, outcome.Slice(layout.ReflectedZeroth - layout.MostReflected, 2 * layout.MostReflected + 1));
            Spread(response.TransmittedOrders, at, request.Count, outcome.Slice(layout.TransmittedZeroth - layout.MostTransmitted, 2 * layout.MostTransmitted + 1));
        }
        return largest;
    }

    private static void Set(Span<double> values, int at, double value)
    {
        if (!values.IsEmpty)
            values[at] = value;
    }

    private static void Spread(Span<double> values, int at, int count, ReadOnlySpan<double> ofOne)
    {
        for (int i = 0; i < ofOne.Length && !values.IsEmpty; i++)
            values[i * count + at] = ofOne[i];
    }
}

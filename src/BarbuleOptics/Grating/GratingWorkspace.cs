using BarbuleOptics.Grating.Batches;
using BarbuleOptics.Grating.Joining;
using BarbuleOptics.Lanes;
using BarbuleOptics.Layering;
using BarbuleOptics.Multilayer;

namespace BarbuleOptics.Grating;

/// <summary>Scratch memory of <see cref="GratingSolver"/> for one section; not to be shared between threads.</summary>
/// <remarks>It keeps the answers for s and p of the last block and direction, since some mountings give both at once.</remarks>
public sealed class GratingWorkspace
{
    private SectionPermittivities? _structure;
    private SolverRequest _request;
    private OutcomeLayout _layout;
    private bool _hasTransmitted, _hasLost;
    private double[] _s = [];
    private double[] _p = [];
    private double[] _mean = [];

    /// <summary>Memory for one section.</summary>
    /// <param name="section">The section.</param>
    /// <param name="slabsOnly">Whether round rods are left to the method for any section, to hold one method to the other.</param>
    /// <param name="width">Width of vectors; null for the readable code, one wavelength at a time.</param>
    internal GratingWorkspace(Section section, bool slabsOnly, LaneWidth? width)
    {
        Section = section;
        Solver = new SectionSolver(section, slabsOnly);
        if (!slabsOnly && width is LaneWidth given)
            Batch = BatchSolvers.TryCreate(section, given);
    }

    /// <summary>Memory for one section.</summary>
    internal GratingWorkspace(Section section, bool slabsOnly = false)
        : this(section, slabsOnly, LaneWidth.Default)
    {
    }

    internal Section Section { get; }

    internal SectionSolver Solver { get; }

    /// <summary>Solves whole blocks of wavelengths; null where the section is not for it.</summary>
    internal IBatchSolver? Batch { get; }

    /// <summary>Which answers stand.</summary>
    internal Polarizations Known { get; private set; }

    /// <summary>Gets ready for a block; answers already known for it stay.</summary>
    internal void Prepare(SectionPermittivities structure, in SolverRequest request, in OutcomeLayout layout, bool hasTransmitted, bool hasLost)
    {
        bool same = ReferenceEquals(structure, _structure) && request.First == _request.First && request.Count == _request.Count
            && request.Incidence == _request.Incidence && layout == _layout && (hasTransmitted, hasLost) == (_hasTransmitted, _hasLost);
        if (!same)
            Known = Polarizations.None;
        (_structure, _request, _layout, _hasTransmitted, _hasLost) = (structure, request, layout, hasTransmitted, hasLost);
        if (_s.Length < layout.Length * request.Count)
            (_s, _p) = (new double[layout.Length * request.Count], new double[layout.Length * request.Count]);
    }

    /// <summary>Notes which answers have been filled.</summary>
    internal void Mark(Polarizations known) => Known |= known;

    /// <summary>The answers for the whole block, one wavelength after another.</summary>
    internal Span<double> Outcomes(Polarizations polarization)
        => (polarization == Polarizations.P ? _p : _s).AsSpan(0, _request.Count * _layout.Length);

    /// <summary>The answer for one wavelength of the block.</summary>
    internal Span<double> Outcome(int at, Polarizations polarization)
        => (polarization == Polarizations.P ? _p : _s).AsSpan(at * _layout.Length, _layout.Length);

    /// <summary>The answer for one wavelength of the block and one polarization or the mean of both.</summary>
    internal ReadOnlySpan<double> Mean(int at, Polarizations polarization)
    {
        if (polarization != Polarizations.Unpolarized)
            return Outcome(at, polarization);
        if (_mean.Length != _layout.Length)
            _mean = new double[_layout.Length];
        ReadOnlySpan<double> s = Outcome(at, Polarizations.S), p = Outcome(at, Polarizations.P);
        for (int i = 0; i < _mean.Length; i++)
            _mean[i] = (s[i] + p[i]) / 2;
        _mean[OutcomeLayout.Error] = Math.Max(s[OutcomeLayout.Error], p[OutcomeLayout.Error]);
        return _mean;
    }
}

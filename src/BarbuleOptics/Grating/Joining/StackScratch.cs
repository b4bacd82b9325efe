using System.Numerics;

namespace BarbuleOptics.Grating.Joining;

/// <summary>Memory for stacks of one number of channels.</summary>
internal sealed class StackScratch
{
    private readonly ScatteringBlock?[] _blocks;
    private readonly List<Reflection> _reflections = [];
    private readonly List<ComplexMatrix> _passed = [];
    private readonly List<Reflection> _boundaries = [];

    public StackScratch(int channels, int kinds)
    {
        Channels = channels;
        _blocks = new ScatteringBlock?[kinds];
        Climb = new ReflectionClimb(channels);
        Current = new Reflection(channels);
        Near = new Complex[channels];
        Back = new Complex[channels];
        Factors = new Complex[channels];
        Phases = new Complex[channels];
        Conjugates = new Complex[channels];
        Work = new Complex[channels];
    }

    /// <summary>Number of channels.</summary>
    public int Channels { get; }

    /// <summary>Does the matrix algebra.</summary>
    public ReflectionClimb Climb { get; }

    /// <summary>The reflection at the plane reached.</summary>
    public Reflection Current { get; }

    /// <summary>Amplitudes that go, at the plane reached.</summary>
    public Complex[] Near { get; }

    /// <summary>Amplitudes that come back.</summary>
    public Complex[] Back { get; }

    /// <summary>exp(i kz d) of a layer.</summary>
    public Complex[] Factors { get; }

    /// <summary>Phases of orders between two places along the surface.</summary>
    public Complex[] Phases { get; }

    /// <summary>Their conjugates.</summary>
    public Complex[] Conjugates { get; }

    /// <summary>For results that replace their operand.</summary>
    public Complex[] Work { get; }

    /// <summary>The answer of one kind of element.</summary>
    public ScatteringBlock Block(int kind) => _blocks[kind] ??= new ScatteringBlock(Channels);

    /// <summary>The reflection on the far side of the piece at a place of the segment.</summary>
    public Reflection FarSide(int place) => At(_reflections, place, Channels);

    /// <summary>The reflection on the far side of a segment.</summary>
    public Reflection Boundary(int segment) => At(_boundaries, segment, Channels);

    /// <summary>X of the piece at a place of the segment.</summary>
    public ComplexMatrix Passed(int place)
    {
        while (_passed.Count <= place)
            _passed.Add(new ComplexMatrix(Channels, Channels));
        return _passed[place];
    }

    private static Reflection At(List<Reflection> list, int place, int channels)
    {
        while (list.Count <= place)
            list.Add(new Reflection(channels));
        return list[place];
    }
}

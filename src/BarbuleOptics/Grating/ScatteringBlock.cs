namespace BarbuleOptics.Grating;

/// <summary>How one piece of the section answers waves in the matrix that fall on it from both sides.</summary>
/// <remarks>
/// Amplitudes are those of the fields along the rods (<see cref="GratingWaves"/>), downward waves exp(+i kz z) and upward waves
/// exp(-i kz z), referred to the piece's own top plane above it and to its own bottom plane below it, as if the matrix filled both
/// sides; a plane may cut through a body, the matrix next to it is then infinitely thin. x = 0 is the piece's own origin.
/// With a the downward waves at the top plane and b the upward waves at the bottom plane,
/// upward at the top = ReflectTop a + TransmitUp b, downward at the bottom = TransmitDown a + ReflectBottom b.
/// </remarks>
internal sealed class ScatteringBlock(int channels)
{
    /// <summary>Number of channels.</summary>
    public int Channels { get; } = channels;

    /// <summary>Downward at the top into upward at the top.</summary>
    public ComplexMatrix ReflectTop { get; } = new(channels, channels);

    /// <summary>Downward at the top into downward at the bottom.</summary>
    public ComplexMatrix TransmitDown { get; } = new(channels, channels);

    /// <summary>Upward at the bottom into upward at the top.</summary>
    public ComplexMatrix TransmitUp { get; } = new(channels, channels);

    /// <summary>Upward at the bottom into downward at the bottom.</summary>
    public ComplexMatrix ReflectBottom { get; } = new(channels, channels);
}

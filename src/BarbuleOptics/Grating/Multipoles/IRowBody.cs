using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>How one body of a row answers the multipoles that fall on it; symmetric about both axes. Kept from call to call until the
/// wavelength, ky or the materials change.</summary>
internal interface IRowBody
{
    /// <summary>Radius of the circle round the body, in nm. Incoming amplitudes are held as a_m s^m/m!, outgoing ones as b_m m!/s^m, with
    /// s = |k| times this over 2.</summary>
    double RadiusNm { get; }

    /// <summary>Whether each multipole answers itself alone; otherwise all of equal parity answer.</summary>
    bool IsRound { get; }

    /// <summary>Distance from the line of centers beyond which the plane waves that the body sends out describe its field, in nm: its field, continued
    /// into the body, has no end farther out. Planes nearer than this would part what cannot be parted.</summary>
    double LeastPlaneNm { get; }

    /// <summary>Multipoles that waves of decay or change <paramref name="kx"/> along the row need, in 1/nm; with fewer they are left out.</summary>
    int MultipolesFor(double kx);

    /// <summary>Makes multipoles 0 to <paramref name="top"/> ready.</summary>
    /// <returns>False where the body cannot be solved well.</returns>
    bool TryPrepare(GratingWaves waves, int top);

    /// <summary>Outgoing amplitude of one multipole from an incoming one.</summary>
    /// <param name="to">0 for Ey, 1 for Hy.</param>
    /// <param name="from">0 for Ey, 1 for Hy.</param>
    /// <param name="electricEven">The half, see <see cref="MirrorHalf"/>.</param>
    /// <param name="outgoing">Outgoing multipole.</param>
    /// <param name="incoming">Incoming multipole.</param>
    Complex Answer(int to, int from, bool electricEven, int outgoing, int incoming);

    /// <summary>Power that goes into the body and into its core, times the period, from the amplitudes of one half on body number
    /// <paramref name="number"/> of the cell.</summary>
    (double Body, double Core) PowerInto(GratingWaves waves, MirrorHalf half, int number);
}

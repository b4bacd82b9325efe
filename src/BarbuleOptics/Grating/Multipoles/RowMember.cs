using System.Numerics;

namespace BarbuleOptics.Grating.Multipoles;

/// <summary>A body in its place in the cell of a row, with the plane waves as its multipoles.</summary>
/// <param name="body">The body; its own, not shared with other places.</param>
/// <param name="place">Its place along x, in parts of the period, from the row's origin.</param>
/// <param name="hasCore">Whether it has a core.</param>
/// <param name="material">Number of its material.</param>
/// <param name="coreMaterial">Number of its core's material; anything where there is none.</param>
internal sealed class RowMember(IRowBody body, int place, bool hasCore, int material, int coreMaterial)
{
    /// <summary>The body.</summary>
    public IRowBody Body { get; } = body;

    /// <summary>Its place along x, in parts of the period.</summary>
    public int Place { get; } = place;

    /// <summary>Number of its material.</summary>
    public int Material { get; } = material;

    /// <summary>Number of its core's material.</summary>
    public int CoreMaterial { get; } = coreMaterial;

    /// <summary>Whether it has a core.</summary>
    public bool HasCore { get; } = hasCore;

    /// <summary>Waves of amplitude 1 at the origin as they reach the body.</summary>
    public MultipoleWaves Arriving { get; } = new();

    /// <summary>What the body's multipoles add to waves as they stand at the origin; for a body there the same table.</summary>
    public MultipoleWaves Leaving => _leaving ?? Arriving;

    private readonly MultipoleWaves? _leaving = place == 0 ? null : new();

    /// <summary>Makes room for <paramref name="waves"/> waves and multipoles 0 to <paramref name="top"/>.</summary>
    public void Resize(int waves, int top)
    {
        Arriving.Resize(waves, top);
        _leaving?.Resize(waves, top);
    }

    /// <summary>Fills the tables of one wave.</summary>
    /// <param name="wave">Its number.</param>
    /// <param name="order">Its order.</param>
    /// <param name="parts">Parts of the period that places are counted in.</param>
    /// <param name="cosine">kx/k.</param>
    /// <param name="sine">kz/k.</param>
    /// <param name="s">Half of |k| times the radius.</param>
    /// <remarks>Only the order's share of kx turns the phase: that of kx0 is taken out of the amplitudes of each place.</remarks>
    public void Fill(int wave, int order, int parts, Complex cosine, Complex sine, double s)
    {
        Complex side = CellSums.Turn(order * Place, parts);
        Arriving.Fill(wave, side, cosine, sine, s);
        _leaving?.Fill(wave, Complex.Conjugate(side), cosine, sine, s);
    }

    /// <summary>Makes one wave hold no multipoles.</summary>
    public void Clear(int wave)
    {
        Arriving.Clear(wave);
        _leaving?.Clear(wave);
    }
}

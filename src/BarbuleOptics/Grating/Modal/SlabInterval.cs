namespace BarbuleOptics.Grating.Modal;

/// <summary>A stretch of depth throughout which a slab's cuts meet the same outlines.</summary>
/// <param name="TopNm">Its top below the slab's, in nm.</param>
/// <param name="BottomNm">Its bottom below the slab's top, in nm.</param>
/// <param name="Outers">Numbers of the bodies whose outline is met.</param>
/// <param name="Cores">Numbers of the bodies whose core is met.</param>
/// <param name="TipAtTop">Whether an ellipse begins or ends at the top, where chords change like a square root.</param>
/// <param name="TipAtBottom">Whether one does at the bottom.</param>
/// <param name="IsUpright">Whether all walls are upright, so that every cut is the same.</param>
internal sealed record SlabInterval(
    double TopNm, double BottomNm, int[] Outers, int[] Cores, bool TipAtTop, bool TipAtBottom, bool IsUpright)
{
    /// <summary>Extent in depth, in nm.</summary>
    public double ThicknessNm => BottomNm - TopNm;
}

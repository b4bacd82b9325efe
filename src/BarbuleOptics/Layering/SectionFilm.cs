namespace BarbuleOptics.Layering;

/// <summary>A continuous film of the section.</summary>
/// <param name="LayerNumber">The layer of the structure it came from, counted from 1.</param>
/// <param name="TopNm">Depth of its top below the surface, in nm.</param>
/// <param name="ThicknessNm">Thickness, in nm.</param>
/// <param name="Material">Number of its material in the section.</param>
public sealed record SectionFilm(int LayerNumber, double TopNm, double ThicknessNm, int Material)
{
    /// <summary>Depth of its bottom below the surface, in nm.</summary>
    public double BottomNm => TopNm + ThicknessNm;
}

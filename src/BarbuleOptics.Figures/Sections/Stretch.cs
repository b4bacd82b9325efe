namespace BarbuleOptics.Figures.Sections;

/// <summary>A part of one axis of a section that is drawn.</summary>
/// <param name="FromNm">Its start, in nm.</param>
/// <param name="ToNm">Its end, in nm.</param>
/// <param name="StartPt">Place of the start on the page, in points.</param>
/// <param name="PtPerNm">Scale, the same for all.</param>
internal readonly record struct Stretch(double FromNm, double ToNm, double StartPt, double PtPerNm)
{
    public double EndPt => At(ToNm);

    public double At(double nm) => StartPt + (nm - FromNm) * PtPerNm;

    public bool Holds(double nm) => nm >= FromNm && nm <= ToNm;
}

using BarbuleOptics.Layering;

namespace BarbuleOptics.Figures.Sections;

/// <summary>Where the bodies of a row lie along the surface, counted from the first body of the section's first row.</summary>
internal static class BodyPlaces
{
    public static IEnumerable<double> Within(Section section, SectionRun run, SectionRow row, CellBody body, double fromNm, double toNm)
    {
        double firstNm = body.XNm + row.ShiftNm - OriginNm(section);
        for (double n = Math.Ceiling((fromNm - firstNm) / run.SpacingNm); firstNm + n * run.SpacingNm <= toNm; n++)
            yield return firstNm + n * run.SpacingNm;
    }

    private static double OriginNm(Section section) => section.Runs[0].Cell[0].XNm + section.Runs[0].Rows[0].ShiftNm;
}

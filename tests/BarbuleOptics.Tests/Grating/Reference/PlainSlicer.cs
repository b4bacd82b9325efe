using System.Numerics;
using BarbuleOptics.Layering;

namespace BarbuleOptics.Tests.Grating.Reference;

/// <summary>Cuts a section into slices: between any two depths where an outline begins or ends, so many slices, thinner towards both ends,
/// each as the section is at its middle.</summary>
internal static class PlainSlicer
{
    /// <summary>The slices of a section at one of its wavelengths.</summary>
    /// <param name="permittivities">The section.</param>
    /// <param name="wavelength">Position of the wavelength.</param>
    /// <param name="slices">Slices of each interval that holds a curved outline; others need one.</param>
    public static PlainGrating Cut(SectionPermittivities permittivities, int wavelength, int slices)
    {
        Section section = permittivities.Section;
        double periodNm = section.PeriodNm ?? (section.Runs.Count == 0 ? 100 : throw new ArgumentException("No common period."));
        Complex[] materials = permittivities.Inside(wavelength).ToArray();
        List<PlacedBody> bodies = [.. Bodies(section, periodNm)];
        double[] depths = [.. Depths(section, bodies).Where(z => z >= 0 && z <= section.DepthNm).Distinct().Order()];
        var result = new List<PlainSlice>();
        for (int i = 0; i + 1 < depths.Length; i++)
        {
            double topNm = depths[i], heightNm = depths[i + 1] - topNm;
            if (heightNm < 1e-9)
                continue;
            int count = bodies.Exists(body => body.IsCurvedWithin(topNm, topNm + heightNm)) ? slices : 1;
            for (int s = 0; s < count; s++)
            {
                double from = Graded(s, count), to = Graded(s + 1, count);
                result.Add(CutAt(section, bodies, periodNm, materials, topNm + heightNm * (from + to) / 2, heightNm * (to - from)));
            }
        }
        return new PlainGrating(periodNm, permittivities.SurroundIndex[wavelength], result, permittivities.Backing[wavelength]);
    }

    private static double Graded(int slice, int count) => count == 1 ? slice : (1 - Math.Cos(Math.PI * slice / count)) / 2;

    private static IEnumerable<PlacedBody> Bodies(Section section, double periodNm)
    {
        foreach (SectionRun run in section.Runs)
        {
            int copies = (int)Math.Round(periodNm / run.SpacingNm);
            foreach (SectionRow row in run.Rows)
            {
                foreach (CellBody body in run.Cell)
                {
                    for (int copy = 0; copy < copies; copy++)
                    {
                        double xNm = body.XNm + row.ShiftNm + copy * run.SpacingNm;
                        yield return new PlacedBody(body, xNm, row.CenterNm + body.ZNm);
                    }
                }
            }
        }
    }

    private static IEnumerable<double> Depths(Section section, List<PlacedBody> bodies)
        => bodies.SelectMany(body => body.DepthsNm)
            .Concat(section.Films.SelectMany(film => new[] { film.TopNm, film.BottomNm }))
            .Concat([0, section.CortexNm, section.DepthNm]);

    private static PlainSlice CutAt(Section section, List<PlacedBody> bodies, double periodNm, Complex[] materials, double depthNm, double thicknessNm)
    {
        int background = section.Films.Where(film => film.TopNm <= depthNm && depthNm < film.BottomNm).Select(film => film.Material)
            .LastOrDefault(Section.Matrix);
        var marks = new SortedSet<double> { 0, 1 };
        foreach (double x in bodies.SelectMany(body => body.FacesNm(depthNm)))
            marks.Add(x / periodNm - Math.Floor(x / periodNm));
        double[] ends = [.. marks];
        var values = new Complex[ends.Length - 1];
        for (int i = 0; i < values.Length; i++)
        {
            double middleNm = (ends[i] + ends[i + 1]) / 2 * periodNm;
            int material = bodies.Select(body => body.MaterialAt(middleNm, depthNm, periodNm)).FirstOrDefault(found => found >= 0, background);
            values[i] = materials[material];
        }
        return new PlainSlice(thicknessNm, ends[1..], values);
    }

    private sealed record PlacedBody(CellBody Body, double XNm, double CenterNm)
    {
        public IEnumerable<double> DepthsNm => Outlines.SelectMany(outline => new[] { CenterNm - outline.HalfHeightNm, CenterNm + outline.HalfHeightNm });

        private Outline[] Outlines => Body.Core is Outline core ? [Body.Outer, core] : [Body.Outer];

        public bool IsCurvedWithin(double topNm, double bottomNm)
            => Outlines.Any(o => o.Shape == OutlineShape.Ellipse && CenterNm - o.HalfHeightNm < bottomNm && CenterNm + o.HalfHeightNm > topNm);

        public IEnumerable<double> FacesNm(double depthNm)
            => Outlines.Select(outline => outline.HalfChordNm(depthNm - CenterNm)).Where(half => half > 0).SelectMany(half => new[] { XNm - half, XNm + half });

        public int MaterialAt(double xNm, double depthNm, double periodNm)
        {
            double offset = Math.Abs(Math.IEEERemainder(xNm - XNm, periodNm));
            if (Body.Core is Outline core && offset < core.HalfChordNm(depthNm - CenterNm))
                return Body.CoreMaterial;
            return offset < Body.Outer.HalfChordNm(depthNm - CenterNm) ? Body.Material : -1;
        }
    }
}

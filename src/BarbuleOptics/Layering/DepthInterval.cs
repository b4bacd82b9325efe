using System.Globalization;

namespace BarbuleOptics.Layering;

/// <summary>A stretch of depth throughout which a cut meets the same outlines, so that chords change smoothly inside it.</summary>
/// <param name="ThicknessNm">Extent in depth, in nm.</param>
/// <param name="Background">Number of the material between the bodies: the matrix, or that of a film.</param>
/// <param name="PeriodNm">Length along the surface after which cuts repeat, in nm.</param>
/// <param name="Bodies">The bodies met; every image within one period.</param>
internal sealed record DepthInterval(double ThicknessNm, int Background, double PeriodNm, IReadOnlyList<PlacedOutline> Bodies)
{
    /// <summary>Whether every cut is the same: matrix, film, or upright walls only.</summary>
    public bool IsUniform { get; } = Bodies.All(placed => placed.Body.Outer.Shape == OutlineShape.Rectangle);

    /// <summary>The cut at a depth below the interval's top, in nm.</summary>
    public SectionCut CutAt(double depthNm, int materialCount)
    {
        if (Bodies.Count == 0)
            return new SectionCut(1, Background, materialCount, [new Lamella(Background, 1)], []);
        var lamellae = new List<Lamella>(Bodies.Count * 4);
        var bodies = new CutBody[Bodies.Count];
        var chords = Bodies.Select(placed => Chord.Of(placed, depthNm)).OrderBy(chord => chord.LeftNm).ToArray();
        double used = 0;
        for (int i = 0; i < chords.Length; i++)
        {
            Chord chord = chords[i];
            double nextLeftNm = i + 1 < chords.Length ? chords[i + 1].LeftNm : chords[0].LeftNm + PeriodNm;
            double shell = (chord.HalfWidthNm - chord.HalfCoreNm) / PeriodNm, core = 2 * chord.HalfCoreNm / PeriodNm;
            // Bodies may touch; what rounding makes of a gap of zero width is no gap.
            double between = Math.Max(0, (nextLeftNm - chord.LeftNm - 2 * chord.HalfWidthNm) / PeriodNm);
            bodies[i] = new CutBody(chord.Body.Material, chord.Body.CoreMaterial, 2 * shell, core);
            lamellae.Add(new Lamella(chord.Body.Material, shell));
            lamellae.Add(new Lamella(chord.Body.CoreMaterial, core));
            lamellae.Add(new Lamella(chord.Body.Material, shell));
            lamellae.Add(new Lamella(Background, between));
            used += 2 * shell + core + between;
        }
        // The shares add up to 1 but for that rounding.
        Lamella[] whole = [.. lamellae.Where(lamella => lamella.Share > 0).Select(lamella => lamella with { Share = lamella.Share / used })];
        return new SectionCut(PeriodNm, Background, materialCount, whole, bodies);
    }

    /// <summary>Text that is equal for intervals whose cuts are equal, wherever they lie.</summary>
    public string Key()
    {
        var key = new System.Text.StringBuilder();
        Append(key, ThicknessNm, PeriodNm, Background);
        foreach (PlacedOutline placed in Bodies)
        {
            double xNm = Math.IEEERemainder(placed.XNm - Bodies[0].XNm, PeriodNm);
            // Half a period to the left is half a period to the right.
            if (xNm < -PeriodNm / 2 + 1e-6)
                xNm += PeriodNm;
            CellBody body = placed.Body;
            Append(key, xNm, placed.CenterNm, body.Material, body.CoreMaterial);
            AppendOutline(key, body.Outer);
            if (body.Core is Outline core)
                AppendOutline(key, core);
        }
        return key.ToString();
    }

    private static void AppendOutline(System.Text.StringBuilder key, in Outline outline)
        => Append(key, (int)outline.Shape, outline.HalfWidthNm, outline.HalfHeightNm);

    private static void Append(System.Text.StringBuilder key, params ReadOnlySpan<double> values)
    {
        foreach (double value in values)
            key.Append((Math.Round(value, 6) + 0.0).ToString("R", CultureInfo.InvariantCulture)).Append(';');
    }

    private readonly record struct Chord(CellBody Body, double LeftNm, double HalfWidthNm, double HalfCoreNm)
    {
        public static Chord Of(PlacedOutline placed, double depthNm)
        {
            double below = depthNm - placed.CenterNm;
            double half = placed.Body.Outer.HalfChordNm(below);
            double halfCore = placed.Body.Core?.HalfChordNm(below) ?? 0;
            return new Chord(placed.Body, placed.XNm - half, half, Math.Min(halfCore, half));
        }
    }
}

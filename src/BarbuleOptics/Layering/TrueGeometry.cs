using BarbuleOptics.Anatomy;

namespace BarbuleOptics.Layering;

/// <summary>The lengths of the living barbule, from those measured in a section that leans, was dried and embedded, or became a fossil.</summary>
/// <remarks>
/// With a the obliquity, lengths in depth are taken times cos a; a round rod's diameter is its short axis and is not. Keratin is then taken times
/// K = keratin scale/(1 - cortex shrinkage), melanosomes times M = melanin scale/(1 - melanosome shrinkage). A distance from center to center has the size of
/// one body of melanosome in it and keratin for the rest. Bodies of one cell keep their places as keratin does.
/// </remarks>
internal sealed class TrueGeometry
{
    private readonly double _depth;
    private readonly double _keratin;
    private readonly double _melanin;

    private TrueGeometry(Preparation? preparation, Preservation? preservation)
    {
        _depth = Math.Cos(double.DegreesToRadians(preparation?.ObliquityDegrees?.Central ?? 0));
        _keratin = (preparation?.KeratinScale?.Central ?? 1) / (1 - (preservation?.CortexShrinkage?.Central ?? 0));
        _melanin = (preparation?.MelaninScale?.Central ?? 1) / (1 - (preservation?.MelanosomeShrinkage?.Central ?? 0));
    }

    /// <summary>The structure at its central lengths, corrected; the same structure where nothing corrects it.</summary>
    public static Barbule Of(Barbule barbule)
    {
        if (barbule.Preparation is null && barbule.Preservation is null)
            return barbule;
        var truth = new TrueGeometry(barbule.Preparation, barbule.Preservation);
        return barbule with
        {
            Cortex = barbule.Cortex is null ? null : Exact(barbule.Cortex.CentralNm * truth._depth * truth._keratin),
            Layers = [.. barbule.Layers.Select(truth.Layer)],
            Back = barbule.Back is null ? null : barbule.Back with { Thickness = Exact(barbule.Back.Thickness.CentralNm * truth._depth * truth._keratin) },
            Preparation = null,
            Preservation = null,
        };
    }

    private BarbuleLayer Layer(BarbuleLayer layer)
    {
        bool isSingle = layer.Bodies.Count == 1;
        (double widthNm, double heightNm) = isSingle ? Extents(layer.Bodies[0].Form) : (0, 0);
        return layer with
        {
            Bodies = [.. layer.Bodies.Select(body => body with { Form = Form(body.Form), OffsetNm = body.OffsetNm * _depth * _keratin })],
            Lateral = layer.Lateral is null ? null : layer.Lateral with { Distance = Distance(layer.Lateral, layer.Lateral.Distance.CentralNm, widthNm) },
            Depth = layer.Depth is null ? null : layer.Depth with { Distance = Distance(layer.Depth, layer.Depth.Distance.CentralNm * _depth, heightNm) },
            Gap = Exact(layer.Gap.CentralNm * _depth * _keratin),
        };
    }

    private MeasuredLength.Exact Distance(Packing packing, double measuredNm, double bodyNm)
        => Exact(packing.BetweenSurfaces ? measuredNm * _keratin : (measuredNm - bodyNm) * _keratin + bodyNm * _melanin);

    /// <summary>Width and height without shrinkage, the height without obliquity.</summary>
    private (double WidthNm, double HeightNm) Extents(MelanosomeForm form) => form switch
    {
        MelanosomeForm.Rod rod => (rod.Diameter.CentralNm, rod.Diameter.CentralNm),
        MelanosomeForm.FlattenedRod rod => (rod.Width.CentralNm, rod.Height.CentralNm * _depth),
        MelanosomeForm.Platelet platelet => (platelet.Width.CentralNm, platelet.Thickness.CentralNm * _depth),
        MelanosomeForm.Film film => (0, film.Thickness.CentralNm * _depth),
        _ => (0, 0),
    };

    private MelanosomeForm Form(MelanosomeForm form) => form switch
    {
        MelanosomeForm.Rod rod => new MelanosomeForm.Rod(Across(rod.Diameter), Across(rod.Lumen)),
        MelanosomeForm.FlattenedRod rod => new MelanosomeForm.FlattenedRod(InDepth(rod.Height), Across(rod.Width), InDepth(rod.LumenHeight), Across(rod.LumenWidth)),
        MelanosomeForm.Platelet platelet => platelet with { Thickness = InDepth(platelet.Thickness), Width = Across(platelet.Width), Wall = Across(platelet.Wall) },
        MelanosomeForm.Film film => new MelanosomeForm.Film(InDepth(film.Thickness)),
        _ => form,
    };

    [return: System.Diagnostics.CodeAnalysis.NotNullIfNotNull(nameof(length))]
    private MeasuredLength.Exact? Across(MeasuredLength? length) => length is null ? null : Exact(length.CentralNm * _melanin);

    [return: System.Diagnostics.CodeAnalysis.NotNullIfNotNull(nameof(length))]
    private MeasuredLength.Exact? InDepth(MeasuredLength? length) => length is null ? null : Exact(length.CentralNm * _depth * _melanin);

    private static MeasuredLength.Exact Exact(double nanometres) => new(nanometres);
}

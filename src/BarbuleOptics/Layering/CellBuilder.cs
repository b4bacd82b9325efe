using BarbuleOptics.Anatomy;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Layering;

/// <summary>Turns the measured bodies of a layer into outlines at their central sizes.</summary>
internal static class CellBuilder
{
    /// <summary>The bodies of a cell; x is left as a share of the spacing until the spacing is known.</summary>
    public static (Outline Outer, Outline? Core) OutlinesOf(MelanosomeForm form)
    {
        switch (form)
        {
            case MelanosomeForm.Rod rod:
                return (Ellipse(rod.Diameter.CentralNm, rod.Diameter.CentralNm), CoreEllipse(rod.Lumen, rod.Lumen));
            case MelanosomeForm.FlattenedRod rod:
                return (Ellipse(rod.Width.CentralNm, rod.Height.CentralNm), CoreEllipse(rod.LumenWidth, rod.LumenHeight));
            case MelanosomeForm.Platelet platelet:
                double width = platelet.Width.CentralNm, thickness = platelet.Thickness.CentralNm;
                Outline outer = new(OutlineShape.Rectangle, width / 2, thickness / 2);
                if (platelet.Wall is null)
                    return (outer, null);
                double wall = platelet.Wall.CentralNm;
                return (outer, new Outline(OutlineShape.Rectangle, width / 2 - wall, thickness / 2 - wall));
            default:
                throw new ArgumentException("A film has no outline.", nameof(form));
        }
    }

    /// <summary>Whether a body of this form holds any of its lumen material.</summary>
    public static bool HasLumen(MelanosomeForm form)
        => form is not MelanosomeForm.Film && OutlinesOf(form).Core is not null && form is not MelanosomeForm.Platelet { CoreAir: 0 };

    /// <summary>The cell's bodies at a known spacing.</summary>
    public static ValueList<CellBody> Place(BarbuleLayer layer, double spacingNm, MaterialNumbers materials)
    {
        var cell = new CellBody[layer.Bodies.Count];
        for (int i = 0; i < cell.Length; i++)
        {
            Body body = layer.Bodies[i];
            (Outline outer, Outline? core) = OutlinesOf(body.Form);
            int material = materials.Of(SectionMaterial.Plain(body.Material));
            int coreMaterial = core is null ? material : materials.Of(CoreMaterialOf(body));
            cell[i] = new CellBody(outer, core, material, coreMaterial, body.SpacingShare * spacingNm, body.OffsetNm);
        }
        return ValueList.Create<CellBody>(cell);
    }

    private static SectionMaterial CoreMaterialOf(Body body)
        => body.Form is MelanosomeForm.Platelet { CoreAir: < 1 } platelet
            ? platelet.CoreAir == 0 ? SectionMaterial.Plain(body.Material) : new SectionMaterial(body.Material, body.LumenMaterial, platelet.CoreAir)
            : SectionMaterial.Plain(body.LumenMaterial);

    private static Outline Ellipse(double widthNm, double heightNm) => new(OutlineShape.Ellipse, widthNm / 2, heightNm / 2);

    private static Outline? CoreEllipse(MeasuredLength? width, MeasuredLength? height)
        => width is { CentralNm: > 0 } && height is { CentralNm: > 0 } ? Ellipse(width.CentralNm, height.CentralNm) : null;
}

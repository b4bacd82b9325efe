using BarbuleOptics.Anatomy;
using BarbuleOptics.Materials;
using BarbuleOptics.Quantities;
using CsCheck;

namespace BarbuleOptics.Tests.Files;

/// <summary>Random barbules of every form, kind of length and kind of material, all of which a file may state.</summary>
internal static class BarbuleGenerator
{
    private static readonly Gen<double> Share = Gen.Double[-1, 1];

    private static readonly Gen<MaterialReference> Material = Gen.OneOf(
        AnyOf<MaterialReference>(
            new MaterialReference.Named("air"), new MaterialReference.Named("keratin"), new MaterialReference.Named("eumelanin"),
            new MaterialReference.TablePath("own.toml"), new MaterialReference.TablePath("./own.toml")),
        Gen.Select(Gen.Double[0.05, 5], Gen.OneOf(Gen.Const(0.0), Gen.Double[0, 5]), MaterialReference (n, k) => new MaterialReference.Inline(n, k)));

    private static readonly Gen<MaterialReference> Lossless = Gen.OneOf(
        AnyOf<MaterialReference>(new MaterialReference.Named("air"), new MaterialReference.Named("water")),
        Gen.Double[1, 3].Select(MaterialReference (n) => new MaterialReference.Inline(n, 0)));

    /// <summary>Names with what needs care in TOML: quotes, backslashes, letters beyond ASCII, signs beyond 16 bits.</summary>
    private static readonly Gen<string> Name = Gen.OneOf(
        AnyOf("throat", "a \"quoted\" \\ name", "Gefieder äöü µm", "羽 \U0001FAB6", " spaced ", "# = [x]", "'"),
        Gen.String[Gen.Char[' ', '~'], 1, 30].Where(name => name.Trim().Length > 0));

    private static readonly Gen<MeasuredLength> Gap = Lengths(-80, 300);

    private static readonly Gen<(RowCount Rows, Packing? Depth)> Depths = Gen.OneOf(
        AnyOf<(RowCount, Packing?)>((RowCount.One, null), (new RowCount([1, 1]), null)),
        Gen.Select(Gen.Int[2, 1000].Array[1, 4], Lengths(1000, 3000), Gen.Bool, (counts, pitch, isBetween) => (new RowCount([.. counts]), (Packing?)new Packing(pitch, isBetween))));

    private static readonly Gen<MelanosomeForm> Rods = Gen.OneOf(
        Gen.Select(Lengths(60, 200), Gen.OneOf(Gen.Const((MeasuredLength?)null), Lengths(0, 50)), MelanosomeForm (outer, lumen) => new MelanosomeForm.Rod(outer, lumen)),
        Gen.Select(Lengths(60, 90), Lengths(60, 200), MelanosomeForm (height, width) => new MelanosomeForm.FlattenedRod(height, width, null, null)),
        Gen.Select(Lengths(60, 90), Lengths(60, 200), Lengths(1, 50), Lengths(1, 50), MelanosomeForm (height, width, lumenHeight, lumenWidth)
            => new MelanosomeForm.FlattenedRod(height, width, lumenHeight, lumenWidth)),
        Gen.Select(Lengths(60, 90), Lengths(60, 500), MelanosomeForm (thickness, width) => new MelanosomeForm.Platelet(thickness, width, null, 1)),
        Gen.Select(Lengths(60, 90), Lengths(60, 500), Lengths(1, 25), Gen.Double[0, 1], MelanosomeForm (thickness, width, wall, air)
            => new MelanosomeForm.Platelet(thickness, width, wall, air)));

    private static readonly Gen<BarbuleLayer> Films = Gen.Select(Lengths(1, 900), Material, Depths, Gap, (thickness, material, depth, gap) => new BarbuleLayer(
        [new Body(new MelanosomeForm.Film(thickness), material, new MaterialReference.Named("air"), 0, 0)], null, depth.Rows, depth.Depth, Stacking.Aligned, 0, gap));

    private static readonly Gen<Body> Plain = Gen.Select(Rods, Material, Material, (form, material, lumen) => new Body(form, material, lumen, 0, 0));

    private static readonly Gen<Body> Placed = Gen.Select(Plain, Share, Gen.Double[-500, 500], (body, x, z) => body with { SpacingShare = x, OffsetNm = z });

    private static readonly Gen<Packing> Centers = Lengths(501, 2000).Select(distance => new Packing(distance, false));

    private static readonly Gen<Packing> Lateral = Gen.OneOf(Centers, Lengths(0, 100).Select(distance => new Packing(distance, true)));

    private static readonly Gen<(ValueList<Body> Bodies, Packing Lateral)> Cells = Gen.OneOf(
        Gen.Select(Plain, Lateral, (body, lateral) => ((ValueList<Body>)[body], lateral)),
        Gen.Select(Placed, Lateral, (body, lateral) => ((ValueList<Body>)[body], lateral)),
        Gen.Select(Placed.Array[2, 4], Centers, (bodies, lateral) => ((ValueList<Body>)[.. bodies], lateral)));

    private static readonly Gen<BarbuleLayer> Rows = Gen.Select(Cells, Depths, AnyOf(Stacking.Aligned, Stacking.Staggered), Share, Gap, (cell, depth, stacking, shift, gap)
        => new BarbuleLayer(cell.Bodies, cell.Lateral, depth.Rows, depth.Depth, stacking, shift, gap));

    private static readonly Gen<Back?> Backs = Gen.OneOf(
        Gen.Const((Back?)null), Gen.Select(Lengths(1, 9000), Material, Gen.Bool, (thickness, behind, coherent) => (Back?)new Back(thickness, behind, coherent)));

    private static readonly Gen<(MaterialReference Surround, MaterialReference Matrix, MaterialReference? Backing, Angle Axis)> Surroundings = Gen.Select(
        Lossless, Material, Gen.OneOf(Gen.Const((MaterialReference?)null), Material.Select(material => (MaterialReference?)material)),
        Gen.OneOf(AnyOf(0.0, 90.0), Gen.Double[0, 90]).Select(Angle.FromDegrees), (surround, matrix, backing, axis) => (surround, matrix, backing, axis));

    /// <summary>A barbule of a cortex and up to four layers.</summary>
    public static readonly Gen<Barbule> Barbules = Gen.Select(Name, Surroundings, Lengths(0, 5000), Gen.OneOf(Films, Rows).Array[0, 4], Backs, (name, around, cortex, layers, back)
        => new Barbule(name, around.Surround, around.Matrix, around.Backing, around.Axis, cortex.CentralNm == 0 ? new MeasuredLength.Exact(1) : cortex, [.. layers], back));

    private static Gen<T> AnyOf<T>(params T[] values) => Gen.Int[0, values.Length - 1].Select(i => values[i]);

    /// <summary>A length of any kind with every value between two bounds.</summary>
    private static Gen<MeasuredLength> Lengths(double leastNm, double mostNm)
    {
        Gen<double> value = Gen.OneOf(Gen.Double[leastNm, mostNm], Gen.Int[(int)leastNm, (int)mostNm].Select(whole => (double)whole), Gen.Double[leastNm, mostNm].Select(number => Math.Round(number, 1)));
        return Gen.OneOf(
            value.Select(MeasuredLength (nm) => new MeasuredLength.Exact(nm)),
            Gen.Select(value, Gen.Double[0, 50], Gen.Int[1, 99].Nullable(), Gen.Double[0, 9].Nullable(), MeasuredLength (mean, sd, units, between) => new MeasuredLength.Summary(mean, sd, units, between)),
            Gen.Select(value, value, MeasuredLength (one, other) => new MeasuredLength.Interval(Math.Min(one, other), Math.Max(one, other))),
            value.Array[2, 5].Select(MeasuredLength (values) => new MeasuredLength.Replicates([.. values])),
            value.Array[1, 3].Array[2, 3].Select(MeasuredLength (units) => new MeasuredLength.NestedReplicates([.. units.Select(unit => (ValueList<double>)[.. unit])])));
    }
}

using System.Diagnostics.CodeAnalysis;
using BarbuleOptics.Quantities;

namespace BarbuleOptics.Vision;

/// <summary>The visual systems that the program carries.</summary>
/// <remarks>
/// <para>Averages are medians over the species named, of numbers read in the abstracts (A) of, or quoted from (Q):</para>
/// <para>starling 362 449 504 563, droplets 514 572 (A Hart, Partridge and Cuthill 1998, J. Exp. Biol. 201:1433); four estrildid finches, middles of
/// 370-373 440-447 500 562-565, droplets 415-423 510-520 567-575, double cones 414-489 (A Hart, Partridge, Bennett and Cuthill 2000,
/// J. Comp. Physiol. A 186:681); budgerigar 370 445 508 565 (A Goldsmith and Butler 2005, J. Comp. Physiol. A 191:933); blue tit and blackbird,
/// long droplets 570-573 (A Hart, Partridge, Cuthill and Bennett 2000, J. Comp. Physiol. A 186:375);</para>
/// <para>turkey 420 460 505 564, droplets 437 490 514, double 436 (A Hart, Partridge and Cuthill 1999, Vision Res. 39:3321); shearwater 406 450 503 566,
/// double 413 (A Hart 2004, J. Exp. Biol. 207:1229); mallard 415 449 501 570, droplets 445 506 561 with half absorbance at 461 524 588 (Q Hart and
/// Hunt 2007, Am. Nat. 169:S7); peafowl 424 458 505 567 (A Hart 2002, J. Exp. Biol. 205:3925), droplets 449 511 569 (from memory).</para>
/// <para>The distance from cut-off to half absorbance is seldom printed: 16, 18 and 27 nm of the mallard for the short, medium and long cones, 16 for the
/// double ones. Half transmission of the media, 323 and 358 nm: Lind, Mitkus, Olsson and Kelber 2014, 10.1098/rspb.2013.2209.</para>
/// </remarks>
public static class VisualSystems
{
    private const string Noise = " Weber fraction 0.1 of the long cones: Vorobyev et al. 1998, J. Comp. Physiol. A 183:621 (from memory); 0.18 of the double cones: budgerigar, Lind, Karlsson & Kelber 2013, 10.1371/journal.pone.0054650.";

    /// <summary>Average of species whose shortest cone peaks in the ultraviolet: most songbirds, parrots.</summary>
    public static VisualSystem Ultraviolet { get; } = new()
    {
        Name = "average-ultraviolet",
        SingleCones = [new(370, null, 1), new(445, new(419, 435), 1.9), new(504, new(514.5, 532.5), 2.7), new(563.5, new(571.5, 598.5), 2.7)],
        DoubleCone = new(563.5, new(460, 476)),
        Media = new(323, 20),
        WeberFraction = 0.1,
        DoubleWeberFraction = 0.18,
        Source = "Pigments and droplets: Hart et al. 1998, J. Exp. Biol. 201:1433 (starling); Hart et al. 2000, J. Comp. Physiol. A 186:681 (four estrildid finches) and 186:375 (blue tit, blackbird); Goldsmith & Butler 2005, J. Comp. Physiol. A 191:933 (budgerigar). Media: Lind et al. 2014, 10.1098/rspb.2013.2209. Cone numbers: blue tit, Hart et al. 2000 (from memory)." + Noise,
        Obtained = "medians over the species named, of published numbers; slope of the droplets that of the mallard (Hart & Hunt 2007, 10.1086/510141); edge of the media a stated smooth cut-off",
    };

    /// <summary>Average of species whose shortest cone peaks in the violet: fowl, ducks, seabirds and most others.</summary>
    public static VisualSystem Violet { get; } = new()
    {
        Name = "average-violet",
        SingleCones = [new(417.5, null, 1), new(454, new(445, 461), 1.9), new(504, new(506, 524), 2.2), new(566.5, new(561, 588), 2.1)],
        DoubleCone = new(566.5, new(424.5, 440.5)),
        Media = new(358, 20),
        WeberFraction = 0.1,
        DoubleWeberFraction = 0.18,
        Source = "Pigments and droplets: Hart et al. 1999, Vision Res. 39:3321 (turkey); Hart 2002, J. Exp. Biol. 205:3925 (peafowl); Hart 2004, J. Exp. Biol. 207:1229 (shearwater); Hart & Hunt 2007, 10.1086/510141 (mallard). Media: Lind et al. 2014, 10.1098/rspb.2013.2209. Cone numbers: peafowl, Hart 2002." + Noise,
        Obtained = "medians over the species named, of published numbers, the peafowl's droplets from memory; slope of the droplets that of the mallard; edge of the media a stated smooth cut-off",
    };

    /// <summary>The peafowl, Pavo cristatus.</summary>
    public static VisualSystem Peafowl { get; } = new()
    {
        Name = "peafowl",
        SingleCones = [new(424, null, 1), new(458, new(449, 463), 1.9), new(505, new(511, 525), 2.2), new(567, new(569, 592), 2.1)],
        DoubleCone = new(567, new(478, 494)),
        Media = new(365, 45),
        WeberFraction = 0.1,
        DoubleWeberFraction = 0.18,
        Source = "Pigments, effective peaks and cone numbers: Hart 2002, J. Exp. Biol. 205:3925, 10.1242/jeb.205.24.3925." + Noise,
        Obtained = "pigments and numbers published; droplet cut-offs and half transmission of the media from memory; slopes of droplets and edge of the media fitted to the published effective peaks (432, 477, 537, 605 nm), which they meet within 3 nm",
    };

    /// <summary>All of them.</summary>
    public static ValueList<VisualSystem> All { get; } = [Ultraviolet, Violet, Peafowl];

    /// <summary>The two averages, which every prediction is seen by.</summary>
    public static ValueList<VisualSystem> Averages { get; } = [Ultraviolet, Violet];

    /// <summary>The system called <paramref name="name"/>, in any case; false when there is none.</summary>
    public static bool TryFind(string? name, [NotNullWhen(true)] out VisualSystem? system)
    {
        system = All.FirstOrDefault(candidate => string.Equals(candidate.Name, name, StringComparison.OrdinalIgnoreCase));
        return system is not null;
    }
}

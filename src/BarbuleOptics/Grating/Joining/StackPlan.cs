using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating.Joining;

/// <summary>A section as pieces from the surround down to the backing, or to what lies behind it.</summary>
/// <remarks>Media are numbered like the materials of the section; behind them come surround, backing, and what lies behind the backing.</remarks>
internal sealed class StackPlan
{
    internal StackPlan(Section section, PlanPiece[] pieces, ElementKind[] kinds, PlanGroup[] groups, PlanJoint[] joints)
    {
        Section = section;
        Pieces = pieces;
        Kinds = kinds;
        Groups = groups;
        Joints = joints;
    }

    /// <summary>The section.</summary>
    public Section Section { get; }

    /// <summary>The pieces, without a backing that is averaged.</summary>
    public PlanPiece[] Pieces { get; }

    /// <summary>The different elements.</summary>
    public ElementKind[] Kinds { get; }

    /// <summary>Neighboring rows of one spacing, from the top; at least one, of period 0 without rows.</summary>
    public PlanGroup[] Groups { get; }

    /// <summary>What lies between them.</summary>
    public PlanJoint[] Joints { get; }

    /// <summary>Whether the thickness of the backing is averaged.</summary>
    public bool HasAveragedBack => Section.Back is { Coherent: false };

    /// <summary>Number of the surround among the media.</summary>
    public int Surround => Section.Materials.Count;

    /// <summary>Number of the backing among the media.</summary>
    public int Backing => Section.Materials.Count + 1;

    /// <summary>Number of what lies behind the backing.</summary>
    public int Behind => Section.Materials.Count + 2;

    /// <summary>Number of media.</summary>
    public int MediumCount => Section.Materials.Count + 3;

    /// <summary>Plans a section.</summary>
    /// <param name="section">The section.</param>
    /// <param name="methods">Which rods are solved by multipoles.</param>
    public static StackPlan Of(Section section, RowMethods methods = RowMethods.RoundRods) => new StackPlanBuilder(section, methods).Build();
}

using BarbuleOptics.Layering;

namespace BarbuleOptics.Grating;

/// <summary>Scratch memory of <see cref="GratingSolver"/> for one section; not to be shared between threads.</summary>
public sealed class GratingWorkspace
{
    internal GratingWorkspace(Section section) => Section = section;

    internal Section Section { get; }
}

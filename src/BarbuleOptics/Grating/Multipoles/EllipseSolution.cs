namespace BarbuleOptics.Grating.Multipoles;

/// <summary>Strengths of all sources of one symmetry for one incoming multipole after another; see <see cref="EllipseSystem"/>.</summary>
/// <param name="Fields">Fields that take part: 0 for Ey, 1 for Hy.</param>
/// <param name="Columns">Field and order of the incoming multipoles.</param>
/// <param name="Strengths">Rows: family of sources, source, field; one column for each incoming multipole.</param>
/// <param name="Misfit">The largest misfit relative to what comes in.</param>
internal sealed record EllipseSolution(int[] Fields, (int Field, int Multipole)[] Columns, ComplexMatrix Strengths, double Misfit);

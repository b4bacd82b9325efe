using BarbuleOptics.Figures.Drawing;

namespace BarbuleOptics.Figures.Sections;

/// <summary>A label beside the section.</summary>
/// <param name="Name">The material.</param>
/// <param name="Detail">What it forms, with its size; empty for nothing.</param>
/// <param name="Target">What the leader points at.</param>
/// <param name="IsCore">Whether this is the core of the body that the label before names: both stay together.</param>
internal sealed record SectionLabel(string Name, string Detail, Point Target, bool IsCore = false);

namespace BarbuleOptics.Ensembles.Sensitivity;

/// <summary>An outcome whose variance is shared out.</summary>
/// <param name="Name">What it is called in files.</param>
/// <param name="Place">Its place among the outcomes of a draw.</param>
/// <param name="IsAngle">Whether it is an angle in degrees, which stands for its unit vector.</param>
internal sealed record OutcomeKind(string Name, int Place, bool IsAngle)
{
    /// <summary>Number of components.</summary>
    public int Components => IsAngle ? 2 : 1;

    /// <summary>Writes the components of a value.</summary>
    public void Fill(double value, Span<double> components)
    {
        if (IsAngle)
            (components[1], components[0]) = Math.SinCos(double.DegreesToRadians(value));
        else
            components[0] = value;
    }
}

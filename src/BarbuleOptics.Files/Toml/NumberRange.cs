namespace BarbuleOptics.Files.Toml;

/// <summary>The numbers that a key takes.</summary>
/// <param name="Least">Lower end.</param>
/// <param name="Most">Upper end, which is in the range.</param>
/// <param name="ExcludesLeast">Whether the lower end itself is out of the range.</param>
internal readonly record struct NumberRange(double Least, double Most, bool ExcludesLeast = false)
{
    public bool Holds(double value) => (ExcludesLeast ? value > Least : value >= Least) && value <= Most;

    /// <summary>For a message: "above 0, up to 1000000".</summary>
    public override string ToString()
        => ExcludesLeast ? $"above {OneLine.Number(Least)}, up to {OneLine.Number(Most)}" : $"{OneLine.Number(Least)} to {OneLine.Number(Most)}";
}

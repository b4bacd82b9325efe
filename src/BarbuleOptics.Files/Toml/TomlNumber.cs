namespace BarbuleOptics.Files.Toml;

/// <summary>A number; <see cref="Whole"/> where it was written as an integer.</summary>
internal sealed class TomlNumber(double value, long? whole, SourceLocation location) : TomlNode(location)
{
    public double Value { get; } = value;

    public long? Whole { get; } = whole;

    public override string Found => Whole is { } whole
        ? FormattableString.Invariant($"{whole}")
        : OneLine.Number(Value) + (double.IsFinite(Value) && Value == Math.Truncate(Value) && Math.Abs(Value) < 1e15 ? ".0" : "");
}

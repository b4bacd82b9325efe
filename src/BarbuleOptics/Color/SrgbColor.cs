namespace BarbuleOptics.Color;

/// <summary>A color of the sRGB cube at 8 bits a channel. The default value is black.</summary>
/// <param name="Red">Red, 0 to 255.</param>
/// <param name="Green">Green, 0 to 255.</param>
/// <param name="Blue">Blue, 0 to 255.</param>
public readonly record struct SrgbColor(byte Red, byte Green, byte Blue)
{
    /// <summary>The text that web pages and drawing programs take, for instance "#1a8f7c".</summary>
    public string Hex => FormattableString.Invariant($"#{Red:x2}{Green:x2}{Blue:x2}");

    /// <summary>The same as <see cref="Hex"/>.</summary>
    public override string ToString() => Hex;
}

namespace BarbuleOptics.Spectra.Instruments;

/// <summary>A direction as a unit vector: z away from the mean surface, x in the plane of incidence, y normal to it.</summary>
internal readonly record struct Direction(double X, double Y, double Z)
{
    /// <summary>The normal of the mean surface.</summary>
    public static Direction Up => new(0, 0, 1);

    /// <summary>A direction in the plane of incidence, by its angle from the normal of the mean surface, in radians.</summary>
    public static Direction InPlane(double angle) => new(Math.Sin(angle), 0, Math.Cos(angle));

    /// <summary>Cosine of the angle to another.</summary>
    public double Dot(Direction other) => X * other.X + Y * other.Y + Z * other.Z;

    /// <summary>Angle to another, in radians; keeps its digits for small ones.</summary>
    public double AngleTo(Direction other)
    {
        (double dx, double dy, double dz) = (X - other.X, Y - other.Y, Z - other.Z);
        return 2 * Math.Asin(Math.Min(1, 0.5 * Math.Sqrt(dx * dx + dy * dy + dz * dz)));
    }

    /// <summary>Where a mirror of normal <paramref name="normal"/> sends light that comes from here.</summary>
    public Direction MirroredBy(Direction normal)
    {
        double twice = 2 * Dot(normal);
        return new Direction(twice * normal.X - X, twice * normal.Y - Y, twice * normal.Z - Z);
    }

    /// <summary>The direction half way to another, which must not be opposite.</summary>
    public Direction Halfway(Direction other) => Normalized(X + other.X, Y + other.Y, Z + other.Z);

    /// <summary>The direction at a polar angle and an azimuth about this one, both in radians.</summary>
    public Direction Around(double polar, double azimuth)
    {
        (double sinePolar, double cosinePolar) = Math.SinCos(polar);
        (double sine, double cosine) = Math.SinCos(azimuth);
        return new Direction(sinePolar * cosine, sinePolar * sine, cosinePolar).TurnedWith(this);
    }

    /// <summary>Moves along with the shortest turn that takes up to <paramref name="up"/>, which must not point down.</summary>
    /// <remarks>Rodrigues' formula with the axis a = z x up, in which 1 - cos over sin^2 is 1/(1 + cos): w cos + a x w + a (a w)/(1 + cos).</remarks>
    public Direction TurnedWith(Direction up)
    {
        double share = (up.X * Y - up.Y * X) / (1 + up.Z);
        return new Direction(
            up.Z * X + up.X * Z - up.Y * share,
            up.Z * Y + up.Y * Z + up.X * share,
            up.Z * Z - up.X * X - up.Y * Y);
    }

    /// <summary>A unit vector along three components.</summary>
    public static Direction Normalized(double x, double y, double z)
    {
        double length = Math.Sqrt(x * x + y * y + z * z);
        return new Direction(x / length, y / length, z / length);
    }
}

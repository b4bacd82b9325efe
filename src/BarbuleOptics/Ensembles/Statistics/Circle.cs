namespace BarbuleOptics.Ensembles.Statistics;

/// <summary>Arithmetic of angles in degrees.</summary>
internal static class Circle
{
    /// <summary>The same direction, at least 0 and below 360 degrees.</summary>
    public static double Wrap(double degrees)
    {
        double turned = degrees - 360 * Math.Floor(degrees / 360);
        // A hair below 0 rounds to 360 itself.
        return turned < 360 ? turned : 0;
    }

    /// <summary>The shorter way from one direction to another, above -180 to 180 degrees.</summary>
    public static double Difference(double fromDegrees, double toDegrees)
    {
        double way = Wrap(toDegrees - fromDegrees);
        return way > 180 ? way - 360 : way;
    }
}

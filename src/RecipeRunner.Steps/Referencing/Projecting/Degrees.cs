namespace RecipeRunner.Steps.Referencing;

/// <summary>Angles in degrees.</summary>
internal static class Degrees
{
    /// <summary>The longitude moved by whole turns to within 180 degrees of another.</summary>
    public static double Wrap(double longitude, double about) =>
        longitude - (360 * Math.Round((longitude - about) / 360, MidpointRounding.ToEven));

    /// <summary>In radians.</summary>
    public static double ToRadians(double degrees) => degrees * (Math.PI / 180);
}

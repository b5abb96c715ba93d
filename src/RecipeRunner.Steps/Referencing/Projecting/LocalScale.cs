using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Referencing;

/// <summary>How a projection stretches the neighbourhood of a place: grid length or area over that on the ellipsoid.</summary>
/// <param name="Least">The scale in the direction in which it is least.</param>
/// <param name="Most">The scale in the direction in which it is most.</param>
/// <param name="AlongParallel">The scale from west to east.</param>
/// <param name="Area">The scale of areas; negative in a mirrored plane.</param>
internal readonly record struct LocalScale(double Least, double Most, double AlongParallel, double Area)
{
    private const double Step = 1e-4;

    /// <summary>
    /// The scale at a place, by central differences over 2e-4 degrees of the projection itself: good to about 1e-10. The two
    /// extremes are the singular values of the derivative (Tissot's indicatrix).
    /// </summary>
    /// <param name="projection">The projection.</param>
    /// <param name="ellipsoid">Its figure.</param>
    /// <param name="degrees">Longitude from Greenwich and latitude, within 89.9 degrees.</param>
    public static LocalScale At(GridProjection projection, Ellipsoid ellipsoid, Location degrees)
    {
        var (eastMetres, northMetres) = ellipsoid.MetresPerDegree(degrees.Y);
        var (a, c) = Slope(projection, degrees, Step, 0, 2 * Step * eastMetres);
        var (b, d) = Slope(projection, degrees, 0, Step, 2 * Step * northMetres);
        var area = (a * d) - (b * c);
        var squares = (a * a) + (b * b) + (c * c) + (d * d);
        var sum = Math.Sqrt(squares + (2 * Math.Abs(area)));
        var difference = Math.Sqrt(Math.Max(0, squares - (2 * Math.Abs(area))));
        return new((sum - difference) / 2, (sum + difference) / 2, Math.Sqrt((a * a) + (c * c)), area);
    }

    private static (double X, double Y) Slope(
        GridProjection projection,
        Location at,
        double east,
        double north,
        double metres
    )
    {
        var ahead = projection.ToPlane(new Location(at.X + east, at.Y + north));
        var behind = projection.ToPlane(new Location(at.X - east, at.Y - north));
        return ((ahead.X - behind.X) / metres, (ahead.Y - behind.Y) / metres);
    }
}

using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Tests.Referencing;

/// <summary>Measures on the ellipsoid.</summary>
internal static class Ground
{
    /// <summary>Metres between two near places given as longitude and latitude.</summary>
    public static double Metres(KnownSystem system, Location one, Location other)
    {
        var (east, north) = system.Definition.Ellipsoid.MetresPerDegree(one.Y);
        return new Location(Degrees.Wrap(one.X - other.X, 0) * east, (one.Y - other.Y) * north).DistanceTo(default);
    }
}

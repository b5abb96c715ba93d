using NetTopologySuite.Geometries;
using NetTopologySuite.Geometries.Utilities;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Steps.Shapes;

/// <summary>Turns a file's coordinates into those of the model: metres for projected systems, degrees for geographic ones.</summary>
internal static class NativeUnits
{
    /// <summary>The geometry in the model's units.</summary>
    public static Geometry ToModel(Geometry geometry, ReferenceSystem system) =>
        system.MetresPerUnit == 1
            ? geometry
            : AffineTransformation.ScaleInstance(system.MetresPerUnit, system.MetresPerUnit).Transform(geometry);

    /// <summary>
    /// Refuses degrees beyond the ellipsoid, the commonest sign of a wrong reference system or swapped columns, and lengths
    /// beyond any grid.
    /// </summary>
    /// <returns>True where the place can be.</returns>
    public static bool IsPossible(double x, double y, ReferenceSystem system, Place place, Problems problems)
    {
        if (system.Kind == ReferenceSystemKind.Projected)
        {
            return IsWithinReach(x, y, system, place, problems);
        }

        if (Math.Abs(x) <= 360 && Math.Abs(y) <= 90)
        {
            return true;
        }

        problems.Add(
            "RR0233",
            place,
            FormattableString.Invariant(
                $"x {x}, y {y} is no longitude and latitude in degrees, but the reference system is {system.Label}."
            ),
            Math.Abs(y) <= 360 && Math.Abs(x) <= 90
                ? "Are x and y swapped? x is the longitude."
                : "Name the system that the coordinates are in with crs:."
        );
        return false;
    }

    private static bool IsWithinReach(double x, double y, ReferenceSystem system, Place place, Problems problems)
    {
        var reach = Lattice.ReachMetres / system.MetresPerUnit;
        if (Math.Abs(x) <= reach && Math.Abs(y) <= reach)
        {
            return true;
        }

        problems.Add(
            "RR0233",
            place,
            FormattableString.Invariant($"x {x}, y {y} lies beyond any grid on Earth."),
            $"Correct the coordinates, or name the system that they are in with crs:. It was taken to be {system.Label}."
        );
        return false;
    }
}

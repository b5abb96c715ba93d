using NetTopologySuite.Geometries;
using NetTopologySuite.Geometries.Utilities;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Shapes;

/// <summary>Turns a file's coordinates into those of the model: metres for projected systems, degrees for geographic ones.</summary>
internal static class NativeUnits
{
    /// <summary>The geometry in the model's units.</summary>
    public static Geometry ToModel(Geometry geometry, ReferenceSystem system) =>
        system.MetresPerUnit == 1
            ? geometry
            : AffineTransformation.ScaleInstance(system.MetresPerUnit, system.MetresPerUnit).Transform(geometry);

    /// <summary>Refuses degrees beyond the ellipsoid, the commonest sign of a wrong reference system or swapped columns.</summary>
    /// <returns>True where the place can be on the ellipsoid, or the system is projected.</returns>
    public static bool IsPossible(double x, double y, ReferenceSystem system, Place place, Problems problems)
    {
        if (system.Kind == ReferenceSystemKind.Projected || (Math.Abs(x) <= 360 && Math.Abs(y) <= 90))
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
}

using System.Globalization;
using NetTopologySuite.Geometries;
using NetTopologySuite.Geometries.Utilities;
using NetTopologySuite.Operation.Valid;
using NetTopologySuite.Precision;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Steps.Shapes;

/// <summary>
/// Turns an areal geometry into a valid region, or refuses it. The rule: each ring is taken alone and keeps all that it
/// encloses; holes are taken out of shells; parts are united (OGC Simple Features 06-103r4, validity of polygons). A
/// repair that changes the area by more than one part in a hundred is refused.
/// </summary>
internal static class ShapeRepair
{
    private const double LargestChange = 0.01;

    /// <summary>The valid region.</summary>
    /// <param name="geometry">As its file holds it, in metres for a projected system and degrees for a geographic one.</param>
    /// <param name="system">Its system: a projected one puts vertices on the lattice.</param>
    /// <param name="place">Where it stands, for findings.</param>
    /// <param name="context">Takes the finding about a repair.</param>
    /// <param name="problems">Takes the reason where it is refused.</param>
    /// <returns>The region; null where refused.</returns>
    public static Region? Settle(
        Geometry geometry,
        ReferenceSystem system,
        Place place,
        StepContext context,
        Problems problems
    )
    {
        if (geometry is not (Polygon or MultiPolygon))
        {
            problems.Add(
                "RR0230",
                place,
                $"Its geometry is a {geometry.GeometryType}, not a polygon.",
                "Basins are areas; give a polygon layer."
            );
            return null;
        }

        var projected = system.Kind == ReferenceSystemKind.Projected;
        if (projected)
        {
            Snap(geometry);
        }

        var fault = new IsValidOp(geometry).ValidationError;
        return fault is null
            ? RegionGeometry.ToRegion(geometry)
            : Repaired(geometry, fault, projected, place, context, problems);
    }

    private static Region? Repaired(
        Geometry geometry,
        TopologyValidationError fault,
        bool projected,
        Place place,
        StepContext context,
        Problems problems
    )
    {
        var mended = GeometryFixer.Fix(geometry);
        if (projected)
        {
            mended = GeometryPrecisionReducer.Reduce(mended, new PrecisionModel(1 / Lattice.StepMetres));
        }

        var (before, after) = (geometry.Area, mended.Area);
        var areas = AreaWords(before, after, projected);
        var near = fault.Coordinate is { } at
            ? string.Create(CultureInfo.InvariantCulture, $" near {at.X:0.######}, {at.Y:0.######}")
            : "";
        var what = $"The outline is not valid ({fault.Message.ToLowerInvariant()}){near}.";
        if (!(after > 0) || Math.Abs(after - before) > LargestChange * after)
        {
            problems.Add(
                "RR0231",
                place,
                $"{what} A repair by rule would change the area that its rings give by more than 1 %: {areas}.",
                "Mend the outline there, then run again."
            );
            return null;
        }

        context.Find(Finding.Caution("RR0232", place, $"{what} Repaired by rule; area {areas}.", "Check the outline."));
        return RegionGeometry.ToRegion(mended);
    }

    private static string AreaWords(double before, double after, bool projected) =>
        projected
            ? string.Create(CultureInfo.InvariantCulture, $"{before / 1e6:0.000###} -> {after / 1e6:0.000###} km²")
            : string.Create(CultureInfo.InvariantCulture, $"{before:0.000000##} -> {after:0.000000##} square degrees");

    private static void Snap(Geometry geometry)
    {
        geometry.Apply(new SnapFilter());
        geometry.GeometryChanged();
    }

    private sealed class SnapFilter : ICoordinateFilter
    {
        public void Filter(Coordinate coord)
        {
            coord.X = Lattice.Snap(coord.X);
            coord.Y = Lattice.Snap(coord.Y);
        }
    }
}

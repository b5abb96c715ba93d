using NetTopologySuite;
using NetTopologySuite.Geometries;
using NetTopologySuite.Geometries.Implementation;
using RecipeRunner.Model.Space;
using Location = RecipeRunner.Model.Space.Location;

namespace RecipeRunner.Steps.Shapes;

/// <summary>Regions as geometries of the geometry library, and back.</summary>
internal static class RegionGeometry
{
    /// <summary>Makes geometries; overlays by OverlayNG, asked for by name because the library's default is its older one.</summary>
    public static GeometryFactory Factory { get; } =
        new NtsGeometryServices(
            CoordinateArraySequenceFactory.Instance,
            PrecisionModel.Floating.Value,
            0,
            GeometryOverlay.NG,
            new CoordinateEqualityComparer()
        ).CreateGeometryFactory();

    /// <summary>A region as a polygon or multipolygon.</summary>
    public static Geometry Of(Region region)
    {
        var polygons = region
            .Parts.Select(part => Factory.CreatePolygon(RingOf(part.Shell), [.. part.Holes.Select(RingOf)]))
            .ToArray();
        return polygons.Length == 1 ? polygons[0] : Factory.CreateMultiPolygon(polygons);
    }

    /// <summary>A place as a point.</summary>
    public static Point Of(Location place) => Factory.CreatePoint(new Coordinate(place.X, place.Y));

    /// <summary>
    /// The areal parts of a geometry as a region: shells counter-clockwise, holes clockwise, first vertices not repeated,
    /// each ring starting at its lowest vertex (by X, then Y) and parts in the order of those, so that equal shapes are
    /// equal vertex by vertex.
    /// </summary>
    public static Region ToRegion(Geometry geometry)
    {
        var polygons = PolygonsIn(geometry).Where(polygon => !polygon.IsEmpty);
        return new Region([
            .. polygons
                .Select(PartOf)
                .OrderBy(part => part.Shell.Vertices[0].X)
                .ThenBy(part => part.Shell.Vertices[0].Y),
        ]);
    }

    private static IEnumerable<Polygon> PolygonsIn(Geometry geometry) =>
        Enumerable
            .Range(0, geometry.NumGeometries)
            .Select(geometry.GetGeometryN)
            .SelectMany(part =>
                part switch
                {
                    Polygon polygon => [polygon],
                    GeometryCollection collection => PolygonsIn(collection),
                    _ => Enumerable.Empty<Polygon>(),
                }
            );

    private static RegionPart PartOf(Polygon polygon)
    {
        var holes = polygon.InteriorRings.Select(ring => Normal(ring, counterClockwise: false));
        return new RegionPart(
            Normal(polygon.ExteriorRing, counterClockwise: true),
            [.. holes.OrderBy(hole => hole.Vertices[0].X).ThenBy(hole => hole.Vertices[0].Y)]
        );
    }

    private static Ring Normal(LineString ring, bool counterClockwise)
    {
        var vertices = new List<Location>(ring.NumPoints);
        foreach (var coordinate in ring.Coordinates)
        {
            var vertex = new Location(coordinate.X, coordinate.Y);
            if (vertices.Count == 0 || vertices[^1] != vertex)
            {
                vertices.Add(vertex);
            }
        }

        vertices.RemoveAt(vertices.Count - 1);
        if (new Ring([.. vertices]).SignedArea > 0 != counterClockwise)
        {
            vertices.Reverse();
        }

        var lowest = Enumerable.Range(0, vertices.Count).MinBy(i => (vertices[i].X, vertices[i].Y));
        return new Ring([.. vertices[lowest..], .. vertices[..lowest]]);
    }

    private static LinearRing RingOf(Ring ring) =>
        Factory.CreateLinearRing([
            .. ring.Vertices.Append(ring.Vertices[0]).Select(vertex => new Coordinate(vertex.X, vertex.Y)),
        ]);
}

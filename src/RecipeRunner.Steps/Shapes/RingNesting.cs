using NetTopologySuite.Algorithm.Locate;
using NetTopologySuite.Geometries;

namespace RecipeRunner.Steps.Shapes;

/// <summary>
/// Makes polygons of loose rings by what lies in what: a ring in no other is a shell, one in a shell is a hole, one in a hole
/// an island. Neither the order of rings nor the way they run matters, since files keep neither reliably.
/// </summary>
internal static class RingNesting
{
    /// <summary>All rings of a geometry.</summary>
    public static IEnumerable<LinearRing> RingsOf(Geometry geometry) =>
        Enumerable
            .Range(0, geometry.NumGeometries)
            .Select(geometry.GetGeometryN)
            .OfType<Polygon>()
            .SelectMany(polygon => polygon.InteriorRings.Prepend(polygon.ExteriorRing))
            .Cast<LinearRing>();

    /// <summary>The polygons that rings make.</summary>
    /// <param name="rings">Rings that do not cross; where they do, the result is not valid and its check finds it.</param>
    public static Geometry Assemble(IEnumerable<LinearRing> rings)
    {
        var nodes = new List<Node>();
        foreach (var ring in rings.Where(ring => !ring.IsEmpty).OrderByDescending(AreaOf))
        {
            var parent = nodes.LastOrDefault(node => node.Holds(ring));
            nodes.Add(new Node(ring, parent));
        }

        var polygons = nodes.Where(node => node.IsShell).Select(node => PolygonOf(node, nodes)).ToArray();
        return polygons.Length == 1 ? polygons[0] : RegionGeometry.Factory.CreateMultiPolygon(polygons);
    }

    private static Polygon PolygonOf(Node shell, List<Node> nodes) =>
        RegionGeometry.Factory.CreatePolygon(
            shell.Ring,
            [.. nodes.Where(node => !node.IsShell && node.Parent == shell).Select(node => node.Ring)]
        );

    private static double AreaOf(LinearRing ring) =>
        Math.Abs(NetTopologySuite.Algorithm.Area.OfRingSigned(ring.CoordinateSequence));

    private sealed class Node(LinearRing ring, Node? parent)
    {
        private readonly Lazy<IndexedPointInAreaLocator> inside = new(() =>
            new IndexedPointInAreaLocator(RegionGeometry.Factory.CreatePolygon(ring))
        );

        public LinearRing Ring => ring;

        public Node? Parent => parent;

        public bool IsShell => parent is null || !parent.IsShell;

        /// <summary>By the first vertex that is not on this ring; a ring that only touches it from within is held.</summary>
        public bool Holds(LinearRing other)
        {
            if (!ring.EnvelopeInternal.Covers(other.EnvelopeInternal))
            {
                return false;
            }

            var place = other
                .Coordinates.Select(vertex => inside.Value.Locate(vertex))
                .FirstOrDefault(where => where != Location.Boundary, Location.Boundary);
            return place == Location.Interior
                || (
                    place == Location.Boundary
                    && inside.Value.Locate(RegionGeometry.Factory.CreatePolygon(other).InteriorPoint.Coordinate)
                        == Location.Interior
                );
        }
    }
}

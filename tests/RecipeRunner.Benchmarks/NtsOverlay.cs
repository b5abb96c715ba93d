using NetTopologySuite.Geometries;
using NetTopologySuite.Index.Strtree;
using NetTopologySuite.Operation.Overlay;
using NetTopologySuite.Operation.OverlayNG;

namespace RecipeRunner.Benchmarks;

/// <summary>Overlay of basins and cells with NetTopologySuite's OverlayNG; polygons and index are made beforehand.</summary>
internal sealed class NtsOverlay
{
    private readonly Polygon[] basins;
    private readonly STRtree<Polygon> tree = new();

    public NtsOverlay(Region region, IEnumerable<(double[] X, double[] Y)> outlines)
    {
        basins = [.. region.Basins().Select(ToPolygon)];
        foreach (Polygon cell in outlines.Select(ToPolygon))
        {
            tree.Insert(cell.EnvelopeInternal, cell);
        }

        tree.Build();
    }

    /// <summary>The area of all pieces.</summary>
    public double Run() =>
        basins.Sum(basin =>
            tree.Query(basin.EnvelopeInternal)
                .Sum(cell => OverlayNG.Overlay(basin, cell, SpatialFunction.Intersection).Area)
        );

    private static Polygon ToPolygon((double[] X, double[] Y) ring) =>
        new GeometryFactory().CreatePolygon([
            .. ring.X.Append(ring.X[0]).Zip(ring.Y.Append(ring.Y[0]), (x, y) => new Coordinate(x, y)),
        ]);
}

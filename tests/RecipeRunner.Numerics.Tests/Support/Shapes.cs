using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Predicates;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Tests.Support;

/// <summary>Short ways to say what a test is about.</summary>
internal static class Shapes
{
    /// <summary>A ring as the tests write it: x and y of each point.</summary>
    public static (double X, double Y)[] Box(double minX, double minY, double maxX, double maxY) =>
        [(minX, minY), (maxX, minY), (maxX, maxY), (minX, maxY)];

    public static (double X, double Y)[] CounterClockwise((double X, double Y)[] ring)
    {
        double twice = 0;
        for (int i = 2; i < ring.Length; i++)
        {
            twice +=
                ((ring[i - 1].X - ring[0].X) * (ring[i].Y - ring[0].Y))
                - ((ring[i].X - ring[0].X) * (ring[i - 1].Y - ring[0].Y));
        }

        return twice > 0 ? ring : [.. ring.Reverse()];
    }

    public static PolygonBatch Batch(params (double X, double Y)[][][] polygons)
    {
        (double X, double Y)[][] rings = [.. polygons.SelectMany(rings => rings)];
        return new PolygonBatch(
            [.. rings.SelectMany(ring => ring.Select(p => p.X))],
            [.. rings.SelectMany(ring => ring.Select(p => p.Y))],
            Starts(rings.Select(ring => ring.Length)),
            Starts(polygons.Select(polygon => polygon.Length))
        );
    }

    public static ThiessenCells Cells(params (double X, double Y)[] sites) =>
        ThiessenCells.Of(
            DelaunayTriangulation.Of(
                [.. sites.Select(p => Lattice.Snap(p.X))],
                [.. sites.Select(p => Lattice.Snap(p.Y))]
            )
        );

    private static int[] Starts(IEnumerable<int> lengths)
    {
        var starts = new List<int> { 0 };
        foreach (int length in lengths)
        {
            starts.Add(starts[^1] + length);
        }

        return [.. starts];
    }
}

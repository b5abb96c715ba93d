using RecipeRunner.Model.Space;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Steps.Weighting;

/// <summary>Brings basins to the numbers room.</summary>
internal static class BasinBatch
{
    /// <summary>The basins as flat arrays, in their layer's order.</summary>
    public static PolygonBatch Of(IEnumerable<Basin> basins)
    {
        var (x, y) = (new List<double>(), new List<double>());
        var (ringStarts, basinStarts) = (new List<int> { 0 }, new List<int> { 0 });
        foreach (var basin in basins)
        {
            foreach (var ring in basin.Shape.Rings)
            {
                x.AddRange(ring.Vertices.Select(vertex => vertex.X));
                y.AddRange(ring.Vertices.Select(vertex => vertex.Y));
                ringStarts.Add(x.Count);
            }

            basinStarts.Add(ringStarts.Count - 1);
        }

        return new PolygonBatch([.. x], [.. y], [.. ringStarts], [.. basinStarts]);
    }
}

using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Steps.Weighting;

/// <summary>Brings basins to the numbers room.</summary>
internal static class BasinBatch
{
    /// <summary>The basins as flat arrays, in their layer's order.</summary>
    public static PolygonBatch Of(ImmutableArray<Basin> basins)
    {
        var batch = new PolygonBatchBuilder();
        foreach (var basin in basins)
        {
            foreach (var ring in basin.Shape.Rings)
            {
                batch.AddRing(ring.Vertices.Select(vertex => (vertex.X, vertex.Y)));
            }

            batch.CloseBasin();
        }

        return batch.Build();
    }
}

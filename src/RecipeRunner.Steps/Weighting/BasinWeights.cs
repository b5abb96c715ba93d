using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Weights;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Steps.Weighting;

/// <summary>Weighs basins by cells.</summary>
internal static class BasinWeights
{
    /// <summary>The weights, in the basins' order, within a basin in the sites' order.</summary>
    /// <param name="cells">The cells.</param>
    /// <param name="layer">The layer that holds the basins, for messages.</param>
    /// <param name="batch">The basins' shapes.</param>
    /// <exception cref="RefusedException">Shapes that cannot be weighed; all of them are named.</exception>
    public static ImmutableArray<Weight> Of(ThiessenCells cells, BasinLayer layer, PolygonBatch batch)
    {
        var areas = Weigh(cells, layer, batch);
        var weights = ImmutableArray.CreateBuilder<Weight>();
        for (var basin = 0; basin < areas.Count; basin++)
        {
            var sites = areas.Sites(basin);
            var parts = areas.Areas(basin);
            var shares = areas.Weights(basin);
            for (var i = 0; i < sites.Length; i++)
            {
                weights.Add(new Weight(basin, sites[i], parts[i], shares[i]));
            }
        }

        return weights.ToImmutable();
    }

    private static AreaWeights Weigh(ThiessenCells cells, BasinLayer layer, PolygonBatch batch)
    {
        try
        {
            return AreaWeights.Of(cells, batch, Environment.ProcessorCount);
        }
        catch (PolygonsRefusedException refused)
        {
            throw Refusal(refused, layer);
        }
    }

    /// <summary>What to tell of shapes that cannot be weighed; all of them are named.</summary>
    /// <param name="refused">The shapes.</param>
    /// <param name="layer">The layer that holds them.</param>
    public static RefusedException Refusal(PolygonsRefusedException refused, BasinLayer layer)
    {
        var problems = new Problems();
        foreach (var refusal in refused.Refusals)
        {
            problems.Add(
                "RR0405",
                new Place(layer.Source, Item: $"basin {layer.Basins[refusal.Polygon].Id}"),
                $"Its outline {refusal.Reason}.",
                "Mend the outline, then run again."
            );
        }

        return problems.ToRefusal();
    }
}

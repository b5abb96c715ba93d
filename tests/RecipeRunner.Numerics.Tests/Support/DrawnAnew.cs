using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Tests.Support;

/// <summary>The plain way: the cells of the reporting sites alone, and polygons weighed by them.</summary>
internal static class DrawnAnew
{
    /// <summary>By polygon: the weight of every site, 0 where it owns nothing or is silent.</summary>
    public static double[][] Weights(Network network, bool[] reports, PolygonBatch polygons)
    {
        int[] live = [.. Enumerable.Range(0, network.Count).Where(site => reports[site])];
        var cells = ThiessenCells.Of(
            DelaunayTriangulation.Of(
                [.. live.Select(site => network.X[site])],
                [.. live.Select(site => network.Y[site])]
            )
        );
        var weights = AreaWeights.Of(cells, polygons, 1);
        return
        [
            .. Enumerable
                .Range(0, polygons.Count)
                .Select(polygon =>
                    Spread(
                        network.Count,
                        [.. weights.Sites(polygon).ToArray().Select(site => live[site])],
                        weights.Weights(polygon).ToArray()
                    )
                ),
        ];
    }

    /// <summary>The weight of every site, 0 where it is not named.</summary>
    public static double[] Spread(int count, int[] sites, double[] weights)
    {
        var all = new double[count];
        for (int i = 0; i < sites.Length; i++)
        {
            all[sites[i]] = weights[i];
        }

        return all;
    }
}

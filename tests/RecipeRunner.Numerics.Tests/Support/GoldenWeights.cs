using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Tests.Support;

/// <summary>Compares weights with golden ones: weights absolute, areas as a share of the polygon, and the same sites above a weight of 1e-9.</summary>
internal static class GoldenWeights
{
    /// <summary>The goldens leave out what is not above this.</summary>
    private const double LeastWeight = 1e-9;

    public static void ShouldAgree(
        IEnumerable<(string Polygon, string Site, double Area, double Weight)> golden,
        string[] polygons,
        string[] sites,
        AreaWeights weights,
        double tolerance
    )
    {
        var expected = golden.ToLookup(row => row.Polygon, StringComparer.Ordinal);
        double worst = 0;
        for (int polygon = 0; polygon < polygons.Length; polygon++)
        {
            var found = new Dictionary<string, (double Area, double Weight)>(StringComparer.Ordinal);
            for (int i = 0; i < weights.Sites(polygon).Length; i++)
            {
                found[sites[weights.Sites(polygon)[i]]] = (weights.Areas(polygon)[i], weights.Weights(polygon)[i]);
            }

            found
                .Where(row => row.Value.Weight > LeastWeight)
                .Select(row => row.Key)
                .ShouldBe(expected[polygons[polygon]].Select(row => row.Site), ignoreOrder: true);
            foreach ((_, string site, double area, double weight) in expected[polygons[polygon]])
            {
                found[site].Weight.ShouldBe(weight, tolerance);
                found[site].Area.ShouldBe(area, tolerance * weights.PolygonArea(polygon));
                worst = Math.Max(worst, Math.Abs(found[site].Weight - weight));
            }
        }

        TestContext.Current.TestOutputHelper?.WriteLine($"largest difference of a weight: {worst:E2}");
    }
}

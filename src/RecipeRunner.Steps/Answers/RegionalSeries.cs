using RecipeRunner.Model.Rain;
using RecipeRunner.Numerics.Statistics;

namespace RecipeRunner.Steps.Answers;

/// <summary>One series of depths in which storms are found.</summary>
internal static class RegionalSeries
{
    /// <summary>The mean of all basins by area; null where any of them has no value.</summary>
    public static double?[] OfAll(ArealRainfall areal)
    {
        var areas = areal.Basins.Basins.Select(basin => basin.Shape.Area).ToArray();
        var whole = areas.Sum();
        var series = new double?[areal.Times.Count];
        for (var t = 0; t < series.Length; t++)
        {
            series[t] = MeanAt(areal, t, areas, whole);
        }

        return series;
    }

    /// <summary>The depths of one basin.</summary>
    public static double?[] OfOne(ArealRainfall areal, int basin) =>
        [.. Enumerable.Range(0, areal.Times.Count).Select(t => areal.At(t, basin).DepthMillimetres)];

    private static double? MeanAt(ArealRainfall areal, int step, double[] areas, double whole)
    {
        var sum = default(CompensatedSum);
        for (var basin = 0; basin < areas.Length; basin++)
        {
            if (areal.At(step, basin).DepthMillimetres is not { } depth)
            {
                return null;
            }

            sum.Add(depth * areas[basin]);
        }

        return sum.Value / whole;
    }
}

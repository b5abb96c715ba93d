using RecipeRunner.Model.Weights;
using RecipeRunner.Numerics.Gaps;

namespace RecipeRunner.Steps.Series;

/// <summary>The gauges with weight in each basin while all report.</summary>
internal sealed class BasinOwners
{
    private readonly int gaugeCount;
    private readonly int[] starts;
    private readonly int[] gauges;
    private readonly FixedWeights weights;

    public BasinOwners(WeightTable table)
    {
        gaugeCount = table.Cells.Gauges.Gauges.Length;
        var counts = new int[table.Basins.Basins.Length];
        foreach (var weight in table.Weights)
        {
            counts[weight.Basin]++;
        }

        starts = new int[counts.Length + 1];
        for (var basin = 0; basin < counts.Length; basin++)
        {
            starts[basin + 1] = starts[basin] + counts[basin];
        }

        gauges = [.. table.Weights.Select(weight => weight.Gauge)];
        weights = new FixedWeights(gaugeCount, starts, gauges, [.. table.Weights.Select(weight => weight.Share)]);
    }

    /// <summary>How many gauges have weight in a basin.</summary>
    /// <param name="basin">Index of the basin.</param>
    public int CountOf(int basin) => starts[basin + 1] - starts[basin];

    /// <summary>Takes the means by these weights, rescaled where some are silent, and what reported.</summary>
    public void Apply(StepBlock block) =>
        weights.Means(
            block.Count,
            block.Depths,
            block.Reports,
            block.Means,
            block.Reporting,
            block.Shares,
            Environment.ProcessorCount
        );

    /// <summary>How many of a basin's gauges gave an estimated depth at a step.</summary>
    /// <param name="block">The steps.</param>
    /// <param name="at">Index by step, then basin.</param>
    public int CountEstimated(StepBlock block, int at)
    {
        var basins = starts.Length - 1;
        var (step, basin) = (at / basins, at % basins);
        var count = 0;
        foreach (var gauge in gauges.AsSpan(starts[basin]..starts[basin + 1]))
        {
            count += block.Estimated[(step * gaugeCount) + gauge] ? 1 : 0;
        }

        return count;
    }
}

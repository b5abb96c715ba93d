using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Weights;
using RecipeRunner.Numerics.Gaps;
using RecipeRunner.Numerics.Weights;
using RecipeRunner.Steps.Weighting;

namespace RecipeRunner.Steps.Series;

/// <summary>
/// Weighs the depths of a record, block after block of steps. Whether a value is given, and what it rests on, is found the same way
/// under every gap policy; only then the policy says how the mean is taken.
/// </summary>
internal sealed class ArealCalculation
{
    private const int BlockSteps = 1024;

    private readonly WeightTable weights;
    private readonly RainRecords rain;
    private readonly int[] columns;
    private readonly BasinOwners owners;
    private readonly BasinDistances distances;
    private readonly Lazy<ReportingWeights> redrawn;

    /// <summary>Prepares the weighing.</summary>
    /// <param name="weights">Weights of the full network.</param>
    /// <param name="rain">Gauge records.</param>
    /// <param name="columns">For each gauge of the network the column of its record; -1 where it has none.</param>
    public ArealCalculation(WeightTable weights, RainRecords rain, int[] columns)
    {
        this.weights = weights;
        this.rain = rain;
        this.columns = columns;
        owners = new BasinOwners(weights);
        distances = new BasinDistances(weights.Basins, weights.Cells.Gauges);
        redrawn = new Lazy<ReportingWeights>(() => RedrawnWeights.Of(weights));
    }

    private int Basins => weights.Basins.Basins.Length;

    /// <summary>The series under one gap policy.</summary>
    /// <param name="gaps">What to do where a gauge is missing.</param>
    /// <param name="rule">What must report for a basin to have a value.</param>
    /// <param name="progress">Told the share done, before each block.</param>
    /// <exception cref="RefusedException">Basins too thin to be weighed by some set of gauges.</exception>
    public ArealRainfall Compute(GapPolicy gaps, ReportingRule rule, Action<double> progress)
    {
        var values = new ArealValue[rain.Times.Count * Basins];
        for (var first = 0; first < rain.Times.Count; first += BlockSteps)
        {
            progress((double)first / rain.Times.Count);
            var count = Math.Min(BlockSteps, rain.Times.Count - first);
            Fill(new StepBlock(rain, columns, first, count, Basins), gaps, rule, values);
        }

        return new ArealRainfall(weights.Basins, rain.Times, values);
    }

    private void Fill(StepBlock block, GapPolicy gaps, ReportingRule rule, ArealValue[] values)
    {
        owners.Apply(block);
        distances.Measure(block);
        var statuses = new ArealStatus[block.Count * Basins];
        for (var at = 0; at < statuses.Length; at++)
        {
            statuses[at] = StatusOf(block, at, gaps, rule);
            block.Wanted[at] = gaps == GapPolicy.Redraw && statuses[at] == ArealStatus.Partial;
        }

        Redraw(block);
        for (var at = 0; at < statuses.Length; at++)
        {
            values[(block.First * Basins) + at] = new ArealValue(
                statuses[at] == ArealStatus.Withheld ? null : block.Means[at],
                statuses[at],
                block.Reporting[at],
                owners.CountEstimated(block, at),
                block.Shares[at],
                block.Nearest[at]
            );
        }
    }

    private ArealStatus StatusOf(StepBlock block, int at, GapPolicy gaps, ReportingRule rule)
    {
        var reporting = block.Reporting[at];
        if (block.Nearest[at] is not { } nearest || !rule.IsMetBy(reporting, block.Shares[at], nearest))
        {
            return ArealStatus.Withheld;
        }

        return reporting == owners.CountOf(at % Basins) ? ArealStatus.Complete
            : gaps == GapPolicy.Redraw || (gaps == GapPolicy.Rescale && reporting > 0) ? ArealStatus.Partial
            : ArealStatus.Withheld;
    }

    private void Redraw(StepBlock block)
    {
        if (!block.Wanted.Contains(true))
        {
            return;
        }

        try
        {
            redrawn.Value.Means(
                block.Count,
                block.Depths,
                block.Reports,
                block.Wanted,
                block.Means,
                Environment.ProcessorCount
            );
        }
        catch (PolygonsRefusedException refused)
        {
            throw BasinWeights.Refusal(refused, weights.Basins);
        }
    }
}

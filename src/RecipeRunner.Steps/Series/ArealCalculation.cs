using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Weights;
using RecipeRunner.Numerics.Statistics;
using RecipeRunner.Steps.Weighting;

namespace RecipeRunner.Steps.Series;

/// <summary>Weighs the depths of one step after another.</summary>
internal sealed class ArealCalculation
{
    private readonly GapPolicy gaps;
    private readonly ReportingRule reporting;
    private readonly ImmutableArray<Weight>[] full;
    private readonly RedrawnWeights redrawn;
    private readonly BasinDistances distances;

    public ArealCalculation(WeightTable weights, GapPolicy gaps, ReportingRule reporting)
    {
        this.gaps = gaps;
        this.reporting = reporting;
        var byBasin = weights.Weights.ToLookup(weight => weight.Basin);
        full =
        [
            .. Enumerable.Range(0, weights.Basins.Basins.Length).Select(basin => byBasin[basin].ToImmutableArray()),
        ];
        redrawn = new RedrawnWeights(weights.Basins, weights.Cells.Gauges);
        distances = new BasinDistances(weights.Basins, weights.Cells.Gauges);
    }

    /// <summary>Computes the values of one step.</summary>
    /// <param name="depths">Millimetres, a value a gauge; 0 where missing.</param>
    /// <param name="reports">True for each gauge that reports.</param>
    /// <param name="values">Takes a value a basin.</param>
    public void Compute(ReadOnlySpan<double> depths, ReadOnlySpan<bool> reports, Span<ArealValue> values)
    {
        for (var basin = 0; basin < full.Length; basin++)
        {
            values[basin] = ValueOf(basin, depths, reports);
        }
    }

    private ArealValue ValueOf(int basin, ReadOnlySpan<double> depths, ReadOnlySpan<bool> reports)
    {
        var (count, share) = Reporting(full[basin], reports);
        var complete = count == full[basin].Length;
        var nearest = distances.ToNearest(basin, reports);
        var withheld =
            !complete
            && (
                gaps == GapPolicy.Withhold
                || nearest is null
                || !reporting.IsMetBy(count, share, nearest.Value)
                || (gaps == GapPolicy.Rescale && count == 0)
            );
        if (withheld)
        {
            return new ArealValue(null, ArealStatus.Withheld, count, 0, share, nearest);
        }

        var depth =
            complete ? Sum(full[basin], depths)
            : gaps == GapPolicy.Redraw ? Sum(redrawn.Of(basin, reports), depths)
            : Rescaled(full[basin], depths, reports);
        return new ArealValue(
            depth,
            complete ? ArealStatus.Complete : ArealStatus.Partial,
            count,
            0,
            complete ? 1 : share,
            nearest
        );
    }

    private static (int Count, double Share) Reporting(ImmutableArray<Weight> weights, ReadOnlySpan<bool> reports)
    {
        var (count, share) = (0, default(CompensatedSum));
        foreach (var weight in weights)
        {
            if (reports[weight.Gauge])
            {
                count++;
                share.Add(weight.Share);
            }
        }

        return (count, share.Value);
    }

    private static double Sum(ImmutableArray<Weight> weights, ReadOnlySpan<double> depths)
    {
        var sum = default(CompensatedSum);
        foreach (var weight in weights)
        {
            sum.Add(weight.Share * depths[weight.Gauge]);
        }

        return sum.Value;
    }

    private static double Rescaled(
        ImmutableArray<Weight> weights,
        ReadOnlySpan<double> depths,
        ReadOnlySpan<bool> reports
    )
    {
        var (sum, share) = (default(CompensatedSum), default(CompensatedSum));
        foreach (var weight in weights)
        {
            if (reports[weight.Gauge])
            {
                sum.Add(weight.Share * depths[weight.Gauge]);
                share.Add(weight.Share);
            }
        }

        return sum.Value / share.Value;
    }
}

using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Weights;
using RecipeRunner.Steps.Records;
using RecipeRunner.Steps.Series;

namespace RecipeRunner.Steps.Answers;

/// <summary>
/// Computes mean areal rainfall under all three gap policies and shows, for each basin and season, how far they part: so that a
/// reader sees whether the choice matters. Redraw and Rescale are compared over the steps at which both have a value; Withhold has a
/// value at the complete steps alone, and the rain that it leaves out is counted.
/// </summary>
/// <param name="Weights">Weights of the full network.</param>
/// <param name="Rain">Gauge records.</param>
/// <param name="Reporting">What must report for a basin to have a value.</param>
/// <param name="Seasons">The part of the year by which steps are grouped, over all years together.</param>
/// <example><code>EmitTable(weights.ComparePolicies(rain, reporting: AtLeast.Percent(60)), "policies");</code></example>
[Step("Compare gap policies", Word = "compare")]
public sealed record ComparePoliciesStep(WeightTable Weights, RainRecords Rain, ReportingRule Reporting, Every Seasons)
    : Step<ResultTable>
{
    /// <inheritdoc/>
    public override ResultTable Execute(StepContext context)
    {
        var columns = RecordColumns.Match(context, Weights.Cells.Gauges, Rain);
        var calculation = new ArealCalculation(Weights, Rain, columns);
        var redraw = calculation.Compute(GapPolicy.Redraw, Reporting, share => Report(context, share / 2));
        var rescale = calculation.Compute(GapPolicy.Rescale, Reporting, share => Report(context, 0.5 + (share / 2)));
        var seasons = SeasonsOf(Rain.Times);
        var rows =
            from basin in Enumerable.Range(0, Weights.Basins.Basins.Length)
            from season in seasons
            select PolicyContrast.Of(redraw, rescale, basin, season.Key, [.. season]);
        context.Assume(
            $"Gap policies are compared over {Seasons.ToSettingText()} of all years together; what must report for a basin to have a value: {Reporting.ToSettingText()}."
        );
        return new ResultTable(
            "Where the gap policies part",
            PolicyContrast.TableOf([.. rows], Weights.Basins, Rain.Times)
        );
    }

    private static void Report(StepContext context, double share)
    {
        context.Cancellation.ThrowIfCancellationRequested();
        context.Progress(share);
    }

    /// <summary>The steps of each part of the year, in the order of their first months.</summary>
    private ILookup<string, int> SeasonsOf(Timeline times)
    {
        var periods = Periods.Of(times, Seasons);
        return periods
            .OrderBy(period => period.Start.Month)
            .SelectMany(period =>
                Enumerable
                    .Range(period.FirstStep, period.Count)
                    .Select(step => (Season: Seasons.PartOfYear(period.Start), step))
            )
            .ToLookup(pair => pair.Season, pair => pair.step, StringComparer.Ordinal);
    }
}

/// <summary>The verb for <see cref="ComparePoliciesStep"/>.</summary>
public static class ComparePoliciesVerb
{
    /// <inheritdoc cref="ComparePoliciesStep"/>
    /// <param name="weights">Weights of the full network.</param>
    /// <param name="rain">Gauge records.</param>
    /// <param name="reporting">What must report for a basin to have a value; any gauge where not given.</param>
    /// <param name="seasons">The part of the year by which steps are grouped; <c>Every.Season</c> where not given.</param>
    public static ResultTable ComparePolicies(
        this WeightTable weights,
        RainRecords rain,
        ReportingRule? reporting = null,
        Every? seasons = null
    ) => weights.Run(new ComparePoliciesStep(weights, rain, reporting ?? ReportingRule.Any, seasons ?? Every.Season));
}

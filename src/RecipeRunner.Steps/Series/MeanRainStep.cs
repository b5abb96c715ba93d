using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Weights;
using RecipeRunner.Model.Wording;
using RecipeRunner.Steps.Records;

namespace RecipeRunner.Steps.Series;

/// <summary>
/// Computes mean areal rainfall: at every step, each basin's depths weighted. Where gauges are missing the gap policy
/// says what to do; below the threshold the value is withheld, not guessed.
/// </summary>
/// <param name="Weights">Weights of the full network.</param>
/// <param name="Rain">Gauge records.</param>
/// <param name="Gaps">What to do where a gauge is missing.</param>
/// <param name="Reporting">
/// What must report for a basin to have a value: a share of its weight in the full network, a number of gauges, a gauge within some
/// distance, or several of these joined with <c>&amp;</c>.
/// </param>
/// <example><code>var areal = weights.MeanRain(rain, gaps: GapPolicy.Redraw, reporting: AtLeast.Percent(60) &amp; Within.Kilometres(30));</code></example>
[Step("Mean rain", Word = "rain", Source = "Thiessen 1911, doi:10.1175/1520-0493(1911)39<1082b:PAFLA>2.0.CO;2")]
public sealed record MeanRainStep(WeightTable Weights, RainRecords Rain, GapPolicy Gaps, ReportingRule Reporting)
    : Step<ArealRainfall>,
        IArealStep
{
    /// <inheritdoc/>
    public override ArealRainfall Execute(StepContext context)
    {
        var network = Weights.Cells.Gauges;
        var columns = RecordColumns.Match(context, network, Rain);
        var areal = new ArealCalculation(Weights, Rain, columns).Compute(
            Gaps,
            Reporting,
            share =>
            {
                context.Cancellation.ThrowIfCancellationRequested();
                context.Progress(share);
            }
        );
        context.Assume(PolicyWords());
        context.Assume("A missing value is not zero: it is left out, as the gap policy says.");
        TellOfWithheld(context, areal);
        return areal;
    }

    /// <inheritdoc/>
    public ArealAccount AccountFor(ArealRainfall areal, int step, int basin) =>
        new ValueAccount(this, RecordColumns.Of(Weights.Cells.Gauges, Rain)).Of(areal, step, basin);

    /// <inheritdoc/>
    public ArealRainfall Recompute(WeightTable weights, RainRecords rain) =>
        new ArealCalculation(weights, rain, RecordColumns.Of(weights.Cells.Gauges, rain)).Compute(
            Gaps,
            Reporting,
            _ => { }
        );

    private string PolicyWords() =>
        Gaps switch
        {
            GapPolicy.Redraw =>
                $"Where a gauge is missing, cells are drawn anew from the gauges that report; {RuleWords()}",
            GapPolicy.Rescale =>
                $"Where a gauge is missing, the weights of the others are scaled up to sum to 1; {RuleWords()}",
            _ => "Where a gauge with weight is missing, the value is withheld.",
        };

    private string RuleWords() =>
        Reporting == ReportingRule.Any
            ? "any gauge that reports is enough."
            : $"what must report for a basin to have a value: {Reporting.ToSettingText()}.";

    private static void TellOfWithheld(StepContext context, ArealRainfall areal)
    {
        var steps = areal.Times.Count;
        var withheld = areal
            .Basins.Basins.Select(
                (basin, b) =>
                    (
                        basin.Id,
                        Count: Enumerable.Range(0, steps).Count(t => areal.At(t, b).Status == ArealStatus.Withheld)
                    )
            )
            .ToArray();
        var always = withheld.Where(basin => basin.Count == steps).Select(basin => basin.Id).ToArray();
        if (always.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0513",
                    Place.Of("areal rainfall"),
                    $"Every value is withheld for {Listing.Of(always)}.",
                    "Too few gauges report, or what the recipe asks to report never does there; see the coverage table."
                )
            );
        }

        var sometimes = withheld
            .Where(basin => basin.Count > 0 && basin.Count < steps)
            .Select(basin => FormattableString.Invariant($"{basin.Id} {basin.Count}"))
            .ToArray();
        if (sometimes.Length > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0514",
                    Place.Of("areal rainfall"),
                    FormattableString.Invariant(
                        $"Of {Counted.Of(steps, "value")} a basin some are withheld for want of gauges: {Listing.Of(sometimes)}."
                    ),
                    ""
                )
            );
        }
    }
}

/// <summary>The verb for <see cref="MeanRainStep"/>.</summary>
public static class MeanRainVerb
{
    /// <inheritdoc cref="MeanRainStep"/>
    /// <param name="weights">Weights of the full network.</param>
    /// <param name="rain">Gauge records.</param>
    /// <param name="gaps">What to do where a gauge is missing.</param>
    /// <param name="reporting">What must report for a basin to have a value; any gauge where not given.</param>
    public static ArealRainfall MeanRain(
        this WeightTable weights,
        RainRecords rain,
        GapPolicy gaps,
        ReportingRule? reporting = null
    ) => weights.Run(new MeanRainStep(weights, rain, gaps, reporting ?? ReportingRule.Any));
}

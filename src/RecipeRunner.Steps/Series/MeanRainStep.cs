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
/// <param name="Reporting">The share of a basin's weight in the full network that must report.</param>
/// <example><code>var areal = weights.MeanRain(rain, gaps: GapPolicy.Redraw, reporting: AtLeast.Percent(60));</code></example>
[Step("Mean rain", Word = "rain", Source = "Thiessen 1911, doi:10.1175/1520-0493(1911)39<1082b:PAFLA>2.0.CO;2")]
public sealed record MeanRainStep(WeightTable Weights, RainRecords Rain, GapPolicy Gaps, ReportingRule Reporting)
    : Step<ArealRainfall>
{
    /// <inheritdoc/>
    public override ArealRainfall Execute(StepContext context)
    {
        var network = Weights.Cells.Gauges;
        var columns = RecordColumns.Match(context, network, Rain);
        var calculation = new ArealCalculation(Weights, Gaps, Reporting);
        var basins = Weights.Basins.Basins.Length;
        var values = new ArealValue[Rain.Times.Count * basins];
        var (depths, reports) = (new double[columns.Length], new bool[columns.Length]);
        for (var t = 0; t < Rain.Times.Count; t++)
        {
            context.Cancellation.ThrowIfCancellationRequested();
            context.Progress((double)t / Rain.Times.Count);
            Gather(t, columns, depths, reports);
            calculation.Compute(depths, reports, values.AsSpan(t * basins, basins));
        }

        var areal = new ArealRainfall(Weights.Basins, Rain.Times, values);
        context.Assume(PolicyWords());
        context.Assume("A missing value is not zero: it is left out, as the gap policy says.");
        TellOfWithheld(context, areal);
        return areal;
    }

    private void Gather(int t, int[] columns, double[] depths, bool[] reports)
    {
        var row = Rain.DepthsAt(t);
        var statuses = Rain.StatusesAt(t);
        for (var gauge = 0; gauge < columns.Length; gauge++)
        {
            var column = columns[gauge];
            reports[gauge] = column >= 0 && statuses[column].Reports();
            depths[gauge] = reports[gauge] ? row[column] : 0;
        }
    }

    private string PolicyWords() =>
        Gaps switch
        {
            GapPolicy.Redraw =>
                $"Where a gauge is missing, cells are drawn anew from the gauges that report; {Reporting.ToSettingText()} of a basin's weight must report.",
            GapPolicy.Rescale =>
                $"Where a gauge is missing, the weights of the others are scaled up to sum to 1; {Reporting.ToSettingText()} of a basin's weight must report.",
            _ => "Where a gauge with weight is missing, the value is withheld.",
        };

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
                    "Too few gauges report; see the coverage table."
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
                        $"Of {steps} values a basin, some are withheld for want of gauges: {Listing.Of(sometimes)}."
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
    /// <param name="reporting">The share of a basin's weight that must report; any share where not given.</param>
    public static ArealRainfall MeanRain(
        this WeightTable weights,
        RainRecords rain,
        GapPolicy gaps,
        ReportingRule? reporting = null
    ) => weights.Run(new MeanRainStep(weights, rain, gaps, reporting ?? ReportingRule.Any));
}

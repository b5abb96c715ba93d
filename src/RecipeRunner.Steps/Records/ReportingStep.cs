using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Records;

/// <summary>Takes the gauges that reported at every step of some records, to draw the cells that were in force then.</summary>
/// <param name="Gauges">The network.</param>
/// <param name="Rain">Gauge records, of a storm for instance.</param>
/// <example><code>var live = gauges.Reporting(rain.Between("2024-07-12", "2024-07-14"));</code></example>
[Step("Reporting gauges", Word = "reporting")]
public sealed record ReportingStep(GaugeNetwork Gauges, RainRecords Rain) : Step<GaugeNetwork>
{
    /// <inheritdoc/>
    public override GaugeNetwork Execute(StepContext context)
    {
        var columns = RecordColumns.Match(context, Gauges, Rain);
        var live = Gauges.Gauges.Where((_, gauge) => columns[gauge] >= 0 && ReportsAlways(columns[gauge])).ToArray();
        TellOfLeftOut(context, live);
        return live.Length > 0
            ? new GaugeNetwork(live, Gauges.ReferenceSystem, Gauges.Source)
            : throw new RefusedException(
                Finding.Error(
                    "RR0518",
                    new Place(Rain.Source),
                    "No gauge reported at every one of these steps.",
                    "Take fewer steps."
                )
            );
    }

    private void TellOfLeftOut(StepContext context, Gauge[] live)
    {
        var silent = Gauges.Gauges.Except(live).Select(gauge => gauge.Id).ToArray();
        if (silent.Length > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0519",
                    new Place(Rain.Source),
                    $"Left out, because silent at some step from {Rain.Times}: {Listing.Of(silent)}."
                )
            );
        }
    }

    private bool ReportsAlways(int column) =>
        Enumerable.Range(0, Rain.Times.Count).All(t => Rain.StatusesAt(t)[column].Reports());
}

/// <summary>The verb for <see cref="ReportingStep"/>.</summary>
public static class ReportingVerb
{
    /// <inheritdoc cref="ReportingStep"/>
    /// <param name="gauges">The network.</param>
    /// <param name="rain">Gauge records, of a storm for instance.</param>
    public static GaugeNetwork Reporting(this GaugeNetwork gauges, RainRecords rain) =>
        gauges.Run(new ReportingStep(gauges, rain));
}

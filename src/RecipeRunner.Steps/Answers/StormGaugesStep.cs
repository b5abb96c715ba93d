using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Answers;

/// <summary>Lists what each gauge recorded in each storm, and at how many of its steps: the gauges behind the storm.</summary>
/// <param name="Storms">Storms.</param>
/// <param name="Rain">The records from which the areal rainfall was computed.</param>
/// <example><code>EmitTable(storms.Gauges(rain), "storm-gauges");</code></example>
[Step("Storm gauges", Word = "gauges")]
public sealed record StormGaugesStep(StormList Storms, RainRecords Rain) : Step<ResultTable>
{
    /// <inheritdoc/>
    public override ResultTable Execute(StepContext context)
    {
        if (Rain.Times != Storms.Areal.Times)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0549",
                    new Place(Rain.Source),
                    $"The records are {Rain.Times.Step.ToSettingText()} from {Rain.Times}, the storms were found in {Storms.Areal.Times.Step.ToSettingText()} from {Storms.Areal.Times}.",
                    "Give the records from which the areal rainfall was computed."
                )
            );
        }

        var rows = Storms
            .Storms.SelectMany(
                (storm, s) => Enumerable.Range(0, Rain.GaugeIds.Length).Select(g => Row.Of(Rain, storm, s + 1, g))
            )
            .ToArray();
        return new ResultTable(
            "Gauges behind the storms",
            new Table([
                Column.OfCounts("storm", "", "Number of the storm, in order of time", rows.Select(row => row.Storm)),
                Column.OfText("gauge", "Gauge id", rows.Select(row => Rain.GaugeIds[row.Gauge])),
                Column.OfNumbers(
                    "depth_mm",
                    "mm",
                    6,
                    "Sum of the steps at which it reported; blank where it never did",
                    rows.Select(row => row.Reporting > 0 ? (double?)row.Depth : null)
                ),
                Column.OfCounts(
                    "steps_reporting",
                    "",
                    "Steps of the storm at which it reported",
                    rows.Select(row => row.Reporting)
                ),
                Column.OfCounts(
                    "steps_estimated",
                    "",
                    "How many of them are estimated",
                    rows.Select(row => row.Estimated)
                ),
                Column.OfCounts("steps", "", "Steps of the storm", rows.Select(row => row.Steps)),
            ])
        );
    }

    private readonly record struct Row(int Storm, int Gauge, double Depth, int Reporting, int Estimated, int Steps)
    {
        public static Row Of(RainRecords rain, Storm storm, int number, int gauge)
        {
            var (depth, reporting, estimated) = (0.0, 0, 0);
            for (var t = storm.FirstStep; t <= storm.LastStep; t++)
            {
                var status = rain.StatusesAt(t)[gauge];
                if (status.Reports())
                {
                    depth += rain.DepthsAt(t)[gauge];
                    reporting++;
                    estimated += status == RecordStatus.Estimated ? 1 : 0;
                }
            }

            return new Row(number, gauge, depth, reporting, estimated, storm.Steps);
        }
    }
}

/// <summary>The verb for <see cref="StormGaugesStep"/>.</summary>
public static class StormGaugesVerb
{
    /// <inheritdoc cref="StormGaugesStep"/>
    /// <param name="storms">Storms.</param>
    /// <param name="rain">The records from which the areal rainfall was computed.</param>
    public static ResultTable Gauges(this StormList storms, RainRecords rain) =>
        storms.Run(new StormGaugesStep(storms, rain));
}

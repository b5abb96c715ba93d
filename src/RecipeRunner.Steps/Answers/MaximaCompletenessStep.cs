using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Answers;

/// <summary>Counts, for each basin and duration, how many years are complete enough for their maximum to stand, and what those have.</summary>
/// <param name="Maxima">Annual maxima.</param>
/// <example><code>EmitTable(maxima.Completeness(), "years-complete");</code></example>
[Step("Complete years", Word = "complete")]
public sealed record MaximaCompletenessStep(AnnualMaxima Maxima) : Step<ResultTable>
{
    /// <inheritdoc/>
    public override ResultTable Execute(StepContext context)
    {
        var groups = Maxima.Maxima.GroupBy(row => (row.Basin, row.DurationSteps)).ToArray();
        var given = groups
            .Select(group => group.Select(row => row.DepthMillimetres).OfType<double>().ToArray())
            .ToArray();
        return new ResultTable(
            "Years complete enough for their maximum",
            new Table([
                Column.OfText(
                    "basin",
                    "Basin id",
                    groups.Select(group => Maxima.Areal.Basins.Basins[group.Key.Basin].Id)
                ),
                Column.OfCounts(
                    "duration_steps",
                    "",
                    "How many steps on end",
                    groups.Select(group => group.Key.DurationSteps)
                ),
                Column.OfCounts(
                    "years",
                    "",
                    $"Years that the record reaches into ({Maxima.Years.ToSettingText()})",
                    groups.Select(group => group.Count())
                ),
                Column.OfCounts(
                    "years_complete",
                    "",
                    "How many of them have a maximum",
                    given.Select(depths => depths.Length)
                ),
                Column.OfNumbers(
                    "mean_mm",
                    "mm",
                    6,
                    "Mean of these maxima; blank where there is none",
                    given.Select(depths => depths.Length == 0 ? (double?)null : depths.Average())
                ),
                Column.OfNumbers(
                    "largest_mm",
                    "mm",
                    6,
                    "The largest of them; blank where there is none",
                    given.Select(depths => depths.Length == 0 ? (double?)null : depths.Max())
                ),
            ])
        );
    }
}

/// <summary>The verb for <see cref="MaximaCompletenessStep"/>.</summary>
public static class MaximaCompletenessVerb
{
    /// <inheritdoc cref="MaximaCompletenessStep"/>
    /// <param name="maxima">Annual maxima.</param>
    public static ResultTable Completeness(this AnnualMaxima maxima) => maxima.Run(new MaximaCompletenessStep(maxima));
}

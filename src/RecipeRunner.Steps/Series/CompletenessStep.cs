using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Series;

/// <summary>Lays out how many of the steps that a period has by the calendar each total rests on.</summary>
/// <param name="Totals">Totals of areal rainfall.</param>
/// <example><code>EmitTable(areal.Total(Every.Month).Completeness(), "months-completeness");</code></example>
[Step("Completeness", Word = "complete")]
public sealed record CompletenessStep(ArealTotals Totals) : Step<CompletenessTable>
{
    /// <inheritdoc/>
    public override CompletenessTable Execute(StepContext context) => new(Totals);
}

/// <summary>The verb for <see cref="CompletenessStep"/>.</summary>
public static class CompletenessVerb
{
    /// <inheritdoc cref="CompletenessStep"/>
    /// <param name="totals">Totals of areal rainfall.</param>
    public static CompletenessTable Completeness(this ArealTotals totals) => totals.Run(new CompletenessStep(totals));
}

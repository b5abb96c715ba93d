using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Rain;

/// <summary>What every total rests on: a row a basin and period.</summary>
public sealed class CompletenessTable : Artifact, ITabular
{
    /// <summary>Creates the table.</summary>
    /// <param name="totals">The totals.</param>
    public CompletenessTable(ArealTotals totals) => Totals = totals;

    /// <summary>The totals.</summary>
    public ArealTotals Totals { get; }

    /// <summary>Columns <c>basin, period, steps_with_value, steps_expected, gauges_least, weight_mean, total_mm</c>.</summary>
    public Table ToTable()
    {
        var basins = Totals.Basins.Basins;
        var rows = Enumerable
            .Range(0, basins.Length)
            .SelectMany(b =>
                Enumerable.Range(0, Totals.Starts.Length).Select(p => (Basin: b, Period: p, Total: Totals.At(p, b)))
            )
            .ToArray();
        return new Table([
            Column.OfText("basin", "Basin id", rows.Select(row => basins[row.Basin].Id)),
            Column.OfText(
                "period",
                "Period over which steps are summed",
                rows.Select(row => Totals.Period.NameOf(Totals.Starts[row.Period]))
            ),
            Column.OfCounts(
                "steps_with_value",
                "",
                "Steps that have a value",
                rows.Select(row => row.Total.StepsWithValue)
            ),
            Column.OfCounts(
                "steps_expected",
                "",
                "Steps that the period has by the calendar",
                rows.Select(row => row.Total.StepsExpected)
            ),
            Column.OfCounts(
                "gauges_least",
                "",
                "The least number of gauges with weight that reported at a step that has a value",
                rows.Select(row => row.Total.LeastGaugesReporting)
            ),
            Column.OfNumbers(
                "weight_mean",
                "",
                12,
                "The mean share of the basin's weight in the full network that reported at those steps; blank where there are none",
                rows.Select(row => row.Total.StepsWithValue == 0 ? null : (double?)row.Total.MeanWeightReporting)
            ),
            Column.OfNumbers(
                "total_mm",
                "mm",
                6,
                "Total areal rainfall; blank where withheld",
                rows.Select(row => row.Total.DepthMillimetres)
            ),
        ]);
    }

    /// <inheritdoc/>
    public override string Describe() => Counted.Of(Totals.Basins.Basins.Length * Totals.Starts.Length, "total");

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer) => writer.Write(Totals);
}

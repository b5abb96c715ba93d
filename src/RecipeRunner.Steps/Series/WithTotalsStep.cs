using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Series;

/// <summary>
/// Puts totals beside their basins as columns in mm, for a layer to show: <c>rain_mm</c> for the whole record,
/// <c>mm_2024</c> or <c>mm_2024_01</c> for periods.
/// </summary>
/// <param name="Basins">The basins.</param>
/// <param name="Totals">Totals of the same basins.</param>
/// <example><code>EmitLayer(basins.With(areal.Total()), "basins");</code></example>
[Step("Join totals", Word = "join")]
public sealed record WithTotalsStep(BasinLayer Basins, ArealTotals Totals) : Step<BasinLayer>
{
    /// <inheritdoc/>
    public override BasinLayer Execute(StepContext context)
    {
        var index = Totals
            .Basins.Basins.Select((basin, b) => (basin.Id, b))
            .ToDictionary(pair => pair.Id, pair => pair.b, StringComparer.Ordinal);
        var strangers = Basins.Basins.Where(basin => !index.ContainsKey(basin.Id)).Select(basin => basin.Id).ToArray();
        if (strangers.Length > 0)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0507",
                    Place.Of($"basins {string.Join(", ", strangers.Take(5))}"),
                    "There are no totals for these basins.",
                    "Join totals to the basins that were weighed."
                )
            );
        }

        var columns = Totals.Starts.Select((_, period) => ColumnOf(period, index)).ToArray();
        TellOfReplaced(context, columns);
        return Basins.WithColumns(columns);
    }

    private void TellOfReplaced(StepContext context, Column[] columns)
    {
        var known = Basins.Columns.Select(column => column.Name).ToHashSet(StringComparer.Ordinal);
        var replaced = columns.Select(column => column.Name).Where(known.Contains).ToArray();
        if (replaced.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0508",
                    new Place(Basins.Source),
                    $"The basins had {Listing.Of(replaced)} already; the later totals take their place.",
                    "Join each kind of total to the basins on their own, and emit two layers."
                )
            );
        }
    }

    private Column ColumnOf(int period, Dictionary<string, int> index)
    {
        var name = Totals.Period.NameOf(Totals.Starts[period]);
        var whole = ReferenceEquals(Totals.Period, Every.WholeRecord);
        return Column.OfNumbers(
            whole ? "rain_mm" : string.Create(CultureInfo.InvariantCulture, $"mm_{name.Replace('-', '_')}"),
            "mm",
            6,
            $"Total areal rainfall, {name}; blank where withheld",
            Basins.Basins.Select(basin => Totals.At(period, index[basin.Id]).DepthMillimetres)
        );
    }
}

/// <summary>The verb for <see cref="WithTotalsStep"/>.</summary>
public static class WithTotalsVerb
{
    /// <inheritdoc cref="WithTotalsStep"/>
    /// <param name="basins">The basins.</param>
    /// <param name="totals">Totals of the same basins.</param>
    public static BasinLayer With(this BasinLayer basins, ArealTotals totals) =>
        basins.Run(new WithTotalsStep(basins, totals));
}

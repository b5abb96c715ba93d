using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Weights;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Weighting;

/// <summary>
/// Weighs gauges for basins: the share of each basin that is nearest to each gauge. A basin's weights sum to 1; gauges
/// beyond the basin count where their cells reach into it.
/// </summary>
/// <param name="Basins">The basins, in the cells' working grid.</param>
/// <param name="Cells">The Thiessen cells.</param>
/// <example><code>var weights = basins.WeighBy(cells);</code></example>
[Step("Weigh", Source = "Thiessen 1911, doi:10.1175/1520-0493(1911)39<1082b:PAFLA>2.0.CO;2")]
public sealed record WeighByStep(BasinLayer Basins, CellLayer Cells) : Step<WeightTable>
{
    /// <inheritdoc/>
    public override WeightTable Execute(StepContext context)
    {
        SameSystem.Require(Basins, Cells.Gauges);
        WorkingGrid.RequireForAreas(Basins.ReferenceSystem, Basins.Source, Basins.Bounds);
        var weights = BasinWeights.Of(NetworkCells.Of(Cells.Gauges), Basins, BasinBatch.Of(Basins.Basins));
        TellOfUnused(context, weights.Select(weight => weight.Gauge));
        return new WeightTable(Basins, Cells, weights);
    }

    private void TellOfUnused(StepContext context, IEnumerable<int> used)
    {
        var seen = used.ToHashSet();
        var unused = Cells.Gauges.Gauges.Where((_, gauge) => !seen.Contains(gauge)).Select(gauge => gauge.Id).ToArray();
        if (unused.Length > 0)
        {
            var listed =
                string.Join(", ", unused.Take(8))
                + (
                    unused.Length > 8
                        ? string.Create(CultureInfo.InvariantCulture, $" and {unused.Length - 8} more")
                        : ""
                );
            context.Find(
                Finding.Notice(
                    "RR0406",
                    new Place(Cells.Gauges.Source),
                    $"No basin reaches into the cells of {listed}: they have no weight while all gauges report."
                )
            );
        }
    }
}

/// <summary>The verb for <see cref="WeighByStep"/>.</summary>
public static class WeighByVerb
{
    /// <inheritdoc cref="WeighByStep"/>
    /// <param name="basins">The basins, in the cells' working grid.</param>
    /// <param name="cells">The Thiessen cells.</param>
    public static WeightTable WeighBy(this BasinLayer basins, CellLayer cells) =>
        basins.Run(new WeighByStep(basins, cells));
}

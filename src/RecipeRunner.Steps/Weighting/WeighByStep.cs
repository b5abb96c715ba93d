using NetTopologySuite.Algorithm.Locate;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Weights;
using RecipeRunner.Model.Wording;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Steps.Shapes;

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
        TellOfUngauged(context, weights.ToLookup(weight => weight.Basin));
        return new WeightTable(Basins, Cells, weights);
    }

    private void TellOfUnused(StepContext context, IEnumerable<int> used)
    {
        var seen = used.ToHashSet();
        var unused = Cells.Gauges.Gauges.Where((_, gauge) => !seen.Contains(gauge)).Select(gauge => gauge.Id).ToArray();
        if (unused.Length > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0406",
                    new Place(Cells.Gauges.Source),
                    $"No basin reaches into the cells of {Listing.Of(unused)}: they have no weight while all gauges report."
                )
            );
        }
    }

    /// <summary>A gauge within a basin has weight there, so only those need be looked at.</summary>
    private void TellOfUngauged(StepContext context, ILookup<int, Weight> weights)
    {
        var ungauged = Basins
            .Basins.Where((basin, b) => !HoldsGauge(basin, weights[b]))
            .Select(basin => basin.Id)
            .ToArray();
        if (ungauged.Length > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0407",
                    new Place(Basins.Source),
                    $"No gauge stands within {Listing.Of(ungauged)}; their rain is that of gauges outside.",
                    "Consider whether those gauges speak for the basin: height, exposure, distance."
                )
            );
        }
    }

    private bool HoldsGauge(Basin basin, IEnumerable<Weight> weights)
    {
        var inside = new IndexedPointInAreaLocator(RegionGeometry.Of(basin.Shape));
        return weights.Any(weight =>
            inside.Locate(RegionGeometry.Of(Cells.Gauges.Gauges[weight.Gauge].Place).Coordinate)
            != NetTopologySuite.Geometries.Location.Exterior
        );
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

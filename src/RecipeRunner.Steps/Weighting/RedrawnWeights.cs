using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Weights;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Steps.Weighting;

/// <summary>Weights from only those gauges that report: the cells are drawn anew for each set of reporting gauges.</summary>
internal sealed class RedrawnWeights
{
    private readonly BasinLayer basins;
    private readonly GaugeNetwork network;
    private readonly PolygonBatch batch;
    private bool[] drawnFor;
    private ILookup<int, Weight> drawn;

    public RedrawnWeights(BasinLayer basins, GaugeNetwork network)
    {
        this.basins = basins;
        this.network = network;
        batch = BasinBatch.Of(basins.Basins);
        drawnFor = [];
        drawn = Enumerable.Empty<Weight>().ToLookup(weight => weight.Basin);
    }

    /// <summary>The weights of one basin. Gauges are numbered as in the full network.</summary>
    /// <param name="basin">Index of the basin.</param>
    /// <param name="reports">True for each gauge that reports; at least one does.</param>
    public ImmutableArray<Weight> Of(int basin, ReadOnlySpan<bool> reports)
    {
        if (!reports.SequenceEqual(drawnFor))
        {
            drawn = Draw(reports).ToLookup(weight => weight.Basin);
            drawnFor = reports.ToArray();
        }

        return [.. drawn[basin]];
    }

    private IEnumerable<Weight> Draw(ReadOnlySpan<bool> reports)
    {
        var live = new List<int>();
        for (var gauge = 0; gauge < reports.Length; gauge++)
        {
            if (reports[gauge])
            {
                live.Add(gauge);
            }
        }

        var reporting = new GaugeNetwork(
            live.Select(gauge => network.Gauges[gauge]),
            network.ReferenceSystem,
            network.Source
        );
        return BasinWeights
            .Of(NetworkCells.Of(reporting), basins, batch)
            .Select(weight => weight with { Gauge = live[weight.Gauge] });
    }
}

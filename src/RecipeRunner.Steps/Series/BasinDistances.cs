using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Series;

/// <summary>Distances from basins to the nearest gauge that reports.</summary>
internal sealed class BasinDistances(BasinLayer basins, GaugeNetwork network)
{
    private readonly GaugeDistances?[] measured = new GaugeDistances?[basins.Basins.Length];

    /// <summary>Measures every basin at every step of a block: metres, 0 inside the basin.</summary>
    public void Measure(StepBlock block) => Parallel.For(0, measured.Length, basin => Measure(block, basin));

    private void Measure(StepBlock block, int basin)
    {
        var distances = measured[basin] ??= new GaugeDistances(basins.Basins[basin].Shape, network);
        var gauges = network.Gauges.Length;
        for (var t = 0; t < block.Count; t++)
        {
            block.Nearest[(t * measured.Length) + basin] = distances.ToNearest(
                block.Reports.AsSpan(t * gauges, gauges)
            );
        }
    }
}

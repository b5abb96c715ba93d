using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Series;

/// <summary>Distances from basins to the nearest gauge that reports.</summary>
internal sealed class BasinDistances(BasinLayer basins, GaugeNetwork network)
{
    private readonly GaugeDistances?[] measured = new GaugeDistances?[basins.Basins.Length];

    /// <summary>Metres from a basin, 0 inside it, to the nearest gauge that reports; null where none does.</summary>
    /// <param name="basin">Index of the basin.</param>
    /// <param name="reports">True for each gauge that reports.</param>
    public double? ToNearest(int basin, ReadOnlySpan<bool> reports)
    {
        measured[basin] ??= new GaugeDistances(basins.Basins[basin].Shape, network);
        return measured[basin]!.ToNearest(reports);
    }
}

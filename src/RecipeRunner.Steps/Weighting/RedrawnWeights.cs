using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Weights;
using RecipeRunner.Numerics.Gaps;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Steps.Weighting;

/// <summary>Weights from only those gauges that report, as if cells were drawn anew for each set of them.</summary>
internal static class RedrawnWeights
{
    /// <summary>The weights of the basins and the network of a table, for any set of reporting gauges.</summary>
    /// <exception cref="RefusedException">Shapes that cannot be weighed; all of them are named.</exception>
    public static ReportingWeights Of(WeightTable table)
    {
        var gauges = table.Cells.Gauges.Gauges;
        try
        {
            return ReportingWeights.Of(
                [.. gauges.Select(gauge => gauge.Place.X)],
                [.. gauges.Select(gauge => gauge.Place.Y)],
                BasinBatch.Of(table.Basins.Basins),
                Environment.ProcessorCount
            );
        }
        catch (PolygonsRefusedException refused)
        {
            throw BasinWeights.Refusal(refused, table.Basins);
        }
    }
}

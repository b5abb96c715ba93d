using NetTopologySuite.Algorithm.Locate;
using NetTopologySuite.Geometries;
using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Shapes;

namespace RecipeRunner.Steps.Series;

/// <summary>Distances from basins to gauges: for each basin the gauges from the nearest outwards.</summary>
internal sealed class BasinDistances
{
    private readonly (int Gauge, double Metres)[][] nearest;

    public BasinDistances(BasinLayer basins, GaugeNetwork network)
    {
        var points = network.Gauges.Select(gauge => RegionGeometry.Of(gauge.Place)).ToArray();
        nearest = [.. basins.Basins.Select(basin => Ordered(RegionGeometry.Of(basin.Shape), points))];
    }

    /// <summary>Metres from a basin, 0 inside it, to the nearest gauge that reports; null where none does.</summary>
    /// <param name="basin">Index of the basin.</param>
    /// <param name="reports">True for each gauge that reports.</param>
    public double? ToNearest(int basin, ReadOnlySpan<bool> reports)
    {
        foreach (var (gauge, metres) in nearest[basin])
        {
            if (reports[gauge])
            {
                return metres;
            }
        }

        return null;
    }

    private static (int Gauge, double Metres)[] Ordered(Geometry shape, Point[] points)
    {
        var inside = new IndexedPointInAreaLocator(shape);
        return
        [
            .. points
                .Select(
                    (point, gauge) =>
                        (
                            gauge,
                            metres: inside.Locate(point.Coordinate) == NetTopologySuite.Geometries.Location.Exterior
                                ? shape.Distance(point)
                                : 0
                        )
                )
                .OrderBy(pair => pair.metres)
                .ThenBy(pair => pair.gauge),
        ];
    }
}

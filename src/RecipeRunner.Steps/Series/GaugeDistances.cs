using NetTopologySuite.Algorithm.Locate;
using NetTopologySuite.Operation.Distance;
using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Shapes;

namespace RecipeRunner.Steps.Series;

/// <summary>
/// Distances from one basin to gauges. The distance to the basin's rectangle is a lower bound that costs nothing: gauges are
/// looked at in its order, and the exact distance is taken, once, only of those that could be the nearest.
/// </summary>
internal sealed class GaugeDistances
{
    private const int Kept = 64;
    private readonly GaugeNetwork network;
    private readonly Bounds box;
    private readonly IndexedPointInAreaLocator inside;
    private readonly IndexedFacetDistance outline;
    private readonly (int Gauge, double Bound)[] closest;
    private readonly Dictionary<int, double> exact = [];

    public GaugeDistances(Region basin, GaugeNetwork network)
    {
        this.network = network;
        box = basin.Bounds;
        var shape = RegionGeometry.Of(basin);
        inside = new IndexedPointInAreaLocator(shape);
        outline = new IndexedFacetDistance(shape);
        closest =
        [
            .. Enumerable
                .Range(0, network.Gauges.Length)
                .Select(gauge => (gauge, BoundOf(gauge)))
                .OrderBy(pair => pair.Item2)
                .ThenBy(pair => pair.gauge)
                .Take(Kept),
        ];
    }

    /// <summary>Metres to the nearest gauge that reports, 0 inside the basin; null where none does.</summary>
    /// <param name="reports">True for each gauge that reports.</param>
    public double? ToNearest(ReadOnlySpan<bool> reports)
    {
        double? best = null;
        foreach (var (gauge, bound) in closest)
        {
            if (bound >= best)
            {
                return best;
            }

            best = reports[gauge] ? Nearer(best, gauge) : best;
        }

        return closest[^1].Bound >= best ? best : NearestOfAll(best, reports);
    }

    private double? NearestOfAll(double? best, ReadOnlySpan<bool> reports)
    {
        for (var gauge = 0; gauge < reports.Length; gauge++)
        {
            if (reports[gauge] && !(BoundOf(gauge) >= best))
            {
                best = Nearer(best, gauge);
            }
        }

        return best;
    }

    private double Nearer(double? best, int gauge) => Math.Min(best ?? double.PositiveInfinity, ToGauge(gauge));

    private double BoundOf(int gauge)
    {
        var place = network.Gauges[gauge].Place;
        var east = Math.Max(0, Math.Max(box.West - place.X, place.X - box.East));
        var north = Math.Max(0, Math.Max(box.South - place.Y, place.Y - box.North));
        return Math.Sqrt((east * east) + (north * north));
    }

    /// <summary>Metres to one gauge, 0 inside the basin.</summary>
    /// <param name="gauge">Index of the gauge.</param>
    public double ToGauge(int gauge)
    {
        if (!exact.TryGetValue(gauge, out var metres))
        {
            var point = RegionGeometry.Of(network.Gauges[gauge].Place);
            metres =
                inside.Locate(point.Coordinate) == NetTopologySuite.Geometries.Location.Exterior
                    ? outline.Distance(point)
                    : 0;
            exact.Add(gauge, metres);
        }

        return metres;
    }
}

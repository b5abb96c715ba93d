using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Records;

/// <summary>How rain was shared over some steps, as the nearest gauges saw it.</summary>
internal sealed class NeighbourPattern(RainRecords rain, GaugeNetwork network, int[] columns, int neighbours)
{
    private readonly Dictionary<int, int[]> nearest = [];

    /// <summary>The share of each step in a total, summing to 1; null where the neighbours do not tell.</summary>
    /// <param name="total">A total of several steps.</param>
    public double[]? Of(Accumulation total)
    {
        var steps = total.LastStep - total.FirstStep + 1;
        if (total.DepthMillimetres == 0)
        {
            return [.. Enumerable.Repeat(1.0 / steps, steps)];
        }

        if (Array.IndexOf(columns, total.Gauge) is var own && own < 0)
        {
            return null;
        }

        var depths = new double[steps];
        foreach (var gauge in Nearest(own).Where(gauge => ReportsThroughout(columns[gauge], total)).Take(neighbours))
        {
            var weight = 1 / Math.Max(1, SquaredDistance(own, gauge));
            for (var i = 0; i < steps; i++)
            {
                depths[i] += weight * rain.DepthsAt(total.FirstStep + i)[columns[gauge]];
            }
        }

        var sum = depths.Sum();
        return sum > 0 ? [.. depths.Select(depth => depth / sum)] : null;
    }

    /// <summary>All other gauges with records, the nearest first, those at one distance in the network's order.</summary>
    private int[] Nearest(int own)
    {
        if (!nearest.TryGetValue(own, out var order))
        {
            order =
            [
                .. Enumerable
                    .Range(0, columns.Length)
                    .Where(gauge => gauge != own && columns[gauge] >= 0)
                    .OrderBy(gauge => SquaredDistance(own, gauge)),
            ];
            nearest.Add(own, order);
        }

        return order;
    }

    private double SquaredDistance(int one, int other)
    {
        var (a, b) = (network.Gauges[one].Place, network.Gauges[other].Place);
        return ((a.X - b.X) * (a.X - b.X)) + ((a.Y - b.Y) * (a.Y - b.Y));
    }

    private bool ReportsThroughout(int column, Accumulation total)
    {
        for (var t = total.FirstStep; t <= total.LastStep; t++)
        {
            if (!rain.StatusesAt(t)[column].Reports())
            {
                return false;
            }
        }

        return true;
    }
}

using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Clipping;
using RecipeRunner.Numerics.Statistics;

namespace RecipeRunner.Numerics.Weights;

/// <summary>Weighs one polygon after another; each thread has its own, as it keeps its working arrays.</summary>
internal sealed class PolygonWeigher(CellGraph graph, PolygonBatch polygons)
{
    private readonly PieceTotals totals = new(graph);
    private readonly List<(int Site, double Area)> rows = [];

    public WeightRows Weigh(int first, int end)
    {
        var result = new WeightRows();
        for (int polygon = first; polygon < end; polygon++)
        {
            double area = AreaOf(polygon);
            string? reason = area > 0 ? Weigh(polygon, area) : "has no area, or rings that run the wrong way";
            if (reason is not null)
            {
                result.Refusals.Add(new PolygonRefusal(polygon, reason));
                continue;
            }

            Report(result, area);
        }

        return result;
    }

    /// <summary>Adds up the pieces, or says why it cannot.</summary>
    private string? Weigh(int polygon, double area)
    {
        totals.Clear();
        for (int ring = polygons.FirstRing(polygon); ring < polygons.EndRing(polygon); ring++)
        {
            if (totals.Add(Ring.Of(polygons.RingX(ring), polygons.RingY(ring))) is { } reason)
            {
                return reason;
            }
        }

        return totals.Collect(area, area);
    }

    private void Report(WeightRows result, double area)
    {
        rows.Clear();
        foreach ((int rank, double piece) in totals.Rows)
        {
            rows.Add((graph.Sites.CallerIndex[rank], piece));
        }

        rows.Sort((a, b) => a.Site.CompareTo(b.Site));
        foreach ((int site, double piece) in rows)
        {
            result.Sites.Add(site);
            result.Areas.Add(piece);
            result.Weights.Add(piece / totals.Sum);
        }

        result.Ends.Add(result.Sites.Count);
        result.PolygonAreas.Add(area);
    }

    private double AreaOf(int polygon)
    {
        var twice = new CompensatedSum();
        for (int ring = polygons.FirstRing(polygon); ring < polygons.EndRing(polygon); ring++)
        {
            ReadOnlySpan<double> x = polygons.RingX(ring);
            ReadOnlySpan<double> y = polygons.RingY(ring);
            for (int i = 2; i < x.Length; i++)
            {
                twice.Add(((x[i - 1] - x[0]) * (y[i] - y[0])) - ((x[i] - x[0]) * (y[i - 1] - y[0])));
            }
        }

        return twice.Value / 2;
    }
}

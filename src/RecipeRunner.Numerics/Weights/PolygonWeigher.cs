using System.Runtime.InteropServices;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Statistics;

namespace RecipeRunner.Numerics.Weights;

/// <summary>Weighs one polygon after another; each thread has its own, as it keeps its working arrays.</summary>
internal sealed class PolygonWeigher(CellGraph graph, PolygonBatch polygons)
{
    /// <summary>Pieces below this part of the magnitudes they were added up from are rounding: 16 roundings.</summary>
    private const double RoundingPart = 1.0 / (1L << 49);

    /// <summary>
    /// Pieces below this part of the polygon are rounding too: along a boundary that runs on a wall, pieces of up to 2e-16 of
    /// it were seen on either side of zero.
    /// </summary>
    private const double LeastPart = 1e-15;

    /// <summary>A negative piece below this part of the polygon changes no weight that anyone is promised.</summary>
    private const double HarmlessPart = 1e-12;

    /// <summary>How far, relative, the pieces may be from the whole.</summary>
    private const double AreaTolerance = 1e-9;

    private readonly PieceAreas cutter = new(graph);
    private readonly int[] place = new int[graph.Sites.Count];
    private readonly List<Piece> pieces = [];
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

    /// <summary>Fills <see cref="rows"/>, or says why it cannot.</summary>
    private string? Weigh(int polygon, double area)
    {
        Forget();
        for (int ring = polygons.FirstRing(polygon); ring < polygons.EndRing(polygon); ring++)
        {
            if (!cutter.Cut(polygons.RingX(ring), polygons.RingY(ring)))
            {
                return "has a ring without an inside";
            }

            AddRing();
        }

        rows.Clear();
        var sum = new CompensatedSum();
        foreach (Piece piece in pieces)
        {
            double bound = Math.Max(piece.Magnitude * RoundingPart, LeastPart * area);
            if (piece.TwiceArea < -Math.Max(bound, HarmlessPart * area))
            {
                return "has rings that cross, overlap or run the wrong way";
            }

            if (piece.TwiceArea > bound)
            {
                rows.Add((graph.Sites.CallerIndex[piece.Site], piece.TwiceArea / 2));
                sum.Add(piece.TwiceArea / 2);
            }
        }

        return Math.Abs(sum.Value - area) <= AreaTolerance * area
            ? null
            : "has pieces whose areas do not add up to its own: it is too thin for the coordinates' digits";
    }

    private void Report(WeightRows result, double area)
    {
        var sum = new CompensatedSum();
        foreach ((_, double piece) in rows)
        {
            sum.Add(piece);
        }

        rows.Sort((a, b) => a.Site.CompareTo(b.Site));
        foreach ((int site, double piece) in rows)
        {
            result.Sites.Add(site);
            result.Areas.Add(piece);
            result.Weights.Add(piece / sum.Value);
        }

        result.Ends.Add(result.Sites.Count);
        result.PolygonAreas.Add(area);
    }

    private void Forget()
    {
        foreach (Piece piece in pieces)
        {
            place[piece.Site] = 0;
        }

        pieces.Clear();
    }

    private void AddRing()
    {
        foreach (Piece piece in cutter.Pieces)
        {
            if (place[piece.Site] == 0)
            {
                pieces.Add(new Piece(piece.Site, 0, 0));
                place[piece.Site] = pieces.Count;
            }

            CollectionsMarshal.AsSpan(pieces)[place[piece.Site] - 1].Add(piece.TwiceArea, piece.Magnitude);
        }
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

using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Clipping;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Gaps;

/// <summary>The part of a polygon that lies in one site's cell, as rings of offsets from the polygon's first point.</summary>
/// <remarks>
/// I. Sutherland, G. Hodgman, "Reentrant polygon clipping", Communications of the ACM 17 (1974): each ring is cut by one
/// wall of the cell after the other. Edges that run back on themselves along a wall, which this leaves where a ring goes out
/// and in, have no area.
/// </remarks>
internal sealed class EstateShape
{
    private readonly List<(double[] X, double[] Y)> rings = [];
    private readonly double originX;
    private readonly double originY;

    private EstateShape(double originX, double originY)
    {
        this.originX = originX;
        this.originY = originY;
    }

    public int RingCount => rings.Count;

    /// <summary>The area in square metres.</summary>
    public double Area { get; private set; }

    public Ring this[int ring] => Ring.About(originX, originY, rings[ring].X, rings[ring].Y);

    /// <summary>Cuts a polygon to a cell.</summary>
    /// <param name="graph">The cells.</param>
    /// <param name="rank">Rank of the cell's site.</param>
    /// <param name="polygons">The polygons.</param>
    /// <param name="polygon">Which of them it is.</param>
    /// <param name="whole">The polygon's area; rings whose part of it is no more than rounding are left out.</param>
    public static EstateShape Of(CellGraph graph, int rank, PolygonBatch polygons, int polygon, double whole)
    {
        int first = polygons.FirstRing(polygon);
        var shape = new EstateShape(polygons.RingX(first)[0], polygons.RingY(first)[0]);
        for (int ring = first; ring < polygons.EndRing(polygon); ring++)
        {
            List<(double X, double Y)> part = shape.Offsets(polygons.RingX(ring), polygons.RingY(ring));
            for (int slot = graph.Start[rank]; slot < graph.Start[rank + 1] && part.Count > 0; slot++)
            {
                part = shape.Cut(part, graph.Walls[slot]);
            }

            shape.Add(part, PieceTotals.LeastPart * whole);
        }

        return shape;
    }

    private List<(double X, double Y)> Offsets(ReadOnlySpan<double> x, ReadOnlySpan<double> y)
    {
        var offsets = new List<(double X, double Y)>(x.Length);
        for (int i = 0; i < x.Length; i++)
        {
            offsets.Add((x[i] - originX, y[i] - originY));
        }

        return offsets;
    }

    private List<(double X, double Y)> Cut(List<(double X, double Y)> ring, Wall wall)
    {
        double midX = wall.MidX - originX;
        double midY = wall.MidY - originY;
        var kept = new List<(double X, double Y)>(ring.Count + 2);
        (double X, double Y) from = ring[^1];
        double before = ((from.X - midX) * wall.NormalX) + ((from.Y - midY) * wall.NormalY);
        foreach ((double X, double Y) to in ring)
        {
            double beyond = ((to.X - midX) * wall.NormalX) + ((to.Y - midY) * wall.NormalY);
            if ((before < 0 && beyond > 0) || (before > 0 && beyond < 0))
            {
                double share = before / (before - beyond);
                kept.Add((from.X + (share * (to.X - from.X)), from.Y + (share * (to.Y - from.Y))));
            }

            if (beyond <= 0)
            {
                kept.Add(to);
            }

            (from, before) = (to, beyond);
        }

        return kept;
    }

    private void Add(List<(double X, double Y)> ring, double negligible)
    {
        double twice = 0;
        for (int i = 2; i < ring.Count; i++)
        {
            twice +=
                ((ring[i - 1].X - ring[0].X) * (ring[i].Y - ring[0].Y))
                - ((ring[i].X - ring[0].X) * (ring[i - 1].Y - ring[0].Y));
        }

        if (Math.Abs(twice / 2) > negligible)
        {
            rings.Add(([.. ring.Select(p => p.X)], [.. ring.Select(p => p.Y)]));
            Area += twice / 2;
        }
    }
}

namespace RecipeRunner.Numerics.Cells;

/// <summary>
/// Draws one cell within a frame: each wall is cut to the frame, and from where one leaves it the outline follows the
/// frame's edge to where the next comes in. Linear in the number of walls. Walls are taken from their bisectors, so
/// corners far away, or none, do no harm; corners within the frame have the same bits in every cell that meets there.
/// </summary>
internal sealed class OutlineTracer
{
    private readonly CellGraph graph;
    private readonly int site;
    private readonly Frame frame;
    private readonly bool[] ownsFrameCorner;
    private readonly List<(double X, double Y)> points = [];

    private OutlineTracer(CellGraph graph, int site, Frame frame)
    {
        this.graph = graph;
        this.site = site;
        this.frame = frame;
        ownsFrameCorner = [.. Enumerable.Range(0, 4).Select(side => Owns(CornerAfter(side)))];
    }

    public static CellOutline Trace(CellGraph graph, int site, Frame frame)
    {
        var tracer = new OutlineTracer(graph, site, frame);
        for (int slot = graph.Start[site]; slot < graph.Start[site + 1]; slot++)
        {
            tracer.AddWall(slot);
        }

        return tracer.Finish();
    }

    private CellOutline Finish()
    {
        if (points.Count > 0)
        {
            FollowFrame(points[0]);
            while (points.Count > 1 && points[^1] == points[0])
            {
                points.RemoveAt(points.Count - 1);
            }
        }
        else if (Owns(((frame.MinX + frame.MaxX) / 2, (frame.MinY + frame.MaxY) / 2)))
        {
            points.AddRange(Enumerable.Range(0, 4).Select(CornerAfter));
        }

        return points.Count < 3
            ? new CellOutline([], [])
            : new CellOutline([.. points.Select(p => p.X)], [.. points.Select(p => p.Y)]);
    }

    /// <summary>
    /// Adds the part of a wall within the frame. A corner that rounding has put beside the frame, or to the wrong side of
    /// the end of the chord, is moved by that rounding.
    /// </summary>
    private void AddWall(int slot)
    {
        var chord = new Chord(graph.Walls[slot], frame);
        (bool begins, double beginning, (double X, double Y) first) = End(chord, graph.RightCorner(slot), -1);
        (bool ends, double ending, (double X, double Y) last) = End(chord, graph.LeftCorner[slot], 1);
        bool passes = !chord.IsEmpty && beginning < chord.ExitAt && ending > chord.EntryAt;
        if (begins || ends || passes)
        {
            (double X, double Y) entry = beginning > chord.EntryAt ? first : chord.Entry;
            (double X, double Y) exit = ending < chord.ExitAt ? last : chord.Exit;
            Follow(
                begins ? first
                : passes ? entry
                : last
            );
            Add(
                ends ? last
                : passes ? exit
                : first
            );
        }
    }

    /// <summary>A wall's end: whether it lies within the frame, its place on the chord, and the point, moved into the frame.</summary>
    private (bool IsWithin, double Place, (double X, double Y) Point) End(Chord chord, int corner, int direction)
    {
        if (corner == CellGraph.NoCorner)
        {
            return (false, direction * double.PositiveInfinity, default);
        }

        (double x, double y) = graph.PositionOf(corner);
        (double X, double Y) inFrame = (Math.Clamp(x, frame.MinX, frame.MaxX), Math.Clamp(y, frame.MinY, frame.MaxY));
        return (frame.Holds(x, y), chord.PlaceOf(x, y), inFrame);
    }

    private void Follow((double X, double Y) point)
    {
        if (points.Count > 0)
        {
            FollowFrame(point);
        }

        Add(point);
    }

    private void Add((double X, double Y) point)
    {
        if (points.Count == 0 || points[^1] != point)
        {
            points.Add(point);
        }
    }

    /// <summary>
    /// From the last point counter-clockwise along the frame to another; nothing when they are one. A wall cuts off one
    /// corner of the frame at least, so the way is never once around: then the two are one but for rounding.
    /// </summary>
    private void FollowFrame((double X, double Y) point)
    {
        int side = SideFrom(points[^1]);
        int lastSide = SideTo(point);
        while (points[^1] != point && side != lastSide)
        {
            if (ownsFrameCorner[side])
            {
                ownsFrameCorner[side] = false;
                Add(CornerAfter(side));
            }

            side = (side + 1) % 4;
        }
    }

    /// <summary>The side of the frame on which the way on from a point begins: at a corner of the frame the later one.</summary>
    private int SideFrom((double X, double Y) point) =>
        point.Y == frame.MinY && point.X < frame.MaxX ? 0
        : point.X == frame.MaxX && point.Y < frame.MaxY ? 1
        : point.Y == frame.MaxY && point.X > frame.MinX ? 2
        : 3;

    /// <summary>The side of the frame on which the way to a point ends: at a corner of the frame the earlier one.</summary>
    private int SideTo((double X, double Y) point) =>
        point.Y == frame.MinY && point.X > frame.MinX ? 0
        : point.X == frame.MaxX && point.Y > frame.MinY ? 1
        : point.Y == frame.MaxY && point.X < frame.MaxX ? 2
        : 3;

    /// <summary>The frame's corner at the end of a side: 0 lower, 1 right, 2 upper, 3 left.</summary>
    private (double X, double Y) CornerAfter(int side) =>
        (side is 0 or 1 ? frame.MaxX : frame.MinX, side is 1 or 2 ? frame.MaxY : frame.MinY);

    private bool Owns((double X, double Y) point)
    {
        for (int slot = graph.Start[site]; slot < graph.Start[site + 1]; slot++)
        {
            if (graph.Walls[slot].DistanceBeyond(point.X, point.Y) > 0)
            {
                return false;
            }
        }

        return true;
    }
}

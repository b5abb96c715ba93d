namespace RecipeRunner.Numerics.Cells;

/// <summary>
/// Draws one cell within a frame: each wall is cut to the frame, and from where one leaves it the outline follows the
/// frame's edge to where the next comes in. Linear in the number of walls. Walls are taken from their bisectors, so
/// corners far away, or none, do no harm; corners within the frame have the same bits in every cell that meets there.
/// </summary>
internal sealed class OutlineTracer
{
    private const int OffEdge = -1;

    private readonly CellGraph graph;
    private readonly int site;
    private readonly Frame frame;
    private readonly bool[] ownsFrameCorner;
    private readonly List<double> x = [];
    private readonly List<double> y = [];
    private int leftBySide = OffEdge;
    private int firstSide = OffEdge;

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
        if (x.Count == 0)
        {
            return Owns(((frame.MinX + frame.MaxX) / 2, (frame.MinY + frame.MaxY) / 2))
                ? new CellOutline(
                    [frame.MinX, frame.MaxX, frame.MaxX, frame.MinX],
                    [frame.MinY, frame.MinY, frame.MaxY, frame.MaxY]
                )
                : new CellOutline([], []);
        }

        FollowFrame(firstSide);
        while (x.Count > 1 && x[^1] == x[0] && y[^1] == y[0])
        {
            x.RemoveAt(x.Count - 1);
            y.RemoveAt(y.Count - 1);
        }

        return x.Count < 3 ? new CellOutline([], []) : new CellOutline([.. x], [.. y]);
    }

    private void AddWall(int slot)
    {
        var chord = new Chord(graph.Walls[slot], frame);
        bool startsInside = CornerWithin(graph.RightCorner(slot), out (double X, double Y) start);
        bool endsInside = CornerWithin(graph.LeftCorner[slot], out (double X, double Y) end);
        if (!startsInside && !endsInside && !MeetsFrame(chord, slot))
        {
            return;
        }

        // A chord that rounding has emptied beside a corner within the frame ends at that corner.
        int startSide = startsInside || chord.IsEmpty ? OffEdge : chord.EntrySide;
        int endSide = endsInside || chord.IsEmpty ? OffEdge : chord.ExitSide;
        AddPoint(
            startsInside ? start
                : chord.IsEmpty ? end
                : chord.Entry,
            startSide
        );
        AddPoint(
            endsInside ? end
                : chord.IsEmpty ? start
                : chord.Exit,
            OffEdge
        );
        leftBySide = endSide;
    }

    /// <summary>For a wall with no corner within the frame: whether it passes through the frame between its corners.</summary>
    private bool MeetsFrame(Chord chord, int slot)
    {
        int right = graph.RightCorner(slot);
        int left = graph.LeftCorner[slot];
        return !chord.IsEmpty
            && (right < 0 || Place(chord, right) < chord.ExitAt)
            && (left < 0 || Place(chord, left) > chord.EntryAt);
    }

    private double Place(Chord chord, int corner)
    {
        (double px, double py) = graph.PositionOf(corner);
        return chord.PlaceOf(px, py);
    }

    private bool CornerWithin(int corner, out (double X, double Y) position)
    {
        position = corner < 0 ? default : graph.PositionOf(corner);
        return corner >= 0 && frame.Holds(position.X, position.Y);
    }

    /// <summary>Adds a point; when it lies on a side of the frame, first the frame's corners on the way to it.</summary>
    private void AddPoint((double X, double Y) point, int side)
    {
        if (x.Count == 0)
        {
            firstSide = side;
        }
        else if (side != OffEdge)
        {
            FollowFrame(side);
        }

        if (x.Count == 0 || x[^1] != point.X || y[^1] != point.Y)
        {
            x.Add(point.X);
            y.Add(point.Y);
        }
    }

    /// <summary>
    /// From the last point, where the outline reached the frame, counter-clockwise to a point on the frame. A wall cuts
    /// off one corner of the frame at least, so the way never passes all four: then the two points are one but for
    /// rounding.
    /// </summary>
    private void FollowFrame(int side)
    {
        if (leftBySide == OffEdge || side == OffEdge)
        {
            return;
        }

        for (int passed = leftBySide; passed != side; passed = (passed + 1) % 4)
        {
            if (ownsFrameCorner[passed])
            {
                ownsFrameCorner[passed] = false;
                (double cornerX, double cornerY) = CornerAfter(passed);
                x.Add(cornerX);
                y.Add(cornerY);
            }
        }

        leftBySide = OffEdge;
    }

    /// <summary>The frame's corner at the end of a side, counter-clockwise; sides as in <see cref="Chord"/>.</summary>
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

using RecipeRunner.Numerics.Cells;

namespace RecipeRunner.Numerics.Clipping;

/// <summary>
/// Follows rings through the cells. Most points are touched once and cost a multiplication or two: while the ring stays
/// within the distance of the nearest wall, measured when it was last looked at, no wall needs to be looked at again.
/// </summary>
/// <remarks>
/// <para>
/// The walk is a walk over the graph of neighbouring sites, and closes. The areas computed from it add up to the ring's
/// own whichever way it went; rounding can only shift a wall by what rounding shifts.
/// </para>
/// <para>
/// It ends: a segment with direction d crosses from site a to b only if (b − a)·d is positive, a sign that is computed
/// exactly, so along a segment no site comes twice.
/// </para>
/// </remarks>
internal sealed class RingWalk(CellGraph graph)
{
    public const int NoExit = -1;

    private readonly List<Visit> visits = [];
    private int site;
    private double originX;
    private double originY;
    private double startX;
    private double startY;
    private double x;
    private double y;
    private double entryX;
    private double entryY;
    private double twiceSwept;
    private double length;
    private double room;

    /// <summary>The stays of the last ring, in its order; the first and the last are in the same cell.</summary>
    public List<Visit> Visits => visits;

    /// <summary>Walks a ring; false if the way does not close, as for a ring that rounding leaves no inside.</summary>
    public bool Follow(Ring ring)
    {
        (originX, originY) = (ring.OriginX, ring.OriginY);
        (startX, startY) = (ring.X[0] - ring.SubtractedX, ring.Y[0] - ring.SubtractedY);
        visits.Clear();
        Locate();
        visits.Clear();
        int first = site;
        Round(ring);
        return Close(first);
    }

    /// <summary>Ends the walk where it began, in the same cell.</summary>
    private bool Close(int first)
    {
        IReadOnlyList<int>? bridge = site == first ? [] : BridgeTo(first);
        foreach (int slot in bridge ?? [])
        {
            Leave(slot);
        }

        visits.Add(new Visit(site, NoExit, entryX, entryY, x, y, twiceSwept, length));
        return bridge is not null;
    }

    private IReadOnlyList<int>? BridgeTo(int first)
    {
        double digits = Math.Abs(originX) + Math.Abs(originY) + Math.Abs(startX) + Math.Abs(startY);
        return Bridge.Between(graph, site, first, originX + startX, originY + startY, digits);
    }

    private void Leave(int slot)
    {
        visits.Add(new Visit(site, slot, entryX, entryY, x, y, twiceSwept, length));
        site = graph.Neighbour[slot];
        Enter();
    }

    /// <summary>Finds the cell of the ring's first point: from a site near to it, which is in its own cell, by a straight walk.</summary>
    private void Locate()
    {
        site = graph.Sites.NearOnCurve(originX + startX, originY + startY);
        (x, y) = (graph.Sites.X[site] - originX, graph.Sites.Y[site] - originY);
        GoTo(startX, startY);
    }

    private void Round(Ring ring)
    {
        (x, y) = (startX, startY);
        Enter();
        room = 0;
        int next = 1;
        while (next < ring.X.Length)
        {
            GoTo(ring.X[next] - ring.SubtractedX, ring.Y[next] - ring.SubtractedY);
            next = StayInRoom(ring, next + 1);
        }

        GoTo(startX, startY);
    }

    /// <summary>
    /// Passes points for as long as they are nearer to the present one than any wall; returns the first that is not.
    /// </summary>
    private int StayInRoom(Ring ring, int next)
    {
        ReadOnlySpan<double> ringX = ring.X;
        ReadOnlySpan<double> ringY = ring.Y;
        double subtractedX = ring.SubtractedX;
        double subtractedY = ring.SubtractedY;
        double roomSquared = room * room;
        double anchorX = x;
        double anchorY = y;
        double lastX = x;
        double lastY = y;
        double swept = 0;
        double path = 0;
        for (; next < ringX.Length; next++)
        {
            double toX = ringX[next] - subtractedX;
            double toY = ringY[next] - subtractedY;
            double awayX = toX - anchorX;
            double awayY = toY - anchorY;
            if (!((awayX * awayX) + (awayY * awayY) < roomSquared))
            {
                break;
            }

            swept += ((lastX - entryX) * (toY - entryY)) - ((toX - entryX) * (lastY - entryY));
            path += Math.Abs(toX - lastX) + Math.Abs(toY - lastY);
            lastX = toX;
            lastY = toY;
        }

        twiceSwept += swept;
        length += path;
        (x, y) = (lastX, lastY);
        return next;
    }

    private void Enter()
    {
        (entryX, entryY) = (x, y);
        twiceSwept = 0;
        length = 0;
    }

    private void Advance(double toX, double toY)
    {
        twiceSwept += ((x - entryX) * (toY - entryY)) - ((toX - entryX) * (y - entryY));
        length += Math.Abs(toX - x) + Math.Abs(toY - y);
        x = toX;
        y = toY;
    }

    /// <summary>Goes straight to a point, over as many walls as there are on the way, and measures the room there.</summary>
    private void GoTo(double toX, double toY)
    {
        double directionX = toX - x;
        double directionY = toY - y;
        while (true)
        {
            int exit = FirstWall(toX, toY, directionX, directionY, out double share);
            if (exit == NoExit)
            {
                Advance(toX, toY);
                return;
            }

            Advance(x + (share * (toX - x)), y + (share * (toY - y)));
            Leave(exit);
        }
    }

    /// <summary>
    /// The wall of the present cell that is crossed first on the way to a point, and at what share of the way; if none is,
    /// <see cref="NoExit"/>, and <see cref="room"/> is the distance from the point to the nearest wall.
    /// </summary>
    private int FirstWall(double toX, double toY, double directionX, double directionY, out double share)
    {
        int exit = NoExit;
        share = double.PositiveInfinity;
        double nearest = double.PositiveInfinity;
        for (int slot = graph.Start[site]; slot < graph.Start[site + 1]; slot++)
        {
            Wall wall = graph.Walls[slot];
            double midX = wall.MidX - originX;
            double midY = wall.MidY - originY;
            double beyond = ((toX - midX) * wall.NormalX) + ((toY - midY) * wall.NormalY);
            nearest = Math.Min(nearest, -beyond);
            if (!(beyond > 0) || !LeadsTo(graph.Neighbour[slot], directionX, directionY))
            {
                continue;
            }

            double before = ((x - midX) * wall.NormalX) + ((y - midY) * wall.NormalY);
            double at = before < 0 ? before / (before - beyond) : 0;
            if (at < share)
            {
                exit = slot;
                share = at;
            }
        }

        room = Math.Max(0, nearest);
        return exit;
    }

    /// <summary>
    /// Whether a direction leads from the present site's side to a neighbour's: the sign of (b − a)·d, exact as the
    /// difference of lattice points is, and the sum of two products with Kahan's determinant.
    /// </summary>
    private bool LeadsTo(int neighbour, double directionX, double directionY)
    {
        double dx = graph.Sites.X[neighbour] - graph.Sites.X[site];
        double dy = graph.Sites.Y[neighbour] - graph.Sites.Y[site];
        return Circumcentre.Determinant(dx, -dy, directionY, directionX) > 0;
    }
}

using System.Runtime.InteropServices;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Clipping;

namespace RecipeRunner.Numerics.Weights;

/// <summary>
/// The area that one ring has in each cell. The outline of a piece is made of stretches of the ring and of stretches of
/// walls; by Green's theorem its area is the sum of what each sweeps about any point.
/// </summary>
/// <remarks>
/// Along a wall the sweep is the wall's distance h from that point times the stretch's length, and the length is a sum
/// over its ends, the crossings and the corners within the ring: h·t at each end, t the place along the wall. So each
/// crossing and each corner within adds its own term and nothing needs sorting or joining. The point is one of the piece
/// itself, so that no term is larger than the piece asks for.
/// </remarks>
internal sealed class PieceAreas(CellGraph graph)
{
    private readonly RingWalk walk = new(graph);
    private readonly Winding winding = new(graph);
    private readonly int[] place = new int[graph.Sites.Count];
    private readonly List<Piece> pieces = [];
    private double originX;
    private double originY;

    /// <summary>The pieces of the last ring.</summary>
    public ReadOnlySpan<Piece> Pieces => CollectionsMarshal.AsSpan(pieces);

    /// <summary>Cuts a ring by the cells; false when the ring has no inside that rounding leaves to be seen.</summary>
    public bool Cut(Ring ring)
    {
        Forget();
        if (!walk.Follow(ring))
        {
            return false;
        }

        (originX, originY) = (ring.OriginX, ring.OriginY);
        foreach (Visit visit in walk.Visits)
        {
            AddPath(visit);
        }

        foreach (Visit visit in walk.Visits)
        {
            if (visit.ExitSlot != RingWalk.NoExit)
            {
                AddCrossing(visit);
            }
        }

        winding.Compute(walk.Visits);
        foreach (int corner in winding.Enclosed)
        {
            AddCorner(corner, winding.Turns(corner));
        }

        return true;
    }

    private void Forget()
    {
        foreach (Piece piece in Pieces)
        {
            place[piece.Site] = 0;
        }

        pieces.Clear();
    }

    private ref Piece PieceOf(int site, double x, double y)
    {
        if (place[site] == 0)
        {
            pieces.Add(new Piece(site, x, y));
            place[site] = pieces.Count;
        }

        return ref CollectionsMarshal.AsSpan(pieces)[place[site] - 1];
    }

    private void AddPath(Visit visit)
    {
        ref Piece piece = ref PieceOf(visit.Site, visit.EntryX, visit.EntryY);
        double entryX = visit.EntryX - piece.AboutX;
        double entryY = visit.EntryY - piece.AboutY;
        double exitX = visit.ExitX - piece.AboutX;
        double exitY = visit.ExitY - piece.AboutY;
        double fromOrigin = Size(visit.EntryX, visit.EntryY) + Size(piece.AboutX, piece.AboutY) + visit.Length;
        piece.Add(visit.TwiceSwept + ((entryX * exitY) - (exitX * entryY)), visit.Length * fromOrigin);
    }

    /// <summary>The inside is on the left of the ring: the wall's stretch within begins here, seen from the cell that is left.</summary>
    private void AddCrossing(Visit visit)
    {
        int slot = visit.ExitSlot;
        AddWallEnd(visit.Site, slot, visit.ExitX, visit.ExitY, -1);
        AddWallEnd(graph.Neighbour[slot], graph.Twin[slot], visit.ExitX, visit.ExitY, 1);
    }

    /// <summary>Around a corner, each wall that has it on the left ends here; seen from across, it begins.</summary>
    private void AddCorner(int corner, int turns)
    {
        Circumcentre centre = graph.Corners[corner];
        double x = (centre.SiteX - originX) + centre.OffsetX;
        double y = (centre.SiteY - originY) + centre.OffsetY;
        int first = graph.CornerSlot[corner];
        int slot = first;
        do
        {
            int twin = graph.Twin[slot];
            AddWallEnd(graph.Neighbour[twin], slot, x, y, turns);
            AddWallEnd(graph.Neighbour[slot], twin, x, y, -turns);
            slot = graph.NextAroundCorner(slot);
        } while (slot != first);
    }

    private void AddWallEnd(int site, int slot, double x, double y, int times)
    {
        ref Piece piece = ref PieceOf(site, x, y);
        Wall wall = graph.Walls[slot];
        double midX = wall.MidX - originX;
        double midY = wall.MidY - originY;
        double toMidX = midX - piece.AboutX;
        double toMidY = midY - piece.AboutY;
        double distance = (toMidX * wall.NormalX) + (toMidY * wall.NormalY);
        double along = ((y - piece.AboutY) * wall.NormalX) - ((x - piece.AboutX) * wall.NormalY);
        double fromOrigin = Size(x, y) + Size(piece.AboutX, piece.AboutY);
        piece.Add(
            times * distance * along,
            (Math.Abs(distance) * fromOrigin) + (Math.Abs(along) * (Size(midX, midY) + fromOrigin))
        );
    }

    private static double Size(double x, double y) => Math.Abs(x) + Math.Abs(y);
}

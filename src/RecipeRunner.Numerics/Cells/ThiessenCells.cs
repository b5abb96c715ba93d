using RecipeRunner.Numerics.Predicates;
using RecipeRunner.Numerics.Triangulation;

namespace RecipeRunner.Numerics.Cells;

/// <summary>
/// The plane divided between sites, each cell the part nearest to its site (Thiessen or Voronoi polygons). The same bits
/// for any order of the sites.
/// </summary>
/// <remarks>A. H. Thiessen, "Precipitation averages for large areas", Monthly Weather Review 39 (1911) 1082-1084.</remarks>
public sealed class ThiessenCells
{
    private readonly int[] rankOf;
    private readonly int[] neighbours;

    private ThiessenCells(CellGraph graph)
    {
        Graph = graph;
        int[] callerIndex = graph.Sites.CallerIndex;
        rankOf = new int[callerIndex.Length];
        for (int rank = 0; rank < rankOf.Length; rank++)
        {
            rankOf[callerIndex[rank]] = rank;
        }

        neighbours = new int[graph.Neighbour.Length];
        for (int slot = 0; slot < neighbours.Length; slot++)
        {
            neighbours[slot] = callerIndex[graph.Neighbour[slot]];
        }
    }

    /// <summary>How many sites, and so cells, there are.</summary>
    public int SiteCount => rankOf.Length;

    internal CellGraph Graph { get; }

    /// <summary>The cells of a triangulation's sites.</summary>
    public static ThiessenCells Of(DelaunayTriangulation triangulation)
    {
        ArgumentNullException.ThrowIfNull(triangulation);
        return new ThiessenCells(CellGraphBuilder.Of(triangulation));
    }

    /// <summary>
    /// The natural neighbours of a site: those whose cells share a wall with its own, counter-clockwise; cells that meet
    /// in one point only are none. Where the round begins depends on places alone; on the hull it begins with the next
    /// site along the hull.
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such site.</exception>
    public ReadOnlySpan<int> Neighbours(int site)
    {
        int rank = RankOf(site);
        return neighbours.AsSpan(Graph.Start[rank]..Graph.Start[rank + 1]);
    }

    /// <summary>The cell of a site, cut to a frame.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such site.</exception>
    public CellOutline Outline(int site, Frame frame) => OutlineTracer.Trace(Graph, RankOf(site), frame);

    /// <summary>
    /// The site nearest to a place, exactly, once the place is snapped to the lattice; of several as near, the first by
    /// x, then y.
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">A coordinate beyond the lattice's reach.</exception>
    public int Nearest(double x, double y) => Graph.Sites.CallerIndex[Graph.Nearest(Lattice.Snap(x), Lattice.Snap(y))];

    /// <summary>A site's number in the graph.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such site.</exception>
    internal int RankOf(int site)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(site);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(site, rankOf.Length);
        return rankOf[site];
    }
}

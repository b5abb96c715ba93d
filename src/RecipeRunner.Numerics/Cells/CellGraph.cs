using System.Runtime.CompilerServices;
using RecipeRunner.Numerics.Predicates;
using RecipeRunner.Numerics.Triangulation;

namespace RecipeRunner.Numerics.Cells;

/// <summary>
/// Cells, walls and corners as flat arrays, sites numbered by rank. A slot is one wall seen from one side: the slots of
/// site s are <c>Start[s]</c> to <c>Start[s + 1]</c>, counter-clockwise, on the hull from its first side to its last. Only
/// walls that have a length are here: sites whose cells meet in one point are no neighbours, so nothing depends on how
/// the triangulation resolved a tie.
/// </summary>
internal sealed class CellGraph
{
    /// <summary>The corner beside a wall that runs to infinity.</summary>
    public const int NoCorner = -1;

    public CellGraph(OrderedSites sites, int slots, int corners)
    {
        Sites = sites;
        Start = new int[sites.Count + 1];
        Neighbour = new int[slots];
        Twin = new int[slots];
        LeftCorner = new int[slots];
        Walls = new Wall[slots];
        Corners = new Circumcentre[corners];
        CornerSlot = new int[corners];
    }

    public OrderedSites Sites { get; }

    public int[] Start { get; }

    /// <summary>By slot: the rank of the site across the wall.</summary>
    public int[] Neighbour { get; }

    /// <summary>By slot: the same wall seen from across.</summary>
    public int[] Twin { get; }

    /// <summary>By slot: the corner where the wall ends on the left of the way to the neighbour, or <see cref="NoCorner"/>.</summary>
    public int[] LeftCorner { get; }

    public Wall[] Walls { get; }

    /// <summary>By corner: where three or more cells meet.</summary>
    public Circumcentre[] Corners { get; }

    /// <summary>By corner: one of the slots that have it on the left.</summary>
    public int[] CornerSlot { get; }

    /// <summary>The slot before this one, clockwise around <paramref name="site"/>.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int Before(int slot, int site) => slot == Start[site] ? Start[site + 1] - 1 : slot - 1;

    /// <summary>The slot after this one, counter-clockwise around <paramref name="site"/>.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int After(int slot, int site) => slot + 1 == Start[site + 1] ? Start[site] : slot + 1;

    /// <summary>The corner where the wall ends on the right of the way to the neighbour, or <see cref="NoCorner"/>.</summary>
    public int RightCorner(int slot) => LeftCorner[Twin[slot]];

    /// <summary>
    /// The next slot that has the same corner on its left, counter-clockwise around that corner: it leads on from the site
    /// this one leads to.
    /// </summary>
    public int NextAroundCorner(int slot) => Before(Twin[slot], Neighbour[slot]);

    /// <summary>Where a corner is, rounded to the nearest doubles.</summary>
    public (double X, double Y) PositionOf(int corner)
    {
        Circumcentre centre = Corners[corner];
        return (centre.SiteX + centre.OffsetX, centre.SiteY + centre.OffsetY);
    }

    /// <summary>
    /// The rank of the site nearest to a lattice point; of several as near, the first by x, then y. Exact. Sites on one
    /// circle are neighbours in convex order, so steps to a better neighbour end at the best.
    /// </summary>
    public int Nearest(double x, double y)
    {
        int site = Sites.NearOnCurve(x, y);
        for (int slot = Start[site]; slot < Start[site + 1]; slot++)
        {
            int other = Neighbour[slot];
            int nearer = CompareDistance(x, y, other, site);
            if (nearer < 0 || (nearer == 0 && Sites.IsAfter(site, other)))
            {
                site = other;
                slot = Start[site] - 1;
            }
        }

        return site;
    }

    /// <summary>
    /// Sign of |p − a|² − |p − b|² = (b − a)·(2p − a − b), in whole steps of the lattice: below 2⁸⁸.
    /// </summary>
    private int CompareDistance(double x, double y, int a, int b)
    {
        (double ax, double ay, double bx, double by) = (Sites.X[a], Sites.Y[a], Sites.X[b], Sites.Y[b]);
        return Int128.Sign(
            Math.BigMul(Lattice.Steps(bx - ax), Lattice.Steps(x - ax) + Lattice.Steps(x - bx))
                + Math.BigMul(Lattice.Steps(by - ay), Lattice.Steps(y - ay) + Lattice.Steps(y - by))
        );
    }
}

using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Numerics.Triangulation;

/// <summary>
/// The Delaunay triangulation of sites in the plane: no site lies inside the circumcircle of a triangle. Exact, with the
/// same triangles for any order of the sites; expected O(n log n).
/// </summary>
/// <remarks>
/// Where four or more sites lie on one circle, several triangulations are right; taken is the one in which, of any four
/// such sites that form a convex quadrilateral, the diagonal does not touch the last of them by x, then y.
/// B. Delaunay, "Sur la sphère vide", 1934; method and ties: see <c>TriangleMesh</c>.
/// </remarks>
public sealed class DelaunayTriangulation
{
    private readonly int[] corners;
    private readonly int[] twins;
    private readonly int[] hull;

    private DelaunayTriangulation(OrderedSites sites, int[] rankCorners, int[] twins, int[] hullRanks)
    {
        Sites = sites;
        RankCorners = rankCorners;
        this.twins = twins;
        HullRanks = hullRanks;
        corners = ToCaller(rankCorners);
        hull = ToCaller(hullRanks);
    }

    /// <summary>How many sites there are, one at least.</summary>
    public int SiteCount => Sites.Count;

    /// <summary>Three site indices a triangle, counter-clockwise; the order of the triangles depends on places alone.</summary>
    public ReadOnlySpan<int> Corners => corners;

    /// <summary>
    /// Parallel to <see cref="Corners"/>: half-edge e runs from corner e to the next corner of its triangle; here is the
    /// half-edge that runs the other way in the neighbouring triangle, or -1 on the hull.
    /// </summary>
    public ReadOnlySpan<int> Twins => twins;

    /// <summary>
    /// The sites on the hull, counter-clockwise from the first by x, then y, those in the midst of its sides included; when
    /// <see cref="IsCollinear"/> all sites in line order.
    /// </summary>
    public ReadOnlySpan<int> Hull => hull;

    /// <summary>Whether all sites lie in one line (or are fewer than three), so that there are no triangles.</summary>
    public bool IsCollinear => corners.Length == 0;

    internal OrderedSites Sites { get; }

    internal int[] RankCorners { get; }

    internal int[] TwinArray => twins;

    internal int[] HullRanks { get; }

    /// <summary>Triangulates sites.</summary>
    /// <param name="x">Eastings in metres, on the <see cref="Lattice"/>; one at least.</param>
    /// <param name="y">Northings in metres, on the lattice; as many.</param>
    /// <exception cref="ArgumentException">No sites, lengths that differ, or a coordinate off the lattice.</exception>
    /// <exception cref="CoincidentSitesException">Sites that share a place; all of them are named.</exception>
    public static DelaunayTriangulation Of(ReadOnlySpan<double> x, ReadOnlySpan<double> y)
    {
        OrderedSites sites = OrderedSites.Of(x, y);
        int[] order = InsertionOrder.Of(sites.Count);
        int third = FirstOffLine(sites, order);
        return third < 0 ? OfLine(sites) : OfPlane(sites, order, third);
    }

    /// <summary>The first place in the order whose site is not in line with the first two; -1 if there is none.</summary>
    private static int FirstOffLine(OrderedSites sites, int[] order)
    {
        for (int place = 2; place < order.Length; place++)
        {
            if (Turn(sites, order[0], order[1], order[place]) != 0)
            {
                return place;
            }
        }

        return -1;
    }

    private static int Turn(OrderedSites sites, int a, int b, int c) =>
        Orientation.Sign(sites.X[a], sites.Y[a], sites.X[b], sites.Y[b], sites.X[c], sites.Y[c]);

    private static DelaunayTriangulation OfLine(OrderedSites sites)
    {
        var line = new int[sites.Count];
        for (int rank = 0; rank < line.Length; rank++)
        {
            line[rank] = rank;
        }

        Array.Sort(
            line,
            (a, b) =>
                a == b ? 0
                : sites.IsAfter(a, b) ? 1
                : -1
        );
        return new DelaunayTriangulation(sites, [], [], line);
    }

    private static DelaunayTriangulation OfPlane(OrderedSites sites, int[] order, int third)
    {
        (int a, int b, int c) = (order[0], order[1], order[third]);
        bool turnsLeft = Turn(sites, a, b, c) > 0;
        var mesh = new TriangleMesh(sites, a, turnsLeft ? b : c, turnsLeft ? c : b);
        for (int place = 2; place < order.Length; place++)
        {
            if (place != third)
            {
                mesh.Insert(order[place]);
            }
        }

        var finite = FiniteMesh.Of(mesh, sites);
        return new DelaunayTriangulation(sites, finite.Corners, finite.Twins, finite.Hull);
    }

    private int[] ToCaller(int[] ranks)
    {
        var indices = new int[ranks.Length];
        for (int i = 0; i < ranks.Length; i++)
        {
            indices[i] = Sites.CallerIndex[ranks[i]];
        }

        return indices;
    }
}

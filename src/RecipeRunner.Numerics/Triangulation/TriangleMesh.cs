using System.Runtime.CompilerServices;
using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Numerics.Triangulation;

/// <summary>
/// A Delaunay triangulation that grows by one site at a time. Half-edge e starts at <c>corners[e]</c>; triangle t owns
/// half-edges 3t, 3t+1, 3t+2, counter-clockwise; <c>twins[e]</c> runs the other way. The plane outside the hull is
/// covered by triangles that share a corner at infinity, <see cref="Infinity"/>, so that no case is special.
/// </summary>
/// <remarks>
/// C. L. Lawson, "Software for C¹ surface interpolation", 1977: a new site splits the triangle that holds it, then edges
/// are flipped until every circumcircle is empty. The site is found by a walk from the last one: O. Devillers, S. Pion,
/// M. Teillaud, "Walking in a triangulation", 2002. A tie (four sites on one circle) is resolved as if the last of the
/// four by x, then y, stood outside the circle of the others: a symbolic perturbation of its height on the paraboloid
/// (O. Devillers, M. Teillaud, "Perturbations and vertex removal in a 3D Delaunay triangulation", SODA 2003), so exactly
/// one triangulation is right for any set of sites.
/// </remarks>
internal sealed class TriangleMesh
{
    public const int Infinity = -1;

    private readonly OrderedSites sites;
    private readonly double[] x;
    private readonly double[] y;
    private readonly int[] corners;
    private readonly int[] twins;
    private int[] pending = new int[64];
    private int triangles;
    private int latest;

    /// <summary>Begins with three sites that turn counter-clockwise.</summary>
    public TriangleMesh(OrderedSites sites, int a, int b, int c)
    {
        this.sites = sites;
        x = sites.X;
        y = sites.Y;
        int halfEdges = 3 * ((2 * sites.Count) - 2);
        corners = new int[halfEdges];
        twins = new int[halfEdges];
        ReadOnlySpan<int> first = [a, b, c, b, a, Infinity, c, b, Infinity, a, c, Infinity];
        ReadOnlySpan<int> firstTwins = [3, 6, 9, 0, 11, 7, 1, 5, 10, 2, 8, 4];
        first.CopyTo(corners);
        firstTwins.CopyTo(twins);
        triangles = 4;
    }

    public int[] Corners => corners;

    public int[] Twins => twins;

    public int TriangleCount => triangles;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static int Next(int halfEdge) => halfEdge % 3 == 2 ? halfEdge - 2 : halfEdge + 1;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static int Previous(int halfEdge) => halfEdge % 3 == 0 ? halfEdge + 2 : halfEdge - 1;

    /// <summary>Adds a site that shares its place with none before it.</summary>
    public void Insert(int site)
    {
        int t = 3 * Locate(x[site], y[site]);
        int t1 = 3 * triangles;
        int t2 = t1 + 3;
        triangles += 2;
        int a = corners[t];
        int b = corners[t + 1];
        int c = corners[t + 2];
        int pastB = twins[t + 1];
        int pastC = twins[t + 2];
        // The outer edge of each new triangle is its first half-edge, and the new site its third corner; flips keep it so.
        corners[t + 2] = site;
        (corners[t1], corners[t1 + 1], corners[t1 + 2]) = (b, c, site);
        (corners[t2], corners[t2 + 1], corners[t2 + 2]) = (c, a, site);
        Join(t + 1, t1 + 2);
        Join(t1 + 1, t2 + 2);
        Join(t2 + 1, t + 2);
        Join(t1, pastB);
        Join(t2, pastC);
        latest = t;
        pending[0] = t;
        pending[1] = t1;
        pending[2] = t2;
        FlipUntilEmpty(3, x[site], y[site], site);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private void Join(int halfEdge, int twin)
    {
        twins[halfEdge] = twin;
        twins[twin] = halfEdge;
    }

    private void FlipUntilEmpty(int count, double px, double py, int site)
    {
        while (count > 0)
        {
            int edge = pending[count - 1];
            int across = twins[edge];
            if (!HoldsInCircle(across, px, py, site))
            {
                count--;
                continue;
            }

            int triangle = across - (across % 3);
            int far = corners[Previous(across)];
            int pastFar = twins[Next(across)];
            int pastNear = twins[Previous(across)];
            int pastSide = twins[edge + 1];
            (corners[triangle], corners[triangle + 1], corners[triangle + 2]) = (far, corners[edge + 1], site);
            corners[edge + 1] = far;
            Join(edge, pastFar);
            Join(triangle, pastNear);
            Join(triangle + 1, pastSide);
            Join(edge + 1, triangle + 2);
            if (count == pending.Length)
            {
                Array.Resize(ref pending, 2 * count);
            }

            pending[count++] = triangle;
        }
    }

    /// <summary>Whether the triangle that owns a half-edge has the new site within its circumcircle.</summary>
    private bool HoldsInCircle(int halfEdge, double px, double py, int site)
    {
        int from = corners[halfEdge];
        int to = corners[Next(halfEdge)];
        int far = corners[Previous(halfEdge)];
        if ((from | to | far) < 0)
        {
            return HoldsInHalfPlane(from, to, far, px, py);
        }

        int sign = InCircle.Sign(x[from], y[from], x[to], y[to], x[far], y[far], px, py);
        return sign > 0 || (sign == 0 && EdgeGivesWay(from, to, far, site));
    }

    /// <summary>A tie: the diagonal of the four that stays is the one which does not touch the last by x, then y.</summary>
    private bool EdgeGivesWay(int from, int to, int far, int site)
    {
        int end = sites.IsAfter(from, to) ? from : to;
        return sites.IsAfter(end, far) && sites.IsAfter(end, site);
    }

    /// <summary>
    /// The circle of a triangle with a corner at infinity is the open half-plane outside its hull edge, and the inside of
    /// that edge itself. The new site can only be on the edge when the far corner is infinity: then it was found there.
    /// </summary>
    private bool HoldsInHalfPlane(int from, int to, int far, double px, double py) =>
        far == Infinity ? SideOf(from, to, px, py) == 0
        : from == Infinity ? SideOf(to, far, px, py) > 0
        : SideOf(far, from, px, py) > 0;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private int SideOf(int from, int to, double px, double py) =>
        Orientation.Sign(x[from], y[from], x[to], y[to], px, py);

    /// <summary>The triangle that holds a place, its edges included; outside the hull one with a corner at infinity.</summary>
    private int Locate(double px, double py)
    {
        int edge = FiniteEdge(latest);
        if (SideOf(corners[edge], corners[Next(edge)], px, py) < 0)
        {
            edge = twins[edge];
        }

        while (corners[Previous(edge)] != Infinity)
        {
            int next = Next(edge);
            int previous = Previous(edge);
            if (SideOf(corners[next], corners[previous], px, py) < 0)
            {
                edge = twins[next];
            }
            else if (SideOf(corners[previous], corners[edge], px, py) < 0)
            {
                edge = twins[previous];
            }
            else
            {
                break;
            }
        }

        return edge / 3;
    }

    /// <summary>A half-edge of the triangle at <paramref name="first"/> or, if that touches infinity, of the one inside the hull.</summary>
    private int FiniteEdge(int first)
    {
        for (int edge = first; edge < first + 3; edge++)
        {
            if (corners[edge] == Infinity)
            {
                return twins[Next(edge)];
            }
        }

        return first;
    }
}

using RecipeRunner.Numerics.Predicates;
using RecipeRunner.Numerics.Triangulation;

namespace RecipeRunner.Numerics.Cells;

/// <summary>
/// Triangles whose sites lie on one circle have one circumcentre: one corner of cells. Decided exactly, across each edge.
/// </summary>
internal static class CornerMerger
{
    /// <summary>By triangle: its group, named by the lowest triangle in it.</summary>
    public static int[] GroupsOf(OrderedSites sites, int[] corners, int[] twins)
    {
        var parent = new int[corners.Length / 3];
        for (int t = 0; t < parent.Length; t++)
        {
            parent[t] = t;
        }

        for (int edge = 0; edge < twins.Length; edge++)
        {
            if (twins[edge] > edge && IsCocircular(sites, corners, edge, twins[edge]))
            {
                Unite(parent, edge / 3, twins[edge] / 3);
            }
        }

        for (int t = 0; t < parent.Length; t++)
        {
            parent[t] = parent[parent[t]];
        }

        return parent;
    }

    private static bool IsCocircular(OrderedSites sites, int[] corners, int edge, int twin)
    {
        int a = corners[edge];
        int b = corners[TriangleMesh.Next(edge)];
        int c = corners[TriangleMesh.Previous(edge)];
        int d = corners[TriangleMesh.Previous(twin)];
        double[] x = sites.X;
        double[] y = sites.Y;
        return InCircle.Sign(x[a], y[a], x[b], y[b], x[c], y[c], x[d], y[d]) == 0;
    }

    private static void Unite(int[] parent, int a, int b)
    {
        int rootA = Root(parent, a);
        int rootB = Root(parent, b);
        parent[Math.Max(rootA, rootB)] = Math.Min(rootA, rootB);
    }

    private static int Root(int[] parent, int triangle)
    {
        while (parent[triangle] != triangle)
        {
            parent[triangle] = parent[parent[triangle]];
            triangle = parent[triangle];
        }

        return triangle;
    }
}

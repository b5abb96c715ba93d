namespace RecipeRunner.Numerics.Triangulation;

/// <summary>A finished mesh without the triangles at infinity, and the hull that they stood on.</summary>
internal sealed record FiniteMesh(int[] Corners, int[] Twins, int[] Hull)
{
    public static FiniteMesh Of(TriangleMesh mesh, OrderedSites sites)
    {
        int[] corners = mesh.Corners;
        int[] twins = mesh.Twins;
        List<int> outer = HullEdges(corners, twins, mesh.TriangleCount, sites);
        int[] hull = [.. outer.Select(edge => corners[edge])];
        foreach (int edge in outer)
        {
            twins[edge] = -1;
        }

        int kept = Compact(corners, twins, mesh.TriangleCount);
        return new FiniteMesh(corners[..(3 * kept)], twins[..(3 * kept)], hull);
    }

    /// <summary>The half-edges along the hull, inside it, counter-clockwise from the first site by x, then y.</summary>
    private static List<int> HullEdges(int[] corners, int[] twins, int triangles, OrderedSites sites)
    {
        int first = -1;
        for (int t = 0; t < triangles; t++)
        {
            int apex = ApexAtInfinity(corners, t);
            if (apex < 0)
            {
                continue;
            }

            int inner = twins[TriangleMesh.Next(apex)];
            if (first < 0 || sites.IsAfter(corners[first], corners[inner]))
            {
                first = inner;
            }
        }

        var edges = new List<int>();
        int edge = first;
        do
        {
            edges.Add(edge);
            // Around the corner at infinity: over the spoke at this edge's end into the next triangle outside the hull.
            int spoke = twins[TriangleMesh.Previous(twins[edge])];
            edge = twins[TriangleMesh.Previous(spoke)];
        } while (edge != first);
        return edges;
    }

    private static int ApexAtInfinity(int[] corners, int triangle)
    {
        for (int edge = 3 * triangle; edge < (3 * triangle) + 3; edge++)
        {
            if (corners[edge] == TriangleMesh.Infinity)
            {
                return edge;
            }
        }

        return -1;
    }

    /// <summary>Moves triangles from the end into the places of those at infinity; returns how many remain.</summary>
    private static int Compact(int[] corners, int[] twins, int triangles)
    {
        int kept = triangles;
        for (int t = 0; t < kept; t++)
        {
            if (ApexAtInfinity(corners, t) < 0)
            {
                continue;
            }

            do
            {
                kept--;
            } while (kept > t && ApexAtInfinity(corners, kept) >= 0);
            for (int k = 0; k < 3 && kept > t; k++)
            {
                int to = (3 * t) + k;
                int from = (3 * kept) + k;
                corners[to] = corners[from];
                twins[to] = twins[from];
                if (twins[from] >= 0)
                {
                    twins[twins[from]] = to;
                }
            }
        }

        return kept;
    }
}

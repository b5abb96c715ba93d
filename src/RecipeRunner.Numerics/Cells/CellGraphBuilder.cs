using RecipeRunner.Numerics.Triangulation;

namespace RecipeRunner.Numerics.Cells;

/// <summary>Turns a triangulation with triangles into the graph of its cells.</summary>
internal sealed class CellGraphBuilder
{
    private readonly OrderedSites sites;
    private readonly int[] corners;
    private readonly int[] twins;
    private readonly int[] groups;
    private readonly int[] slotOf;

    private CellGraphBuilder(DelaunayTriangulation triangulation)
    {
        sites = triangulation.Sites;
        corners = triangulation.RankCorners;
        twins = triangulation.TwinArray;
        groups = CornerMerger.GroupsOf(sites, corners, twins);
        slotOf = new int[corners.Length];
    }

    public static CellGraph Of(DelaunayTriangulation triangulation) =>
        triangulation.IsCollinear
            ? OfLine(triangulation.Sites, triangulation.HullRanks)
            : new CellGraphBuilder(triangulation).Build();

    /// <summary>Sites in line order: each has a wall to the one before and to the one after.</summary>
    private static CellGraph OfLine(OrderedSites sites, int[] line)
    {
        var graph = new CellGraph(sites, Math.Max(0, 2 * (line.Length - 1)), 0);
        Array.Fill(graph.LeftCorner, CellGraph.NoCorner);
        var place = new int[line.Length];
        for (int i = 0; i < line.Length; i++)
        {
            place[line[i]] = i;
        }

        int slot = 0;
        for (int site = 0; site < line.Length; site++)
        {
            graph.Start[site] = slot;
            if (place[site] > 0)
            {
                AddWall(graph, slot++, site, line[place[site] - 1]);
            }

            if (place[site] < line.Length - 1)
            {
                AddWall(graph, slot++, site, line[place[site] + 1]);
            }
        }

        graph.Start[line.Length] = slot;
        for (int i = 1; i < line.Length; i++)
        {
            // The way onward is a site's last wall, and the way back its first.
            JoinTwins(graph, graph.Start[line[i - 1] + 1] - 1, graph.Start[line[i]]);
        }

        return graph;
    }

    private static void AddWall(CellGraph graph, int slot, int site, int other)
    {
        double[] x = graph.Sites.X;
        double[] y = graph.Sites.Y;
        graph.Neighbour[slot] = other;
        graph.Walls[slot] = Wall.Between(x[site], y[site], x[other], y[other]);
    }

    private static void JoinTwins(CellGraph graph, int slot, int twin)
    {
        graph.Twin[slot] = twin;
        graph.Twin[twin] = slot;
    }

    private CellGraph Build()
    {
        int slots = 0;
        for (int edge = 0; edge < twins.Length; edge++)
        {
            slots +=
                twins[edge] < 0 ? 2
                : HasLength(edge) ? 1
                : 0;
        }

        int[] cornerOf = NumberGroups(out int cornerCount);
        var graph = new CellGraph(sites, slots, cornerCount);
        AddSlots(graph, cornerOf);
        JoinAll(graph);
        AddCorners(graph, cornerOf);
        return graph;
    }

    private bool HasLength(int edge) => twins[edge] < 0 || groups[edge / 3] != groups[twins[edge] / 3];

    private int[] NumberGroups(out int count)
    {
        var numbers = new int[groups.Length];
        count = 0;
        for (int t = 0; t < groups.Length; t++)
        {
            numbers[t] = groups[t] == t ? count++ : numbers[groups[t]];
        }

        return numbers;
    }

    private void AddSlots(CellGraph graph, int[] cornerOf)
    {
        int[] first = FirstEdges();
        int slot = 0;
        for (int site = 0; site < first.Length; site++)
        {
            graph.Start[site] = slot;
            int edge = first[site];
            int into;
            do
            {
                into = TriangleMesh.Previous(edge);
                if (HasLength(edge))
                {
                    AddWall(graph, slot, site, corners[TriangleMesh.Next(edge)]);
                    graph.LeftCorner[slot] = cornerOf[edge / 3];
                    slotOf[edge] = slot++;
                }

                edge = twins[into];
            } while (edge >= 0 && edge != first[site]);
            if (edge < 0)
            {
                AddWall(graph, slot, site, corners[into]);
                graph.LeftCorner[slot++] = CellGraph.NoCorner;
            }
        }

        graph.Start[first.Length] = slot;
    }

    /// <summary>By site: a half-edge that leaves it; on the hull the one along the hull.</summary>
    private int[] FirstEdges()
    {
        var first = new int[sites.Count];
        for (int edge = 0; edge < corners.Length; edge++)
        {
            first[corners[edge]] = edge;
        }

        for (int edge = 0; edge < corners.Length; edge++)
        {
            if (twins[edge] < 0)
            {
                first[corners[edge]] = edge;
            }
        }

        return first;
    }

    private void JoinAll(CellGraph graph)
    {
        for (int edge = 0; edge < twins.Length; edge++)
        {
            if (twins[edge] < 0)
            {
                // Along the hull the way back is the last slot of the site at the end.
                JoinTwins(graph, slotOf[edge], graph.Start[corners[TriangleMesh.Next(edge)] + 1] - 1);
            }
            else if (twins[edge] > edge && HasLength(edge))
            {
                JoinTwins(graph, slotOf[edge], slotOf[twins[edge]]);
            }
        }
    }

    private void AddCorners(CellGraph graph, int[] cornerOf)
    {
        double[] x = sites.X;
        double[] y = sites.Y;
        for (int t = 0; t < groups.Length; t++)
        {
            if (groups[t] == t)
            {
                (int a, int b, int c) = (corners[3 * t], corners[(3 * t) + 1], corners[(3 * t) + 2]);
                graph.Corners[cornerOf[t]] = Circumcentre.Of(x[a], y[a], x[b], y[b], x[c], y[c]);
            }
        }

        for (int slot = 0; slot < graph.LeftCorner.Length; slot++)
        {
            if (graph.LeftCorner[slot] >= 0)
            {
                graph.CornerSlot[graph.LeftCorner[slot]] = slot;
            }
        }
    }
}

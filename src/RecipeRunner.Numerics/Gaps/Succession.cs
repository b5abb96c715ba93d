using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Gaps;

/// <summary>Divides an estate among the neighbours of the silent sites.</summary>
/// <remarks>
/// When a site is taken away, its cell falls to those with whom it shares a wall, and they become neighbours of one another
/// only within it. So, by taking one away after the other, the cells of a set of sites fall to neighbours of the set in the
/// cells of all sites, and whatever lies in them is divided as if those neighbours alone were there.
/// R. Sibson, "A vector identity for the Dirichlet tessellation", Mathematical Proceedings of the Cambridge Philosophical
/// Society 87 (1980), for one site (from memory); for more by induction, as said.
/// </remarks>
internal static class Succession
{
    /// <summary>Ranks of the sites, ascending, that share a wall with any of a set and do not belong to it.</summary>
    /// <param name="graph">The cells of all sites.</param>
    /// <param name="silent">The set: ranks, ascending.</param>
    public static int[] Neighbours(CellGraph graph, int[] silent)
    {
        var found = new List<int>();
        foreach (int rank in silent)
        {
            found.AddRange(graph.Neighbour.AsSpan(graph.Start[rank]..graph.Start[rank + 1]));
        }

        found.Sort();
        var neighbours = new List<int>(found.Count);
        foreach (int rank in found)
        {
            bool isNew = neighbours.Count == 0 || neighbours[^1] != rank;
            if (isNew && Array.BinarySearch(silent, rank) < 0)
            {
                neighbours.Add(rank);
            }
        }

        return [.. neighbours];
    }

    /// <summary>What each neighbour owns of an estate, in square metres, or why it cannot be said.</summary>
    /// <param name="sites">All sites.</param>
    /// <param name="neighbours">Ranks of the neighbours, one at least.</param>
    /// <param name="shape">The estate.</param>
    /// <param name="whole">The area of the polygon.</param>
    /// <param name="rows">Ranks ascending; those that own nothing, or no more than rounding, are left out.</param>
    public static string? Divide(
        OrderedSites sites,
        int[] neighbours,
        EstateShape shape,
        double whole,
        out List<(int Rank, double Area)> rows
    )
    {
        double[] x = Array.ConvertAll(neighbours, rank => sites.X[rank]);
        double[] y = Array.ConvertAll(neighbours, rank => sites.Y[rank]);
        CellGraph cells = CellGraphBuilder.Of(DelaunayTriangulation.Of(x, y));
        var totals = new PieceTotals(cells);
        rows = totals.Rows;
        for (int ring = 0; ring < shape.RingCount; ring++)
        {
            if (totals.Add(shape[ring]) is { } reason)
            {
                return reason;
            }
        }

        string? problem = totals.Collect(shape.Area, whole);
        for (int row = 0; row < rows.Count; row++)
        {
            rows[row] = (neighbours[cells.Sites.CallerIndex[rows[row].Rank]], rows[row].Area);
        }

        rows.Sort((a, b) => a.Rank.CompareTo(b.Rank));
        return problem;
    }

    /// <summary>The rank of the neighbour nearest to a site; of several as near, the first.</summary>
    public static int Nearest(OrderedSites sites, int[] neighbours, int rank)
    {
        int nearest = neighbours[0];
        double least = double.PositiveInfinity;
        foreach (int other in neighbours)
        {
            double dx = sites.X[other] - sites.X[rank];
            double dy = sites.Y[other] - sites.Y[rank];
            double distance = (dx * dx) + (dy * dy);
            if (distance < least)
            {
                (nearest, least) = (other, distance);
            }
        }

        return nearest;
    }
}

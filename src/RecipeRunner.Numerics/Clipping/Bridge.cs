using RecipeRunner.Numerics.Cells;

namespace RecipeRunner.Numerics.Clipping;

/// <summary>
/// Joins two cells that rounding holds for the owner of one and the same point: over walls that pass the point within
/// rounding. Needed where a ring begins on a wall or a corner and, coming round, is given to another side of it.
/// </summary>
internal static class Bridge
{
    /// <summary>What rounding may do to the distance of a wall, as a share of the coordinates it is computed from.</summary>
    private const double RoundingPart = 1.0 / (1L << 44);

    /// <summary>What the digits of the ring's own coordinates leave open, as a share of them: four of their last bits.</summary>
    private const double DigitsPart = 1.0 / (1L << 50);

    /// <summary>The walls to cross, in order, to come from one site's cell to another's; null if none pass the point.</summary>
    /// <param name="graph">The cells.</param>
    /// <param name="from">Rank of the one site.</param>
    /// <param name="to">Rank of the other.</param>
    /// <param name="x">Easting of the point.</param>
    /// <param name="y">Northing of the point.</param>
    /// <param name="digits">The size of the coordinates that the point was computed from.</param>
    public static IReadOnlyList<int>? Between(CellGraph graph, int from, int to, double x, double y, double digits)
    {
        double tolerance =
            (RoundingPart * Math.Max(FarthestWall(graph, from, x, y), FarthestWall(graph, to, x, y)))
            + (DigitsPart * digits);
        var cameBy = new Dictionary<int, int> { [from] = -1 };
        var reached = new List<int> { from };
        for (int next = 0; next < reached.Count && !cameBy.ContainsKey(to); next++)
        {
            int site = reached[next];
            for (int slot = graph.Start[site]; slot < graph.Start[site + 1]; slot++)
            {
                double distance = Math.Abs(graph.Walls[slot].DistanceBeyond(x, y));
                if (distance <= tolerance && cameBy.TryAdd(graph.Neighbour[slot], slot))
                {
                    reached.Add(graph.Neighbour[slot]);
                }
            }
        }

        return cameBy.ContainsKey(to) ? WayBack(graph, cameBy, from, to) : null;
    }

    private static double FarthestWall(CellGraph graph, int site, double x, double y)
    {
        double farthest = 0;
        for (int slot = graph.Start[site]; slot < graph.Start[site + 1]; slot++)
        {
            Wall wall = graph.Walls[slot];
            farthest = Math.Max(farthest, Math.Abs(wall.MidX - x) + Math.Abs(wall.MidY - y));
        }

        return farthest;
    }

    private static List<int> WayBack(CellGraph graph, Dictionary<int, int> cameBy, int from, int to)
    {
        var slots = new List<int>();
        for (int site = to; site != from; site = graph.Neighbour[graph.Twin[slots[^1]]])
        {
            slots.Add(cameBy[site]);
        }

        slots.Reverse();
        return slots;
    }
}

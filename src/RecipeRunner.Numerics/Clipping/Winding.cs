using RecipeRunner.Numerics.Cells;

namespace RecipeRunner.Numerics.Clipping;

/// <summary>
/// How often a ring's walk runs around each corner of the cells: a whole number, 1 inside a counter-clockwise ring, −1
/// inside a clockwise one, 0 outside. It is found from the crossings alone, without any rounding: across a wall it
/// changes by the net number of crossings, and beyond the last site of the walk by x, then y, it is zero.
/// </summary>
internal sealed class Winding(CellGraph graph)
{
    private readonly int[] crossings = new int[graph.Twin.Length];
    private readonly int[] turns = new int[graph.Corners.Length];
    private readonly List<int> enclosed = [];

    /// <summary>The corners around which the last walk ran, each once.</summary>
    public List<int> Enclosed => enclosed;

    /// <summary>How often the last walk ran around a corner, counter-clockwise.</summary>
    public int Turns(int corner) => turns[corner];

    public void Compute(List<Visit> visits)
    {
        foreach (int corner in enclosed)
        {
            turns[corner] = 0;
        }

        enclosed.Clear();
        int crossed = visits.Count - 1;
        if (crossed == 0)
        {
            return;
        }

        Count(visits, 1);
        SeedAlong(visits, crossed);
        Spread();
        Count(visits, -1);
    }

    private void Count(List<Visit> visits, int step)
    {
        foreach (Visit visit in visits)
        {
            if (visit.ExitSlot != RingWalk.NoExit)
            {
                crossings[visit.ExitSlot] += step;
            }
        }
    }

    /// <summary>What the turns are more on the left of the way over a wall than on the right.</summary>
    private int Step(int slot) => crossings[slot] - crossings[graph.Twin[slot]];

    /// <summary>Goes along the walk from its last site and notes the turns to the left and right of every crossing.</summary>
    private void SeedAlong(List<Visit> visits, int crossed)
    {
        int first = LastSite(visits, crossed);
        int site = visits[first].Site;
        int slot = OuterSlot(site);
        int left = 0;
        for (int k = 0; k < crossed; k++)
        {
            int exit = visits[(first + k) % crossed].ExitSlot;
            while (slot != exit)
            {
                slot = graph.After(slot, site);
                left += Step(slot);
            }

            int right = left - Step(exit);
            Note(graph.LeftCorner[exit], left);
            Note(graph.RightCorner(exit), right);
            site = graph.Neighbour[exit];
            slot = graph.Twin[exit];
            left = right;
        }
    }

    private int LastSite(List<Visit> visits, int crossed)
    {
        int last = 0;
        for (int k = 1; k < crossed; k++)
        {
            if (graph.Sites.IsAfter(visits[k].Site, visits[last].Site))
            {
                last = k;
            }
        }

        return last;
    }

    /// <summary>
    /// A slot of the walk's last site with nothing of the walk on its left: the wall of a site that is later still, or the
    /// one that has the plane beyond the hull on its left.
    /// </summary>
    private int OuterSlot(int site)
    {
        int slot = graph.Start[site];
        while (!graph.Sites.IsAfter(graph.Neighbour[slot], site) && graph.LeftCorner[slot] != CellGraph.NoCorner)
        {
            slot++;
        }

        return slot;
    }

    private void Note(int corner, int count)
    {
        if (count != 0 && turns[corner] == 0)
        {
            turns[corner] = count;
            enclosed.Add(corner);
        }
    }

    /// <summary>From the corners noted to all others that are reached over walls without stepping out.</summary>
    private void Spread()
    {
        for (int next = 0; next < enclosed.Count; next++)
        {
            int corner = enclosed[next];
            int first = graph.CornerSlot[corner];
            int slot = first;
            do
            {
                Note(graph.RightCorner(slot), turns[corner] - Step(slot));
                slot = graph.NextAroundCorner(slot);
            } while (slot != first);
        }
    }
}

using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Statistics;

namespace RecipeRunner.Numerics.Gaps;

/// <summary>
/// What one site leaves of one polygon when it falls silent: the part within its cell. Remembers who inherited it when which
/// sites were silent.
/// </summary>
/// <remarks>
/// Peeling: begin with the site alone as silent; take those who own the estate then; if all report, they are its owners among
/// all that report, because the silent sites besides, taken away too, owned nothing of it. If not, count the silent ones of
/// them among the silent and repeat. The set at the end does not depend on the order: to take sites away only enlarges the
/// cells of the others.
/// </remarks>
internal sealed class Estate
{
    private readonly CellGraph graph;
    private readonly int rank;
    private readonly double weight;
    private readonly EstateShape shape;
    private readonly double whole;
    private Dictionary<int[], Heirs> known = new(SilentSets.Comparer);
    private Heirs? first;

    /// <param name="graph">The cells of all sites.</param>
    /// <param name="rank">Rank of the site.</param>
    /// <param name="weight">The share of the polygon that it owns.</param>
    /// <param name="shape">The part of the polygon that it owns.</param>
    /// <param name="whole">The area of the polygon.</param>
    public Estate(CellGraph graph, int rank, double weight, EstateShape shape, double whole)
    {
        this.graph = graph;
        this.rank = rank;
        this.weight = weight;
        this.shape = shape;
        this.whole = whole;
    }

    /// <summary>How often heirs were computed.</summary>
    public long Computed { get; private set; }

    /// <summary>About how many bytes it remembers.</summary>
    public long Bytes { get; private set; }

    /// <summary>Forgets all heirs; they are computed again when met again.</summary>
    public void Forget()
    {
        known = new Dictionary<int[], Heirs>(SilentSets.Comparer);
        first = null;
        Bytes = 0;
    }

    /// <summary>The heirs among those who report, the site itself being silent; null, with the reason, if the estate cannot be divided.</summary>
    public Heirs? HeirsOf(ReadOnlySpan<bool> reports, out string? problem)
    {
        problem = null;
        Heirs? heirs = first ??= Compute([rank], out problem);
        while (heirs is not null && heirs.SilentAmong(reports, out int from) is var silent and not 0)
        {
            heirs = heirs.Next(from, silent) ?? FindNext(heirs, from, silent, out problem);
        }

        return heirs;
    }

    private Heirs? FindNext(Heirs heirs, int from, ulong silent, out string? problem)
    {
        problem = null;
        int[] set = heirs.SilentWith(from, silent);
        if (!known.TryGetValue(set, out Heirs? next))
        {
            next = Compute(set, out problem);
        }

        if (next is not null)
        {
            heirs.Keep(from, silent, next);
            Bytes += Heirs.BytesOfNext;
        }

        return next;
    }

    private Heirs? Compute(int[] silent, out string? problem)
    {
        Computed++;
        int[] neighbours = Succession.Neighbours(graph, silent);
        problem = Succession.Divide(graph.Sites, neighbours, shape, whole, out List<(int Rank, double Area)> rows);
        if (problem is not null)
        {
            return null;
        }

        Heirs heirs = ToHeirs(silent, neighbours, rows);
        known.Add(silent, heirs);
        Bytes += heirs.Bytes;
        return heirs;
    }

    /// <summary>An estate too small to be told from rounding goes whole to the one nearest to the site.</summary>
    private Heirs ToHeirs(int[] silent, int[] neighbours, List<(int Rank, double Area)> rows)
    {
        if (rows.Count == 0)
        {
            rows = [(Succession.Nearest(graph.Sites, neighbours, rank), 1)];
        }

        var sum = default(CompensatedSum);
        foreach ((_, double area) in rows)
        {
            sum.Add(area);
        }

        return new Heirs(
            silent,
            [.. rows.Select(row => row.Rank)],
            [.. rows.Select(row => graph.Sites.CallerIndex[row.Rank])],
            [.. rows.Select(row => weight * (row.Area / sum.Value))]
        );
    }
}

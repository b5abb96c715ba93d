using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Gaps;

/// <summary>The owners of one polygon in the cells of all sites, and the estate of each that ever fell silent.</summary>
internal sealed class PolygonGaps
{
    private readonly CellGraph graph;
    private readonly PolygonBatch polygons;
    private readonly int polygon;
    private readonly double whole;
    private readonly int[] ranks;
    private readonly int[] sites;
    private readonly double[] weights;
    private readonly Estate?[] estates;
    private readonly long budgetBytes;

    /// <param name="graph">The cells of all sites.</param>
    /// <param name="polygons">The polygons.</param>
    /// <param name="polygon">Which of them it is.</param>
    /// <param name="owners">Ranks and weights of its owners, ranks ascending.</param>
    /// <param name="whole">Its area.</param>
    /// <param name="budgetBytes">How much its estates may remember before they forget.</param>
    public PolygonGaps(
        CellGraph graph,
        PolygonBatch polygons,
        int polygon,
        (int Rank, double Weight)[] owners,
        double whole,
        long budgetBytes
    )
    {
        this.graph = graph;
        this.polygons = polygons;
        this.polygon = polygon;
        this.whole = whole;
        this.budgetBytes = budgetBytes;
        ranks = [.. owners.Select(owner => owner.Rank)];
        sites = [.. owners.Select(owner => graph.Sites.CallerIndex[owner.Rank])];
        weights = [.. owners.Select(owner => owner.Weight)];
        estates = new Estate?[owners.Length];
    }

    /// <summary>How often heirs were computed.</summary>
    public long Computed => estates.Sum(estate => estate?.Computed ?? 0);

    /// <summary>About how many bytes are remembered.</summary>
    public long Bytes { get; private set; }

    /// <summary>The weighted mean of the depths of those who report.</summary>
    /// <exception cref="PolygonsRefusedException">The polygon is too thin to be divided.</exception>
    public double Mean(ReadOnlySpan<double> depths, ReadOnlySpan<bool> reports)
    {
        double sum = 0;
        for (int owner = 0; owner < sites.Length; owner++)
        {
            if (reports[sites[owner]])
            {
                sum += weights[owner] * depths[sites[owner]];
                continue;
            }

            Heirs heirs = HeirsOf(owner, reports);
            for (int i = 0; i < heirs.Sites.Length; i++)
            {
                sum += heirs.Shares[i] * depths[heirs.Sites[i]];
            }
        }

        return sum;
    }

    /// <summary>Adds the weights of those who report, by the caller's index of the site.</summary>
    /// <exception cref="PolygonsRefusedException">The polygon is too thin to be divided.</exception>
    public void AddWeights(ReadOnlySpan<bool> reports, SortedDictionary<int, double> bySite)
    {
        for (int owner = 0; owner < sites.Length; owner++)
        {
            if (reports[sites[owner]])
            {
                Add(sites[owner], weights[owner]);
                continue;
            }

            Heirs heirs = HeirsOf(owner, reports);
            for (int i = 0; i < heirs.Sites.Length; i++)
            {
                Add(heirs.Sites[i], heirs.Shares[i]);
            }
        }

        void Add(int site, double weight) => bySite[site] = bySite.GetValueOrDefault(site) + weight;
    }

    private Heirs HeirsOf(int owner, ReadOnlySpan<bool> reports)
    {
        if (Bytes > budgetBytes)
        {
            Forget();
        }

        Estate estate = estates[owner] ??= Open(owner);
        long before = estate.Bytes;
        Heirs heirs = estate.HeirsOf(reports, out string? problem) ?? throw Refused(problem);
        Bytes += estate.Bytes - before;
        return heirs;
    }

    private Estate Open(int owner)
    {
        var shape = EstateShape.Of(graph, ranks[owner], polygons, polygon, whole);
        return Math.Abs(shape.Area - (weights[owner] * whole)) <= PieceTotals.AreaTolerance * whole
            ? new Estate(graph, ranks[owner], weights[owner], shape, whole)
            : throw Refused("is too thin for the coordinates' digits");
    }

    private void Forget()
    {
        foreach (Estate? estate in estates)
        {
            estate?.Forget();
        }

        Bytes = 0;
    }

    private PolygonsRefusedException Refused(string? problem) =>
        new([new PolygonRefusal(polygon, problem ?? "cannot be divided")]);
}

using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Predicates;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Gaps;

/// <summary>
/// The weights of polygons when only some of the sites report: those of the cells (Thiessen polygons) of the reporting sites
/// alone, without drawing them anew. Every set of reporting sites has its own cells, but a polygon cares only for who inherits
/// the parts of it that the silent sites own in the cells of all; which few sets of silent sites matter to that is found out
/// as they come, and remembered.
/// </summary>
/// <remarks>
/// Weights are those that <see cref="AreaWeights"/> finds for the reporting sites alone, within 1e-12, for polygons that are
/// not too thin for the digits of their coordinates. The same bits for any number of threads, any budget, any order of the
/// steps and of the sites. Made for outages and closures, which last or are few: where half of the sites are silent by chance
/// anew at every step, drawing the cells anew is faster. Method: <see cref="Estate"/>, <see cref="Succession"/>.
/// </remarks>
public sealed class ReportingWeights
{
    /// <summary>How much is remembered unless told otherwise: 256 MiB.</summary>
    public const long DefaultBudgetBytes = 256L << 20;

    /// <summary>Groups of neighbouring polygons that a thread takes one after the other, so that none is done long before the rest.</summary>
    private const int GroupsPerThread = 4;

    /// <summary>So many steps of a record, that they stay near the processor while a group of polygons is at them.</summary>
    private const int StepsAtOnce = 64;

    private readonly PolygonGaps[] polygons;
    private readonly int siteCount;

    private ReportingWeights(int siteCount, PolygonGaps[] polygons)
    {
        this.siteCount = siteCount;
        this.polygons = polygons;
    }

    /// <summary>How often the heirs of a silent site were computed for a set of silent sites and one polygon.</summary>
    public long StatesComputed => polygons.Sum(polygon => polygon.Computed);

    /// <summary>About how many bytes are remembered, of those that the budget is for.</summary>
    public long BytesHeld => polygons.Sum(polygon => polygon.Bytes);

    /// <summary>Weighs polygons by all sites.</summary>
    /// <param name="siteX">Eastings of the sites in metres, on the <see cref="Lattice"/>; one at least.</param>
    /// <param name="siteY">Northings, as many.</param>
    /// <param name="polygons">The polygons.</param>
    /// <param name="threads">How many threads may work at the same time, 1 or more.</param>
    /// <param name="budgetBytes">
    /// About how many bytes may be remembered of what the silent sites leave to whom, 0 or more. A polygon has a part of it
    /// in proportion to the number of its owners; past that it forgets all, and begins to remember anew. Besides, each polygon
    /// is kept once more, cut along the cells.
    /// </param>
    /// <exception cref="ArgumentException">No sites, lengths that differ, or a coordinate off the lattice.</exception>
    /// <exception cref="CoincidentSitesException">Sites that share a place; all of them are named.</exception>
    /// <exception cref="PolygonsRefusedException">Polygons that cannot be weighed; all of them are named.</exception>
    public static ReportingWeights Of(
        double[] siteX,
        double[] siteY,
        PolygonBatch polygons,
        int threads,
        long budgetBytes = DefaultBudgetBytes
    )
    {
        ArgumentOutOfRangeException.ThrowIfNegative(budgetBytes);
        var cells = ThiessenCells.Of(DelaunayTriangulation.Of(siteX, siteY));
        var weights = AreaWeights.Of(cells, polygons, threads);
        long owners = Enumerable.Range(0, weights.Count).Sum(polygon => (long)weights.Sites(polygon).Length);
        return new ReportingWeights(
            cells.SiteCount,
            [
                .. Enumerable
                    .Range(0, weights.Count)
                    .Select(polygon => new PolygonGaps(
                        cells.Graph,
                        polygons,
                        polygon,
                        OwnersOf(cells, weights, polygon),
                        weights.PolygonArea(polygon),
                        (long)((Int128)budgetBytes * weights.Sites(polygon).Length / owners)
                    )),
            ]
        );
    }

    /// <summary>
    /// The weights of one polygon when exactly the sites report of which that is said. Not for two threads at the same time,
    /// nor while <see cref="Means"/> is at work.
    /// </summary>
    /// <param name="polygon">Index of the polygon.</param>
    /// <param name="reports">A value a site, true where it reports; one at least does.</param>
    /// <returns>The sites that own part of the polygon, ascending, and their shares, positive; these sum to 1 within 1e-12.</returns>
    /// <exception cref="ArgumentException">As many values as there are sites were not given, or no site reports.</exception>
    /// <exception cref="ArgumentOutOfRangeException">There is no such polygon.</exception>
    /// <exception cref="PolygonsRefusedException">The polygon is too thin to be weighed by these sites.</exception>
    public (int[] Sites, double[] Weights) Of(int polygon, ReadOnlySpan<bool> reports)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(polygon);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(polygon, polygons.Length);
        Lengths.Check(reports.Length, siteCount, nameof(reports));
        if (!reports.Contains(true))
        {
            throw new ArgumentException("No site reports.", nameof(reports));
        }

        var bySite = new SortedDictionary<int, double>();
        polygons[polygon].AddWeights(reports, bySite);
        return ([.. bySite.Keys], [.. bySite.Values]);
    }

    /// <summary>Weighted means of the depths of those who report, for a block of steps.</summary>
    /// <param name="steps">How many steps, 0 or more.</param>
    /// <param name="depths">By step, then site: <c>depths[step * sites + site]</c>; not looked at where the site is silent.</param>
    /// <param name="reports">By step, then site: whether the site reports.</param>
    /// <param name="wanted">By step, then polygon: whether the mean is wanted; at such a step one site at least reports.</param>
    /// <param name="means">By step, then polygon: takes the mean where it is wanted; the others are left as they are.</param>
    /// <param name="threads">How many threads may work at the same time, 1 or more; each takes one polygon after the other.</param>
    /// <exception cref="ArgumentException">A length that does not fit, or a mean wanted of a step at which no site reports.</exception>
    /// <exception cref="PolygonsRefusedException">Polygons too thin to be weighed by some set of sites; all of them are named.</exception>
    public void Means(int steps, double[] depths, bool[] reports, bool[] wanted, double[] means, int threads)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(steps);
        ArgumentOutOfRangeException.ThrowIfLessThan(threads, 1);
        ArgumentNullException.ThrowIfNull(depths);
        ArgumentNullException.ThrowIfNull(reports);
        ArgumentNullException.ThrowIfNull(wanted);
        ArgumentNullException.ThrowIfNull(means);
        Lengths.Check(depths.Length, (long)steps * siteCount, nameof(depths));
        Lengths.Check(reports.Length, (long)steps * siteCount, nameof(reports));
        Lengths.Check(wanted.Length, (long)steps * polygons.Length, nameof(wanted));
        Lengths.Check(means.Length, (long)steps * polygons.Length, nameof(means));
        CheckSilence(steps, reports, wanted);
        var block = new StepBlock(siteCount, polygons.Length, depths, reports, wanted, means);
        var refusals = new PolygonRefusal?[polygons.Length];
        int groups = (int)Math.Min(polygons.Length, (long)GroupsPerThread * threads);
        Parallel.For(
            0,
            groups,
            new ParallelOptions { MaxDegreeOfParallelism = threads },
            group => ComputeMeans(block, steps, GroupOf(group, groups), refusals)
        );
        List<PolygonRefusal> refused = [.. refusals.OfType<PolygonRefusal>()];
        if (refused.Count > 0)
        {
            throw new PolygonsRefusedException(refused);
        }
    }

    private static (int Rank, double Weight)[] OwnersOf(ThiessenCells cells, AreaWeights weights, int polygon)
    {
        ReadOnlySpan<int> sites = weights.Sites(polygon);
        var owners = new (int Rank, double Weight)[sites.Length];
        for (int i = 0; i < owners.Length; i++)
        {
            owners[i] = (cells.RankOf(sites[i]), weights.Weights(polygon)[i]);
        }

        Array.Sort(owners);
        return owners;
    }

    private void CheckSilence(int steps, bool[] reports, bool[] wanted)
    {
        for (int step = 0; step < steps; step++)
        {
            bool isWanted = wanted.AsSpan(step * polygons.Length, polygons.Length).Contains(true);
            if (isWanted && !reports.AsSpan(step * siteCount, siteCount).Contains(true))
            {
                throw new ArgumentException(
                    FormattableString.Invariant($"A mean is wanted of step {step}, at which no site reports."),
                    nameof(wanted)
                );
            }
        }
    }

    private Range GroupOf(int group, int groups) =>
        (int)((long)group * polygons.Length / groups)..(int)((group + 1L) * polygons.Length / groups);

    private void ComputeMeans(StepBlock block, int steps, Range group, PolygonRefusal?[] refusals)
    {
        for (int first = 0; first < steps; first += StepsAtOnce)
        {
            int end = Math.Min(first + StepsAtOnce, steps);
            for (int polygon = group.Start.Value; polygon < group.End.Value; polygon++)
            {
                refusals[polygon] ??= ComputeMeans(block, first, end, polygon);
            }
        }
    }

    private PolygonRefusal? ComputeMeans(StepBlock block, int first, int end, int polygon)
    {
        try
        {
            for (int step = first; step < end; step++)
            {
                if (block.IsWanted(step, polygon))
                {
                    block.Mean(step, polygon) = polygons[polygon].Mean(block.Depths(step), block.Reports(step));
                }
            }

            return null;
        }
        catch (PolygonsRefusedException refused)
        {
            return refused.Refusals[0];
        }
    }
}

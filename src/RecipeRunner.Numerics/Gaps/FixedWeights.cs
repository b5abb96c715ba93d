namespace RecipeRunner.Numerics.Gaps;

/// <summary>
/// Weights that stay the same at every step, applied to a record with gaps: where all weighted sites report, the weighted
/// sum; where some are silent, the sum over those that report divided by their weights (rescaled).
/// </summary>
/// <remarks>
/// Sums run over the sites of a polygon in the order given, without compensation: n positive terms are added with an error of
/// n·2⁻⁵³ of the sum at most. Several steps are added at the same time, each in its own lane, so the same bits come out on any
/// machine and for any number of threads.
/// </remarks>
public sealed class FixedWeights
{
    private readonly int siteCount;
    private readonly int[] starts;
    private readonly int[] sites;
    private readonly double[] weights;
    private readonly int[] ownerCounts;

    /// <summary>Takes the arrays as they are, without a copy; they may not change afterwards.</summary>
    /// <param name="siteCount">How many sites there are.</param>
    /// <param name="starts">Index of the first weight of each polygon, then the number of weights; ascending from 0.</param>
    /// <param name="sites">Index of the site of each weight.</param>
    /// <param name="weights">The weights, positive; those of a polygon sum to 1.</param>
    /// <exception cref="ArgumentException">Starts or lengths that do not fit, no such site, or a weight that is not positive.</exception>
    public FixedWeights(int siteCount, int[] starts, int[] sites, double[] weights)
    {
        ArgumentNullException.ThrowIfNull(starts);
        ArgumentNullException.ThrowIfNull(sites);
        ArgumentNullException.ThrowIfNull(weights);
        Lengths.Check(weights.Length, sites.Length, nameof(weights));
        CheckStarts(starts, sites.Length);
        for (int i = 0; i < sites.Length; i++)
        {
            if (sites[i] < 0 || sites[i] >= siteCount || !(weights[i] > 0 && double.IsFinite(weights[i])))
            {
                throw new ArgumentException(
                    FormattableString.Invariant($"Weight {i} is {weights[i]:R} for site {sites[i]} of {siteCount}."),
                    nameof(weights)
                );
            }
        }

        this.siteCount = siteCount;
        this.starts = starts;
        this.sites = sites;
        this.weights = weights;
        ownerCounts = [.. Enumerable.Range(0, starts.Length - 1).Select(i => starts[i + 1] - starts[i])];
    }

    /// <summary>How many polygons there are.</summary>
    public int Count => starts.Length - 1;

    /// <summary>Applies the weights to a block of steps.</summary>
    /// <param name="steps">How many steps, 0 or more.</param>
    /// <param name="depths">By step, then site: <c>depths[step * sites + site]</c>; not looked at where the site is silent.</param>
    /// <param name="reports">By step, then site: whether the site reports.</param>
    /// <param name="means">By step, then polygon: takes the mean; left as it is where no weighted site reports.</param>
    /// <param name="reporting">By step, then polygon: takes the number of weighted sites that report.</param>
    /// <param name="shares">By step, then polygon: takes the sum of their weights; exactly 1 where all report.</param>
    /// <param name="threads">How many threads may work at the same time, 1 or more.</param>
    /// <exception cref="ArgumentException">A length that does not fit.</exception>
    public void Means(
        int steps,
        double[] depths,
        bool[] reports,
        double[] means,
        int[] reporting,
        double[] shares,
        int threads
    )
    {
        ArgumentOutOfRangeException.ThrowIfNegative(steps);
        ArgumentOutOfRangeException.ThrowIfLessThan(threads, 1);
        ArgumentNullException.ThrowIfNull(depths);
        ArgumentNullException.ThrowIfNull(reports);
        ArgumentNullException.ThrowIfNull(means);
        ArgumentNullException.ThrowIfNull(reporting);
        ArgumentNullException.ThrowIfNull(shares);
        Lengths.Check(depths.Length, (long)steps * siteCount, nameof(depths));
        Lengths.Check(reports.Length, (long)steps * siteCount, nameof(reports));
        Lengths.Check(means.Length, (long)steps * Count, nameof(means));
        Lengths.Check(reporting.Length, (long)steps * Count, nameof(reporting));
        Lengths.Check(shares.Length, (long)steps * Count, nameof(shares));
        int groups = (steps + StepLanes.Count - 1) / StepLanes.Count;
        Parallel.For(
            0,
            groups,
            new ParallelOptions { MaxDegreeOfParallelism = threads },
            () => new StepLanes(siteCount),
            (group, _, lanes) =>
            {
                int first = group * StepLanes.Count;
                int count = Math.Min(StepLanes.Count, steps - first);
                Range block = (first * siteCount)..((first + count) * siteCount);
                Range cells = (first * Count)..((first + count) * Count);
                lanes.Load(depths.AsSpan(block), reports.AsSpan(block));
                if (lanes.HasGaps)
                {
                    WeighGaps(lanes, count, means.AsSpan(cells), reporting.AsSpan(cells), shares.AsSpan(cells));
                }
                else
                {
                    Weigh(lanes, count, means.AsSpan(cells), reporting.AsSpan(cells), shares.AsSpan(cells));
                }

                return lanes;
            },
            _ => { }
        );
    }

    private void Weigh(StepLanes lanes, int count, Span<double> means, Span<int> reporting, Span<double> shares)
    {
        Span<double> sum = stackalloc double[StepLanes.Count];
        for (int polygon = 0; polygon < Count; polygon++)
        {
            lanes.Weigh(OwnersOf(polygon), WeightsOf(polygon), sum);
            for (int lane = 0; lane < count; lane++)
            {
                means[(lane * Count) + polygon] = sum[lane];
            }
        }

        shares.Fill(1);
        for (int lane = 0; lane < count; lane++)
        {
            ownerCounts.CopyTo(reporting[(lane * Count)..]);
        }
    }

    private void WeighGaps(StepLanes lanes, int count, Span<double> means, Span<int> reporting, Span<double> shares)
    {
        Span<double> sum = stackalloc double[StepLanes.Count];
        Span<double> share = stackalloc double[StepLanes.Count];
        Span<int> reported = stackalloc int[StepLanes.Count];
        for (int polygon = 0; polygon < Count; polygon++)
        {
            lanes.Weigh(OwnersOf(polygon), WeightsOf(polygon), sum);
            lanes.Share(OwnersOf(polygon), WeightsOf(polygon), share);
            lanes.CountReporting(OwnersOf(polygon), reported);
            for (int lane = 0; lane < count; lane++)
            {
                int cell = (lane * Count) + polygon;
                bool isFull = reported[lane] == ownerCounts[polygon];
                reporting[cell] = reported[lane];
                shares[cell] = isFull ? 1 : share[lane];
                if (reported[lane] > 0)
                {
                    means[cell] = isFull ? sum[lane] : sum[lane] / share[lane];
                }
            }
        }
    }

    private ReadOnlySpan<int> OwnersOf(int polygon) => sites.AsSpan(starts[polygon]..starts[polygon + 1]);

    private ReadOnlySpan<double> WeightsOf(int polygon) => weights.AsSpan(starts[polygon]..starts[polygon + 1]);

    private static void CheckStarts(int[] starts, int end)
    {
        bool fits = starts.Length > 0 && starts[0] == 0 && starts[^1] == end;
        for (int i = 1; i < starts.Length; i++)
        {
            fits &= starts[i] > starts[i - 1];
        }

        if (!fits)
        {
            throw new ArgumentException(
                FormattableString.Invariant($"Starts must ascend from 0 to {end}, each polygon having a weight."),
                nameof(starts)
            );
        }
    }
}

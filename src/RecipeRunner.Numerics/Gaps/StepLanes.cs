using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace RecipeRunner.Numerics.Gaps;

/// <summary>Some steps side by side, a lane each, so that one instruction adds for all of them.</summary>
internal sealed class StepLanes(int siteCount)
{
    /// <summary>How many steps there are at most.</summary>
    public const int Count = 8;

    private readonly double[] depths = new double[Count * siteCount];
    private readonly double[] reports = new double[Count * siteCount];

    /// <summary>Whether any site is silent at any of the steps.</summary>
    public bool HasGaps { get; private set; }

    /// <summary>Takes in the next steps of a record; lanes beyond them hold what they held before.</summary>
    public void Load(ReadOnlySpan<double> stepDepths, ReadOnlySpan<bool> stepReports)
    {
        HasGaps = stepReports.Contains(false);
        for (int start = 0; start < stepDepths.Length; start += siteCount)
        {
            int lane = start / siteCount;
            if (HasGaps)
            {
                LoadGaps(stepDepths.Slice(start, siteCount), stepReports.Slice(start, siteCount), lane);
            }
            else
            {
                LoadFull(stepDepths.Slice(start, siteCount), lane);
            }
        }
    }

    /// <summary>By lane: the sum of weight times depth over the sites that report.</summary>
    public void Weigh(ReadOnlySpan<int> sites, ReadOnlySpan<double> weights, Span<double> sums) =>
        Add(depths, sites, weights, sums);

    /// <summary>By lane: the sum of the weights of the sites that report; after <see cref="HasGaps"/>.</summary>
    public void Share(ReadOnlySpan<int> sites, ReadOnlySpan<double> weights, Span<double> shares) =>
        Add(reports, sites, weights, shares);

    /// <summary>By lane: how many of the sites report; after <see cref="HasGaps"/>.</summary>
    public void CountReporting(ReadOnlySpan<int> sites, Span<int> counts)
    {
        counts.Clear();
        foreach (int site in sites)
        {
            for (int lane = 0; lane < Count; lane++)
            {
                counts[lane] += (int)reports[(site * Count) + lane];
            }
        }
    }

    private void LoadFull(ReadOnlySpan<double> row, int lane)
    {
        double[] target = depths;
        int place = lane;
        foreach (double depth in row)
        {
            target[place] = depth;
            place += Count;
        }
    }

    private void LoadGaps(ReadOnlySpan<double> row, ReadOnlySpan<bool> isReporting, int lane)
    {
        for (int site = 0; site < row.Length; site++)
        {
            int place = (site * Count) + lane;
            depths[place] = isReporting[site] ? row[site] : 0;
            reports[place] = isReporting[site] ? 1 : 0;
        }
    }

    private static void Add(double[] lanes, ReadOnlySpan<int> sites, ReadOnlySpan<double> weights, Span<double> sums)
    {
        ReadOnlySpan<Vector512<double>> bySite = MemoryMarshal.Cast<double, Vector512<double>>(lanes);
        Vector512<double> sum = Vector512<double>.Zero;
        for (int i = 0; i < sites.Length; i++)
        {
            sum += bySite[sites[i]] * weights[i];
        }

        sum.CopyTo(sums);
    }
}

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

    /// <summary>Takes in the next steps of a record, one at least; lanes beyond them repeat the last.</summary>
    public void Load(ReadOnlySpan<double> stepDepths, ReadOnlySpan<bool> stepReports)
    {
        HasGaps = stepReports.Contains(false);
        int last = stepDepths.Length - siteCount;
        for (int site = 0; site < siteCount; site++)
        {
            Span<double> depthLanes = depths.AsSpan(site * Count, Count);
            int place = site;
            for (int lane = 0; lane < depthLanes.Length; lane++)
            {
                depthLanes[lane] = stepDepths[place];
                place = Math.Min(place + siteCount, last + site);
            }

            if (HasGaps)
            {
                Mask(site, stepReports, last);
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

    private void Mask(int site, ReadOnlySpan<bool> stepReports, int last)
    {
        int place = site;
        for (int lane = 0; lane < Count; lane++)
        {
            bool isReporting = stepReports[place];
            reports[(site * Count) + lane] = isReporting ? 1 : 0;
            depths[(site * Count) + lane] = isReporting ? depths[(site * Count) + lane] : 0;
            place = Math.Min(place + siteCount, last + site);
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

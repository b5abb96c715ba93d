using RecipeRunner.Model.Rain;

namespace RecipeRunner.Host.Comparing;

/// <summary>Makes the records that lie between those of two studies: the gauges that report in the second, with the depths of the first where it has them.</summary>
internal static class MixedRecords
{
    /// <summary>The mixture, over gauges and steps of the second.</summary>
    public static RainRecords Of(RainRecords was, RainRecords now)
    {
        var (depths, statuses) = (now.CopyDepths(), now.CopyStatuses());
        var columns = now.GaugeIds.Select(id => was.GaugeIds.IndexOf(id)).ToArray();
        for (var t = 0; t < now.Times.Count; t++)
        {
            if (was.Times.IndexOf(now.Times.LabelAt(t)) is { } before)
            {
                Mix(was, before, columns, t * columns.Length, depths, statuses);
            }
        }

        return new RainRecords(now.GaugeIds, now.Times, depths, statuses, now.Source, now.Accumulations);
    }

    private static void Mix(
        RainRecords was,
        int before,
        int[] columns,
        int start,
        double[] depths,
        RecordStatus[] statuses
    )
    {
        for (var gauge = 0; gauge < columns.Length; gauge++)
        {
            var column = columns[gauge];
            if (column >= 0 && was.StatusesAt(before)[column].Reports() && statuses[start + gauge].Reports())
            {
                depths[start + gauge] = was.DepthsAt(before)[column];
            }
        }
    }
}

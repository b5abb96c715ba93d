using RecipeRunner.Model.Rain;

namespace RecipeRunner.Steps.Series;

/// <summary>Some steps of a record, gauge by gauge of the network, and what is worked out for them basin by basin.</summary>
internal sealed class StepBlock
{
    public StepBlock(RainRecords rain, int[] columns, int first, int count, int basins)
    {
        First = first;
        Count = count;
        Depths = new double[count * columns.Length];
        Reports = new bool[count * columns.Length];
        Estimated = new bool[count * columns.Length];
        Means = new double[count * basins];
        Reporting = new int[count * basins];
        Shares = new double[count * basins];
        Wanted = new bool[count * basins];
        Nearest = new double?[count * basins];
        for (var t = 0; t < count; t++)
        {
            Take(rain, columns, t);
        }
    }

    /// <summary>Index of the first step in the record.</summary>
    public int First { get; }

    /// <summary>How many steps.</summary>
    public int Count { get; }

    /// <summary>By step, then gauge: millimetres, 0 where silent.</summary>
    public double[] Depths { get; }

    /// <summary>By step, then gauge: whether it reports.</summary>
    public bool[] Reports { get; }

    /// <summary>By step, then gauge: whether what it reports is estimated.</summary>
    public bool[] Estimated { get; }

    /// <summary>By step, then basin: the weighted mean.</summary>
    public double[] Means { get; }

    /// <summary>By step, then basin: gauges with weight in the full network that report.</summary>
    public int[] Reporting { get; }

    /// <summary>By step, then basin: the sum of their weights.</summary>
    public double[] Shares { get; }

    /// <summary>By step, then basin: metres to the nearest gauge that reports; null where none does.</summary>
    public double?[] Nearest { get; }

    /// <summary>By step, then basin: whether cells are to be drawn anew for it.</summary>
    public bool[] Wanted { get; }

    private void Take(RainRecords rain, int[] columns, int t)
    {
        var depths = rain.DepthsAt(First + t);
        var statuses = rain.StatusesAt(First + t);
        var at = t * columns.Length;
        for (var gauge = 0; gauge < columns.Length; gauge++, at++)
        {
            var column = columns[gauge];
            if (column >= 0 && statuses[column].Reports())
            {
                Depths[at] = depths[column];
                Reports[at] = true;
                Estimated[at] = statuses[column] == RecordStatus.Estimated;
            }
        }
    }
}

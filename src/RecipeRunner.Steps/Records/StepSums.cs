using System.Runtime.InteropServices;
using RecipeRunner.Model.Rain;
using RecipeRunner.Numerics.Statistics;

namespace RecipeRunner.Steps.Records;

/// <summary>Sums of the values of one gauge over some steps. A total of several steps counts where all of them lie within.</summary>
internal sealed class StepSums(RainRecords rain)
{
    private readonly ILookup<int, Accumulation> totals = rain.Accumulations.ToLookup(total => total.Gauge);

    /// <summary>The sum of one gauge.</summary>
    /// <param name="gauge">Index of the gauge.</param>
    /// <param name="first">Index of the first step.</param>
    /// <param name="count">How many steps of the record lie within.</param>
    /// <param name="expected">How many steps there should be; those beyond the record are missing.</param>
    public StepSum Over(int gauge, int first, int count, int expected)
    {
        var seen = new int[(int)RecordStatus.Failed + 1];
        var sum = default(CompensatedSum);
        for (var t = first; t < first + count; t++)
        {
            var status = rain.StatusesAt(t)[gauge];
            seen[(int)status]++;
            if (status.Reports())
            {
                sum.Add(rain.DepthsAt(t)[gauge]);
            }
        }

        var within = 0;
        foreach (var total in totals[gauge].Where(total => total.FirstStep >= first && total.LastStep < first + count))
        {
            sum.Add(total.DepthMillimetres);
            within += total.LastStep - total.FirstStep + 1;
        }

        return new StepSum(sum.Value, seen, within, expected - count);
    }
}

/// <summary>A sum and what it was made of.</summary>
/// <param name="DepthMillimetres">The sum of the values that could be used.</param>
/// <param name="Seen">How many steps have each status.</param>
/// <param name="WithinTotals">Steps that a total covers which lies wholly within.</param>
/// <param name="Beyond">Steps that the record does not reach.</param>
[StructLayout(LayoutKind.Auto)]
internal readonly record struct StepSum(double DepthMillimetres, int[] Seen, int WithinTotals, int Beyond)
{
    /// <summary>Steps whose rain is in the sum.</summary>
    public int Present =>
        Seen[(int)RecordStatus.Observed]
        + Seen[(int)RecordStatus.Trace]
        + Seen[(int)RecordStatus.Estimated]
        + WithinTotals;

    /// <summary>What is known of the sum where it is given.</summary>
    /// <param name="expected">How many steps there should be.</param>
    public RecordStatus StatusGiven(int expected) =>
        Present < expected || Seen[(int)RecordStatus.Estimated] > 0 ? RecordStatus.Estimated
        : DepthMillimetres == 0 && Seen[(int)RecordStatus.Trace] > 0 ? RecordStatus.Trace
        : RecordStatus.Observed;

    /// <summary>What is known of the sum where it is not given: what most plainly stood in its way.</summary>
    public RecordStatus Lacking =>
        Seen[(int)RecordStatus.Missing] + Beyond > 0 ? RecordStatus.Missing
        : Seen[(int)RecordStatus.Accumulated] > WithinTotals ? RecordStatus.Accumulated
        : Seen[(int)RecordStatus.Failed] > 0 ? RecordStatus.Failed
        : RecordStatus.Missing;
}

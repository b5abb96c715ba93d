using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>What is to be said of records, gathered in one pass over their steps.</summary>
internal sealed class RecordSurvey
{
    private const int MostKept = 5;

    private readonly int[] silentSince;
    private int silent;

    private RecordSurvey(int gauges)
    {
        silentSince = new int[gauges];
        Array.Fill(silentSince, -1);
        Missing = new int[gauges];
        Failed = new int[gauges];
    }

    /// <summary>The first values, then totals, beyond any that was ever measured in so long a time, with that limit.</summary>
    public List<(int Step, int Gauge, double Depth, double Limit)> Impossible { get; } = [];

    /// <summary>How many there are.</summary>
    public int ImpossibleCount { get; private set; }

    /// <summary>Runs of missing values of at least the length asked for, by their end, then gauge.</summary>
    public List<Silence> Silences { get; } = [];

    /// <summary>Missing values by gauge.</summary>
    public int[] Missing { get; }

    /// <summary>Values that failed a check of quality, by gauge.</summary>
    public int[] Failed { get; }

    /// <summary>Looks through records.</summary>
    /// <param name="records">The records.</param>
    /// <param name="shortest">The shortest silence to keep.</param>
    public static RecordSurvey Of(RainRecords records, int shortest)
    {
        var survey = new RecordSurvey(records.GaugeIds.Length);
        var limit = DepthLimit.Of(records.Times.IntervalAt(0));
        for (var step = 0; step < records.Times.Count; step++)
        {
            survey.AddDepths(step, records.DepthsAt(step), records.StatusesAt(step), limit);
            survey.AddStatuses(step, records.StatusesAt(step), shortest);
        }

        foreach (var total in records.Accumulations)
        {
            survey.AddTotal(records.Times, total);
        }

        for (var gauge = 0; gauge < records.GaugeIds.Length; gauge++)
        {
            survey.EndSilence(gauge, records.Times.Count, shortest);
        }

        return survey;
    }

    private void AddDepths(int step, ReadOnlySpan<double> depths, ReadOnlySpan<RecordStatus> statuses, double limit)
    {
        for (var gauge = 0; gauge < depths.Length; gauge++)
        {
            if (depths[gauge] > limit && statuses[gauge] != RecordStatus.Failed)
            {
                AddImpossible(step, gauge, depths[gauge], limit);
            }
        }
    }

    private void AddTotal(Timeline times, Accumulation total)
    {
        var (start, end) = (times.IntervalAt(total.FirstStep).Start, times.IntervalAt(total.LastStep).End);
        var limit = DepthLimit.Of(new RainInterval(start, end));
        if (total.DepthMillimetres > limit)
        {
            AddImpossible(total.LastStep, total.Gauge, total.DepthMillimetres, limit);
        }
    }

    private void AddImpossible(int step, int gauge, double depth, double limit)
    {
        ImpossibleCount++;
        if (Impossible.Count < MostKept)
        {
            Impossible.Add((step, gauge, depth, limit));
        }
    }

    private void AddStatuses(int step, ReadOnlySpan<RecordStatus> statuses, int shortest)
    {
        if (silent == 0 && !statuses.ContainsAnyExcept(RecordStatus.Observed))
        {
            return;
        }

        for (var gauge = 0; gauge < statuses.Length; gauge++)
        {
            if (statuses[gauge] == RecordStatus.Missing)
            {
                Missing[gauge]++;
                BeginSilence(gauge, step);
                continue;
            }

            EndSilence(gauge, step, shortest);
            Failed[gauge] += statuses[gauge] == RecordStatus.Failed ? 1 : 0;
        }
    }

    private void BeginSilence(int gauge, int step)
    {
        if (silentSince[gauge] < 0)
        {
            silentSince[gauge] = step;
            silent++;
        }
    }

    private void EndSilence(int gauge, int step, int shortest)
    {
        var since = silentSince[gauge];
        if (since < 0)
        {
            return;
        }

        silentSince[gauge] = -1;
        silent--;
        if (step - since >= shortest)
        {
            Silences.Add(new Silence(gauge, since, step - since));
        }
    }
}

using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Records;

/// <summary>Values of several records, side by side.</summary>
internal sealed class JoinedValues(ImmutableArray<string> ids, Timeline times)
{
    private readonly double[] depths = new double[times.Count * ids.Length];
    private readonly RecordStatus[] statuses = new RecordStatus[times.Count * ids.Length];
    private readonly List<Accumulation> totals = [];

    /// <summary>How many values were given twice and agree.</summary>
    public int Agreeing { get; private set; }

    /// <summary>Adds records.</summary>
    /// <param name="rain">Records within the span.</param>
    /// <param name="problems">Takes values that contradict those there.</param>
    public void Add(RainRecords rain, Problems problems)
    {
        var columns = rain.GaugeIds.Select(id => ids.BinarySearch(id, StringComparer.Ordinal)).ToArray();
        var before = times.Step.StepsBetween(times.First, rain.Times.First);
        for (var t = 0; t < rain.Times.Count; t++)
        {
            for (var gauge = 0; gauge < columns.Length; gauge++)
            {
                Put(rain, t, gauge, ((before + t) * ids.Length) + columns[gauge], problems);
            }
        }

        totals.AddRange(
            rain.Accumulations.Select(total => new Accumulation(
                columns[total.Gauge],
                before + total.FirstStep,
                before + total.LastStep,
                total.DepthMillimetres
            ))
        );
    }

    /// <summary>Looks for totals that share steps, so that rain would count twice.</summary>
    /// <param name="source">What to call the records.</param>
    /// <param name="problems">Takes such totals.</param>
    public void CheckTotals(string source, Problems problems)
    {
        foreach (var (one, other) in Totals().Zip(Totals().Skip(1)))
        {
            if (one.Gauge == other.Gauge && other.FirstStep <= one.LastStep)
            {
                problems.Add(
                    "RR0533",
                    new Place(source, Item: $"gauge {ids[one.Gauge]}"),
                    $"It has two totals that share steps: {Words(one)}, and {Words(other)}.",
                    "Take one of the two: leave it out of a file, or take a span with .Between(…)."
                );
            }
        }
    }

    /// <summary>The records of all.</summary>
    /// <param name="source">What to call them.</param>
    public RainRecords ToRecords(string source) => new(ids, times, depths, statuses, source, [.. Totals()]);

    private IEnumerable<Accumulation> Totals() =>
        totals
            .Distinct()
            .OrderBy(total => total.Gauge)
            .ThenBy(total => total.FirstStep)
            .ThenBy(total => total.LastStep);

    private string Words(Accumulation total) =>
        string.Create(
            CultureInfo.InvariantCulture,
            $"{total.DepthMillimetres:0.###} mm from {times.TextAt(total.FirstStep)} to {times.TextAt(total.LastStep)}"
        );

    private void Put(RainRecords rain, int t, int gauge, int at, Problems problems)
    {
        var (depth, status) = (rain.DepthsAt(t)[gauge], rain.StatusesAt(t)[gauge]);
        if (status == RecordStatus.Missing)
        {
            return;
        }

        if (statuses[at] == RecordStatus.Missing)
        {
            (depths[at], statuses[at]) = (depth, status);
        }
        else if (statuses[at] == status && depths[at].Equals(depth))
        {
            Agreeing++;
        }
        else
        {
            problems.Add(
                "RR0533",
                new Place(rain.Source, Item: $"gauge {rain.GaugeIds[gauge]}"),
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"At {rain.Times.TextAt(t)} it has {depth:0.###} mm ({status.Word()}), other records {depths[at]:0.###} mm ({statuses[at].Word()})."
                ),
                "Take one of the two: leave it out of a file, or take a span with .Between(…)."
            );
        }
    }
}

using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>
/// Settles which depths belong to several steps: runs of cells whose rain is in the gauge's next value, and totals over a
/// stated number of steps. Where the total is not known, or other values stand within its steps, the steps stay accumulated
/// without a total.
/// </summary>
internal sealed class AccumulationFinder
{
    private readonly RecordPart part;
    private readonly List<Accumulation> found = [];
    private readonly List<(int Gauge, int Step)> lost = [];

    private AccumulationFinder(RecordPart part) => this.part = part;

    private int Gauges => part.GaugeIds.Length;

    /// <summary>Settles them, and changes the part's depths and statuses accordingly.</summary>
    /// <returns>By gauge, then step.</returns>
    public static ImmutableArray<Accumulation> Settle(StepContext context, RecordPart part)
    {
        var finder = new AccumulationFinder(part);
        finder.SettleRuns();
        foreach (var total in part.Totals.OrderBy(total => total.Gauge).ThenBy(total => total.LastStep))
        {
            finder.SettleTotal(total);
        }

        var ordered = finder.found.OrderBy(total => total.Gauge).ThenBy(total => total.FirstStep).ToImmutableArray();
        finder.Tell(context, ordered);
        return ordered;
    }

    private void SettleRuns()
    {
        if (!part.Statuses.AsSpan().Contains(RecordStatus.Accumulated))
        {
            return;
        }

        for (var gauge = 0; gauge < Gauges; gauge++)
        {
            var first = -1;
            for (var step = 0; step < part.Times.Count; step++)
            {
                var status = part.Statuses[(step * Gauges) + gauge];
                if (status == RecordStatus.Accumulated)
                {
                    first = first < 0 ? step : first;
                }
                else if (first >= 0)
                {
                    Close(gauge, first, step, status);
                    first = -1;
                }
            }

            if (first >= 0)
            {
                lost.Add((gauge, first));
            }
        }
    }

    private void Close(int gauge, int first, int step, RecordStatus status)
    {
        if (!status.Reports())
        {
            lost.Add((gauge, first));
            return;
        }

        var at = (step * Gauges) + gauge;
        found.Add(new Accumulation(gauge, first, step, part.Depths[at]));
        (part.Depths[at], part.Statuses[at]) = (0, RecordStatus.Accumulated);
    }

    private void SettleTotal(SpanTotal total)
    {
        var first = total.LastStep - total.Steps + 1;
        var (free, missing) = (first >= 0, new List<int>());
        for (var step = Math.Max(0, first); step <= total.LastStep; step++)
        {
            var at = (step * Gauges) + total.Gauge;
            if (part.Statuses[at] == RecordStatus.Missing)
            {
                missing.Add(at);
            }
            else
            {
                free = false;
            }
        }

        foreach (var at in missing)
        {
            part.Statuses[at] = RecordStatus.Accumulated;
        }

        if (free && total is { Depth: { } depth, Steps: > 1 })
        {
            found.Add(new Accumulation(total.Gauge, first, total.LastStep, depth));
        }
        else
        {
            lost.Add((total.Gauge, total.LastStep));
        }
    }

    private void Tell(StepContext context, ImmutableArray<Accumulation> accumulations)
    {
        if (!accumulations.IsEmpty)
        {
            var longest = accumulations.MaxBy(total => total.LastStep - total.FirstStep);
            context.Find(
                Finding.Notice(
                    "RR0272",
                    new Place(part.File),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{Counted.Of(accumulations.Length, "value is a total", "values are totals")} of several steps; longest: {part.GaugeIds[longest.Gauge]} {part.Times.TextAt(longest.FirstStep)} to {part.Times.TextAt(longest.LastStep)} ({longest.LastStep - longest.FirstStep + 1})."
                    ),
                    "Steps of totals count as silent until the totals are spread over them."
                )
            );
        }

        if (lost.Count > 0)
        {
            var (gauge, step) = lost[0];
            context.Find(
                Finding.Caution(
                    "RR0273",
                    new Place(part.File),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{Counted.Of(lost.Count, "span over which rain accumulated has", "spans over which rain accumulated have")} no total that can be used, the first at {part.GaugeIds[gauge]}, {part.Times.TextAt(step)}: no value follows, it failed, its number of steps is not said, or other values stand within it."
                    ),
                    "These steps stay without a value."
                )
            );
        }
    }
}

using System.Collections.Immutable;
using NodaTime;
using NodaTime.Text;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Records;

/// <summary>
/// Takes the steps of records from one date to another, both included. Dates are those that the file gives; a step of hours or
/// minutes belongs to the date on which it starts.
/// </summary>
/// <param name="Rain">Gauge records.</param>
/// <param name="First">The first date, <c>2024-01-01</c>.</param>
/// <param name="Last">The last date, <c>2024-12-31</c>.</param>
/// <example><code>var january = rain.Between("2024-01-01", "2024-01-31");</code></example>
[Step("Between dates", Word = "between")]
public sealed record BetweenStep(RainRecords Rain, string First, string Last) : Step<RainRecords>, IRecordStep
{
    /// <inheritdoc/>
    public override RainRecords Execute(StepContext context)
    {
        var (first, last) = (Date(First), Date(Last));
        var steps = Enumerable
            .Range(0, Rain.Times.Count)
            .Where(t => Rain.Times.DateAt(t) is var date && date >= first && date <= last)
            .ToArray();
        if (steps.Length == 0)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0515",
                    new Place(Rain.Source),
                    $"There are no steps from {First} to {Last}.",
                    $"The records run from {Rain.Times}."
                )
            );
        }

        TellOfShortSpan(context, first, last);
        TellOfCutSteps(context, first, last);
        TellOfCutTotals(context, steps[0], steps[^1]);
        return Cut(steps[0], steps.Length);
    }

    /// <inheritdoc/>
    public ImmutableArray<ValueOrigin> OriginsOf(RainRecords records, int gauge, int step, StepContext context) =>
        [new EarlierValue(Rain, gauge, Rain.Times.IndexOf(records.Times.LabelAt(step))!.Value)];

    private RainRecords Cut(int first, int count)
    {
        var gauges = Rain.GaugeIds.Length;
        var (depths, statuses) = (new double[count * gauges], new RecordStatus[count * gauges]);
        for (var t = 0; t < count; t++)
        {
            Rain.DepthsAt(first + t).CopyTo(depths.AsSpan(t * gauges));
            Rain.StatusesAt(first + t).CopyTo(statuses.AsSpan(t * gauges));
        }

        var totals = Rain
            .Accumulations.Where(total => total.FirstStep >= first && total.LastStep < first + count)
            .Select(total => total with { FirstStep = total.FirstStep - first, LastStep = total.LastStep - first });
        return new RainRecords(
            Rain.GaugeIds,
            Rain.Times.Slice(first, count),
            depths,
            statuses,
            Rain.Source,
            [.. totals]
        );
    }

    private void TellOfShortSpan(StepContext context, LocalDate first, LocalDate last)
    {
        var step = Rain.Times.Step;
        if (step.DateOf(Rain.Times.First) > first || step.DateOf(step.After(Rain.Times.Last, 1)) <= last)
        {
            context.Find(
                Finding.Caution(
                    "RR0516",
                    new Place(Rain.Source),
                    $"The records do not reach from {First} to {Last}: they run from {Rain.Times}.",
                    "Sums over the span asked for would be too low."
                )
            );
        }
    }

    /// <summary>A month or year counts by its first date: cut by the first date it is left out, by the last it is taken whole.</summary>
    private void TellOfCutSteps(StepContext context, LocalDate first, LocalDate last)
    {
        var (before, after) = (StepOver(first), StepOver(last));
        List<string> cut = [];
        if (before is { } early && Rain.Times.DateAt(early) < first)
        {
            cut.Add($"{First} lies within {Rain.Times.TextAt(early)}, which is left out");
        }

        if (
            after is { } late
            && Rain.Times.Step.DateOf(Rain.Times.Step.After(Rain.Times.LabelAt(late), 1)) > last.PlusDays(1)
        )
        {
            cut.Add($"{Last} lies within {Rain.Times.TextAt(late)}, which is taken whole");
        }

        if (cut.Count > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0550",
                    new Place(Rain.Source),
                    $"{string.Join("; ", cut)}: the records are {Rain.Times.Step.ToSettingText()}.",
                    "Give dates at which such steps begin and end."
                )
            );
        }
    }

    /// <summary>The step of several dates that holds one.</summary>
    private int? StepOver(LocalDate date) =>
        Rain.Times.Step.LabelsAreDates ? Rain.Times.IndexOf(Rain.Times.Step.LabelOf(date.AtMidnight())!.Value) : null;

    private void TellOfCutTotals(StepContext context, int first, int last)
    {
        var cut = Rain.Accumulations.Count(total =>
            total.FirstStep <= last && total.LastStep >= first && (total.FirstStep < first || total.LastStep > last)
        );
        if (cut > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0522",
                    new Place(Rain.Source),
                    FormattableString.Invariant(
                        $"{Counted.Of(cut, "accumulated total reaches", "accumulated totals reach")} over the first or last date; their steps stay without a value."
                    ),
                    "Spread accumulations before taking a span."
                )
            );
        }
    }

    private static LocalDate Date(string text) =>
        LocalDatePattern.Iso.Parse(text).TryGetValue(default, out var date)
            ? date
            : throw new RefusedException(
                Finding.Error(
                    "RR0517",
                    Place.Of("dates"),
                    $"'{text}' is not a date.",
                    "Write year-month-day, such as 2024-01-31 (ISO 8601)."
                )
            );
}

/// <summary>The verb for <see cref="BetweenStep"/>.</summary>
public static class BetweenVerb
{
    /// <inheritdoc cref="BetweenStep"/>
    /// <param name="rain">Gauge records.</param>
    /// <param name="first">The first date, <c>2024-01-01</c>.</param>
    /// <param name="last">The last date, <c>2024-12-31</c>.</param>
    public static RainRecords Between(this RainRecords rain, string first, string last) =>
        rain.Run(new BetweenStep(rain, first, last));
}

using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Records;

/// <summary>
/// Puts records of other gauges, or of the same gauges at other times, beside each other. Both must have the same steps: the same
/// length, the same observation day, the same clock. Where both have a value for one gauge and step they must agree.
/// </summary>
/// <param name="Rain">Gauge records.</param>
/// <param name="More">Further records.</param>
/// <example><code>var all = daily.And(hourly.ToDays(endingAt: "09:00"));</code></example>
[Step("Join records", Word = "join")]
public sealed record JoinRecordsStep(RainRecords Rain, RainRecords More) : Step<RainRecords>, IRecordStep
{
    /// <inheritdoc/>
    public override RainRecords Execute(StepContext context)
    {
        RequireSameSteps();
        var times = Span();
        ImmutableArray<string> ids =
        [
            .. Rain.GaugeIds.Union(More.GaugeIds, StringComparer.Ordinal).Order(StringComparer.Ordinal),
        ];
        var joined = new JoinedValues(ids, times);
        var problems = new Problems();
        joined.Add(Rain, problems);
        joined.Add(More, problems);
        joined.CheckTotals($"{Rain.Source} and {More.Source}", problems);
        problems.ThrowIfAny();
        TellOfOpenEnds(context, Rain, More);
        TellOfOpenEnds(context, More, Rain);
        if (joined.Agreeing > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0531",
                    new Place(More.Source),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{Counted.Of(joined.Agreeing, "value stands", "values stand")} in {Rain.Source} as well, with the same depth."
                    )
                )
            );
        }

        return joined.ToRecords($"{Rain.Source} and {More.Source}");
    }

    /// <inheritdoc/>
    public ImmutableArray<ValueOrigin> OriginsOf(RainRecords records, int gauge, int step, StepContext context) =>
        [
            .. from source in (RainRecords[])[Rain, More]
            let column = source.GaugeIds.IndexOf(records.GaugeIds[gauge])
            let index = source.Times.IndexOf(records.Times.LabelAt(step))
            where column >= 0 && index is not null && source.StatusesAt(index.Value)[column] != RecordStatus.Missing
            select new EarlierValue(source, column, index.Value),
        ];

    private void RequireSameSteps()
    {
        if (Rain.Times.Step != More.Times.Step)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0532",
                    new Place(More.Source),
                    $"Steps differ: {Listing.Of(Rain.GaugeIds)} of {Rain.Source} have {Rain.Times.Step.ToSettingText()}, {Listing.Of(More.GaugeIds)} of {More.Source} have {More.Times.Step.ToSettingText()}.",
                    "Bring both to one step first: hours to days with .ToDays(endingAt: …), days to months with .ToMonths(). Days of different ending cannot be brought together. Where only one step says its clock (UTC…), give both the same utcOffset:."
                )
            );
        }
    }

    /// <summary>Rain that accumulates to the end of one record may be in the first value of the next, which then is no value of one step.</summary>
    private static void TellOfOpenEnds(StepContext context, RainRecords early, RainRecords late)
    {
        if (late.Times.IndexOf(early.Times.Step.After(early.Times.Last, 1)) is not { } next)
        {
            return;
        }

        var open = early
            .GaugeIds.Where((id, gauge) => IsOpenAtEnd(early, gauge) && Reports(late, id, next))
            .Select(id =>
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{id} {late.DepthsAt(next)[late.GaugeIds.IndexOf(id)]:0.###} mm"
                )
            )
            .ToArray();
        if (open.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0551",
                    new Place(early.Source),
                    $"Rain accumulated up to its last step, so the values of {late.Times.TextAt(next)} may be totals of several steps, yet they count for one: {Listing.Of(open)}.",
                    "Read the files as one (\"rain/*.csv\"), which settles such totals."
                )
            );
        }
    }

    private static bool IsOpenAtEnd(RainRecords rain, int gauge)
    {
        var last = rain.Times.Count - 1;
        return rain.StatusesAt(last)[gauge] == RecordStatus.Accumulated
            && !rain.Accumulations.Any(total => total.Gauge == gauge && total.LastStep == last);
    }

    private static bool Reports(RainRecords rain, string id, int step) =>
        rain.GaugeIds.IndexOf(id) is var gauge and >= 0 && rain.StatusesAt(step)[gauge].Reports();

    private Timeline Span()
    {
        var first = Rain.Times.First < More.Times.First ? Rain.Times.First : More.Times.First;
        var last = Rain.Times.Last > More.Times.Last ? Rain.Times.Last : More.Times.Last;
        return new Timeline(Rain.Times.Step, first, Rain.Times.Step.StepsBetween(first, last) + 1);
    }
}

/// <summary>The verb for <see cref="JoinRecordsStep"/>.</summary>
public static class JoinRecordsVerb
{
    /// <inheritdoc cref="JoinRecordsStep"/>
    /// <param name="rain">Gauge records.</param>
    /// <param name="more">Further records.</param>
    public static RainRecords And(this RainRecords rain, RainRecords more) => rain.Run(new JoinRecordsStep(rain, more));
}

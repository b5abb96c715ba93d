using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Records;

/// <summary>
/// Sums records over longer steps: minutes and hours to hours, observation days, months or years, days to months or years. Hours
/// are put into observation days exactly, by their intervals; a day belongs to the month that holds its date. A longer step in
/// which too few of the steps that it has by the calendar have a value is left without one.
/// </summary>
/// <param name="Rain">Gauge records.</param>
/// <param name="To">The longer steps.</param>
/// <param name="Complete">How many of the shorter steps must have a value.</param>
[Step("To longer steps", Word = "sum up")]
public sealed record ToLongerStepsStep(RainRecords Rain, TimeStep To, ICompletenessRule Complete)
    : Step<RainRecords>,
        IRecordStep
{
    /// <inheritdoc/>
    public override RainRecords Execute(StepContext context)
    {
        var fit = StepFit.Of(Rain, To);
        var target = fit.Timeline();
        var gauges = Rain.GaugeIds.Length;
        var (depths, statuses) = (new double[target.Count * gauges], new RecordStatus[target.Count * gauges]);
        var sums = new StepSums(Rain);
        var shorts = new int[gauges];
        for (var t = 0; t < target.Count; t++)
        {
            context.Cancellation.ThrowIfCancellationRequested();
            var (first, count, expected) = fit.StepsOf(target.LabelAt(t));
            for (var gauge = 0; gauge < gauges; gauge++)
            {
                var sum = sums.Over(gauge, first, count, expected);
                var enough = sum.Present > 0 && Complete.IsMetBy(sum.Present, expected);
                shorts[gauge] += enough && sum.Present < expected ? 1 : 0;
                depths[(t * gauges) + gauge] = enough ? sum.DepthMillimetres : 0;
                statuses[(t * gauges) + gauge] = enough ? sum.StatusGiven(expected) : sum.Lacking;
            }
        }

        TellOfShortSums(context, shorts);
        context.Assume(
            $"{Capital(To.ToSettingText())} are sums of {Rain.Times.Step.ToSettingText()}, of which {Complete.ToSettingText()} must have a value."
        );
        var records = new RainRecords(Rain.GaugeIds, target, depths, statuses, Rain.Source);
        context.State("values", records.StatusWords());
        return records;
    }

    /// <inheritdoc/>
    public ImmutableArray<ValueOrigin> OriginsOf(RainRecords records, int gauge, int step, StepContext context)
    {
        var (first, count, _) = StepFit.Of(Rain, To).StepsOf(records.Times.LabelAt(step));
        return [.. Enumerable.Range(first, count).Select(t => new EarlierValue(Rain, gauge, t))];
    }

    private void TellOfShortSums(StepContext context, int[] shorts)
    {
        var named = Rain
            .GaugeIds.Select((id, gauge) => (id, Count: shorts[gauge]))
            .Where(pair => pair.Count > 0)
            .Select(pair => string.Create(CultureInfo.InvariantCulture, $"{pair.id} {pair.Count}"))
            .ToArray();
        if (named.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0530",
                    new Place(Rain.Source),
                    $"Sums over {To.ToSettingText()} that leave out steps without a value may be too low; they are marked estimated: {Listing.Of(named)}.",
                    "Ask for complete: AtLeast.Percent(100) to leave them without a value."
                )
            );
        }
    }

    private static string Capital(string words) => char.ToUpperInvariant(words[0]) + words[1..];
}

/// <summary>The verbs for <see cref="ToLongerStepsStep"/>.</summary>
public static class ToLongerStepsVerbs
{
    /// <summary>Sums records of minutes or hours over longer hours.</summary>
    /// <param name="rain">Gauge records.</param>
    /// <param name="hours">1, 2, 3, 4, 6, 8 or 12.</param>
    /// <param name="complete">How many of the shorter steps must have a value; all of them where not given.</param>
    /// <example><code>var sixHours = rain.ToHours(6);</code></example>
    public static RainRecords ToHours(this RainRecords rain, int hours, ICompletenessRule? complete = null) =>
        Sum(rain, TimeStep.Hours(hours, rain.Times.Step.UtcOffsetText), complete);

    /// <summary>Sums records of minutes or hours over observation days, exactly by their intervals.</summary>
    /// <param name="rain">Gauge records.</param>
    /// <param name="endingAt"><c>00:00</c> to <c>24:00</c>, as in <c>TimeStep.Days</c>.</param>
    /// <param name="utcOffset">How far the clock of that time is ahead of UTC; the records' own clock where not given.</param>
    /// <param name="complete">How many of the shorter steps must have a value; all of them where not given.</param>
    /// <example><code>var daily = hourly.ToDays(endingAt: "09:00", complete: AtLeast.Steps(23));</code></example>
    public static RainRecords ToDays(
        this RainRecords rain,
        string endingAt,
        string? utcOffset = null,
        ICompletenessRule? complete = null
    ) => Sum(rain, TimeStep.Days(endingAt, utcOffset ?? rain.Times.Step.UtcOffsetText), complete);

    /// <summary>Sums records over calendar months; a day belongs to the month that holds its date.</summary>
    /// <param name="rain">Gauge records.</param>
    /// <param name="complete">How many of the shorter steps must have a value; all of them where not given.</param>
    /// <example><code>var monthly = daily.ToMonths(complete: AtLeast.Steps(28));</code></example>
    public static RainRecords ToMonths(this RainRecords rain, ICompletenessRule? complete = null) =>
        Sum(rain, TimeStep.Months, complete);

    /// <summary>Sums records over water years; a day belongs to the year that holds its date.</summary>
    /// <param name="rain">Gauge records.</param>
    /// <param name="firstMonth">The month that opens the water year, 1 to 12.</param>
    /// <param name="complete">How many of the shorter steps must have a value; all of them where not given.</param>
    /// <example><code>var yearly = daily.ToWaterYears(firstMonth: 10, complete: AtLeast.Percent(95));</code></example>
    public static RainRecords ToWaterYears(this RainRecords rain, int firstMonth, ICompletenessRule? complete = null) =>
        Sum(rain, TimeStep.WaterYears(firstMonth), complete);

    private static RainRecords Sum(RainRecords rain, TimeStep to, ICompletenessRule? complete) =>
        rain.Run(new ToLongerStepsStep(rain, to, complete ?? AtLeast.Percent(100)));
}

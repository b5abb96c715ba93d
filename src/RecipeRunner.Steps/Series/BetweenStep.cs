using NodaTime;
using NodaTime.Text;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Series;

/// <summary>Takes the steps of records from one date to another, both included. Dates are those that the file gives.</summary>
/// <param name="Rain">Gauge records.</param>
/// <param name="First">The first date, <c>2024-01-01</c>.</param>
/// <param name="Last">The last date, <c>2024-12-31</c>.</param>
/// <example><code>var january = rain.Between("2024-01-01", "2024-01-31");</code></example>
[Step("Between dates", Word = "between")]
public sealed record BetweenStep(RainRecords Rain, string First, string Last) : Step<RainRecords>
{
    /// <inheritdoc/>
    public override RainRecords Execute(StepContext context)
    {
        var (first, last) = (Date(First), Date(Last));
        var steps = Enumerable
            .Range(0, Rain.Labels.Length)
            .Where(t => Rain.Labels[t] >= first && Rain.Labels[t] <= last)
            .ToArray();
        if (steps.Length == 0)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0515",
                    new Place(Rain.Source),
                    $"There are no steps from {First} to {Last}.",
                    $"The records run from {Rain.Step.LabelText(Rain.Labels[0])} to {Rain.Step.LabelText(Rain.Labels[^1])}."
                )
            );
        }

        TellOfShortSpan(context, first, last);
        var gauges = Rain.GaugeIds.Length;
        var (depths, statuses) = (new double[steps.Length * gauges], new RecordStatus[steps.Length * gauges]);
        for (var i = 0; i < steps.Length; i++)
        {
            Rain.DepthsAt(steps[i]).CopyTo(depths.AsSpan(i * gauges));
            Rain.StatusesAt(steps[i]).CopyTo(statuses.AsSpan(i * gauges));
        }

        return new RainRecords(
            Rain.GaugeIds,
            Rain.Step,
            [.. steps.Select(t => Rain.Labels[t])],
            depths,
            statuses,
            Rain.Source
        );
    }

    private void TellOfShortSpan(StepContext context, LocalDate first, LocalDate last)
    {
        if (Rain.Labels[0] > first || Rain.Step.Next(Rain.Labels[^1]) <= last)
        {
            context.Find(
                Finding.Caution(
                    "RR0516",
                    new Place(Rain.Source),
                    $"The records do not reach from {First} to {Last}: they run from {Rain.Step.LabelText(Rain.Labels[0])} to {Rain.Step.LabelText(Rain.Labels[^1])}.",
                    "Sums over the span asked for would be too low."
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

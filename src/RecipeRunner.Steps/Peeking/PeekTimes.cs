using NodaTime;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading.Records;

namespace RecipeRunner.Steps.Peeking;

/// <summary>The times that stand in a file, and the step that they look like.</summary>
internal sealed class PeekTimes
{
    private const int MinutesOfDay = 1440;

    private readonly HashSet<LocalDateTime> times = [];
    private TimeDetail detail;

    /// <summary>Rows whose time cannot be read.</summary>
    public int Unreadable { get; private set; }

    /// <summary>The line of the first of them.</summary>
    public int FirstUnreadable { get; private set; }

    /// <summary>Takes in a time.</summary>
    public void Add(ReadOnlySpan<char> text, int line)
    {
        if (TimeText.TryRead(text, out var time))
        {
            times.Add(time.Time);
            detail = time.Detail > detail ? time.Detail : detail;
        }
        else if (Unreadable++ == 0)
        {
            FirstUnreadable = line;
        }
    }

    /// <summary>The steps from the first time to the last, and how a recipe says them; null where no step fits.</summary>
    public (Timeline Times, string Said)? Steps()
    {
        var ordered = times.Order().ToArray();
        if (ordered.Length == 0 || StepOf(ordered) is not { } step)
        {
            return null;
        }

        var (first, last) = (step.Step.LabelOf(ordered[0]), step.Step.LabelOf(ordered[^1]));
        return first is { } from && last is { } to
            ? (new Timeline(step.Step, from, step.Step.StepsBetween(from, to) + 1), step.Said)
            : null;
    }

    private (TimeStep Step, string Said)? StepOf(LocalDateTime[] ordered)
    {
        if (detail == TimeDetail.Year)
        {
            return (TimeStep.WaterYears(1), "TimeStep.WaterYears(firstMonth: …)");
        }

        var apart = UsualMinutes(ordered);
        if (
            detail == TimeDetail.Month
            || (detail == TimeDetail.Date && apart is >= 28 * MinutesOfDay and <= 31 * MinutesOfDay)
        )
        {
            return (TimeStep.Months, "TimeStep.Months");
        }

        return detail == TimeDetail.Date ? (TimeStep.Days("24:00"), "TimeStep.Days(endingAt: \"…\")")
            : apart % MinutesOfDay == 0 && Array.TrueForAll(ordered, time => time.TimeOfDay == ordered[0].TimeOfDay)
                ? Days(ordered[0])
            : Spans(ordered, apart);
    }

    private static (TimeStep Step, string Said) Days(LocalDateTime first)
    {
        var end = first.TimeOfDay.ToString("HH:mm", System.Globalization.CultureInfo.InvariantCulture);
        return (TimeStep.Days(end), $"TimeStep.Days(endingAt: \"{end}\")");
    }

    /// <summary>Steps of the usual length, or of the longest on which all times lie.</summary>
    private static (TimeStep Step, string Said)? Spans(LocalDateTime[] ordered, long usual)
    {
        var common = ordered.Aggregate(
            usual,
            (length, time) => Divisor(length, time.TimeOfDay.TickOfDay / NodaConstants.TicksPerMinute)
        );
        if (
            common <= 0
            || common >= MinutesOfDay
            || MinutesOfDay % common != 0
            || ordered.Any(time => time.Second != 0)
        )
        {
            return null;
        }

        var minutes = (int)common;
        return minutes % 60 == 0
            ? (TimeStep.Hours(minutes / 60), FormattableString.Invariant($"TimeStep.Hours({minutes / 60})"))
            : (TimeStep.Minutes(minutes), FormattableString.Invariant($"TimeStep.Minutes({minutes})"));
    }

    /// <summary>The most frequent distance of neighbouring times; a day where there is only one.</summary>
    private static long UsualMinutes(LocalDateTime[] ordered) =>
        ordered
            .Zip(ordered.Skip(1), (a, b) => Period.Between(a, b, PeriodUnits.Minutes).Minutes)
            .GroupBy(minutes => minutes)
            .OrderByDescending(group => group.Count())
            .ThenBy(group => group.Key)
            .Select(group => group.Key)
            .FirstOrDefault(MinutesOfDay);

    private static long Divisor(long a, long b) => b == 0 ? a : Divisor(b, a % b);
}

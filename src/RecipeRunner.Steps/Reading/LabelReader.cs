using NodaTime;
using NodaTime.Text;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading;

/// <summary>
/// Reads the label of a time step: <c>2024-01-31</c> for days, <c>2024-01</c> for months (ISO 8601), or the local date and
/// time at which an observation day ends. Midnight is refused for calendar days and months: it may mean either end.
/// </summary>
internal sealed class LabelReader(string file, TimeStep step)
{
    private static readonly LocalDatePattern Month = LocalDatePattern.CreateWithInvariantCulture("uuuu'-'MM");

    private static readonly LocalDateTimePattern[] Times =
    [
        LocalDateTimePattern.CreateWithInvariantCulture("uuuu'-'MM'-'dd'T'HH':'mm"),
        LocalDateTimePattern.CreateWithInvariantCulture("uuuu'-'MM'-'dd' 'HH':'mm"),
        LocalDateTimePattern.CreateWithInvariantCulture("uuuu'-'MM'-'dd'T'HH':'mm':'ss"),
        LocalDateTimePattern.CreateWithInvariantCulture("uuuu'-'MM'-'dd' 'HH':'mm':'ss"),
    ];

    private readonly bool months = step == TimeStep.Months;

    /// <summary>True where the text is a date or a date and time of any form that is read.</summary>
    public static bool LooksLikeTime(string text) =>
        LocalDatePattern.Iso.Parse(text).Success
        || Month.Parse(text).Success
        || Times.Any(pattern => pattern.Parse(text).Success);

    /// <summary>Reads a label.</summary>
    /// <param name="text">The text.</param>
    /// <param name="line">Its line.</param>
    /// <param name="column">Its column, from 1.</param>
    /// <param name="problems">Takes what is wrong.</param>
    /// <returns>The label; null where wrong.</returns>
    public LocalDate? Read(string text, int line, int column, Problems problems)
    {
        if (
            LocalDatePattern.Iso.Parse(text).TryGetValue(default, out var date)
            || (months && Month.Parse(text).TryGetValue(default, out date))
        )
        {
            return months ? date.With(DateAdjusters.StartOfMonth) : date;
        }

        var place = new Place(file, line, column);
        foreach (var pattern in Times)
        {
            if (pattern.Parse(text).TryGetValue(default, out var time))
            {
                return EndingAt(time, text, place, problems);
            }
        }

        var expected = months ? "2024-01" : "2024-01-31";
        problems.Add(
            "RR0252",
            place,
            $"'{text}' is not a time of the form {expected}.",
            "Write dates as year-month-day (ISO 8601)."
        );
        return null;
    }

    private LocalDate? EndingAt(LocalDateTime time, string text, Place place, Problems problems)
    {
        if (!months && step.IntervalOf(time.Date).End == time)
        {
            return time.Date;
        }

        var atMidnight = time.TimeOfDay == LocalTime.Midnight;
        problems.Add(
            "RR0253",
            place,
            atMidnight
                ? $"'{text}' may mean the start or the end of a step of {step.ToSettingText()}."
                : $"'{text}' is not the end of a step of {step.ToSettingText()}.",
            atMidnight
                ? "Write the date alone (2024-01-31) where it names the day or month; where days end at midnight and are dated by the morning, read with TimeStep.Days(endingAt: \"00:00\")."
                : "Give the step that the file has, such as TimeStep.Days(endingAt: \"07:00\")."
        );
        return null;
    }
}

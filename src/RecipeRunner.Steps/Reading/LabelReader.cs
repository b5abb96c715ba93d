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
    public LocalDateTime? Read(string text, int line, int column, Problems problems)
    {
        if (
            step.LabelsAreDates
            && (
                LocalDatePattern.Iso.Parse(text).TryGetValue(default, out var date)
                || (step == TimeStep.Months && Month.Parse(text).TryGetValue(default, out date))
            )
        )
        {
            return step.LabelOf(date.AtMidnight());
        }

        var place = new Place(file, line, column);
        foreach (var pattern in Times)
        {
            if (pattern.Parse(text).TryGetValue(default, out var time))
            {
                return Named(time, text, place, problems);
            }
        }

        var expected = step.LabelText(step.LabelOf(new LocalDateTime(2024, 1, 31, 0, 0))!.Value);
        problems.Add(
            "RR0252",
            place,
            $"'{text}' is not a time of the form {expected}.",
            "Write dates as year-month-day, with hours and minutes where steps are shorter than a day (ISO 8601)."
        );
        return null;
    }

    private LocalDateTime? Named(LocalDateTime time, string text, Place place, Problems problems)
    {
        var label = step.LabelsAreDates ? step.LabelOf(time.Date.AtMidnight()) : step.LabelOf(time);
        var midnight = time.TimeOfDay == LocalTime.Midnight;
        if (
            label is { } known
            && (!step.LabelsAreDates || (step != TimeStep.Months && step.IntervalOf(known).End == time))
        )
        {
            return known;
        }

        var mayBeEither = midnight && step.LabelsAreDates;
        problems.Add(
            "RR0253",
            place,
            mayBeEither
                ? $"'{text}' may mean the start or the end of a step of {step.ToSettingText()}."
                : $"'{text}' is not the end of a step of {step.ToSettingText()}.",
            mayBeEither
                ? "Write the date alone (2024-01-31) where it names the day or month; where days end at midnight and are dated by the morning, read with TimeStep.Days(endingAt: \"00:00\")."
                : "Give the step that the file has, such as TimeStep.Days(endingAt: \"07:00\")."
        );
        return null;
    }
}

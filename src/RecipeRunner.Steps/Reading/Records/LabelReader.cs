using NodaTime;
using NodaTime.Text;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>
/// Reads the label of a time step from a time as a file writes it: a date for days, a month or a year for those, a date and
/// time for hours, minutes, and the end of an observation day. Midnight written 00:00 is refused where it may mean either end
/// of a day; so is a clock with another offset from UTC than the step declares.
/// </summary>
internal sealed class LabelReader(string file, TimeStep step)
{
    private static readonly LocalDateTime Example = new(2024, 1, 31, 0, 0);

    private readonly string expected = step.LabelText(step.LabelOf(Example)!.Value);

    /// <summary>True where the text is a date, month or time of any form that is read; a year only where steps are years.</summary>
    public bool LooksLikeTime(ReadOnlySpan<char> text) =>
        TimeText.TryRead(text, out var time) && (time.Detail != TimeDetail.Year || IsYears);

    private bool IsYears => expected.Length == "2024".Length;

    private bool IsDays => expected.Length == "2024-01-31".Length;

    /// <summary>Reads a label.</summary>
    /// <param name="text">The text, without blanks around it.</param>
    /// <param name="line">Its line.</param>
    /// <param name="column">Its column, from 1.</param>
    /// <param name="problems">Takes what is wrong.</param>
    /// <returns>The label; null where wrong.</returns>
    public LocalDateTime? Read(ReadOnlySpan<char> text, int line, int column, Problems problems)
    {
        if (!TimeText.TryRead(text, out var time) || !Fits(time.Detail))
        {
            problems.Add(
                "RR0252",
                new Place(file, line, column),
                $"'{text}' is not a time of the form {expected}.",
                "Write dates as year-month-day, with hours and minutes where steps are shorter than a day (ISO 8601)."
            );
            return null;
        }

        if (time.Offset is { } offset && offset != step.UtcOffset)
        {
            problems.Add("RR0276", new Place(file, line, column), ClockWords(text, offset), ClockMend(offset));
            return null;
        }

        var label = time.Detail == TimeDetail.Time ? LabelOfTime(time) : step.LabelOf(time.Time);
        if (label is null)
        {
            AddNoLabel(text, time, new Place(file, line, column), problems);
        }

        return label;
    }

    private bool Fits(TimeDetail detail) =>
        detail switch
        {
            TimeDetail.Year => IsYears,
            TimeDetail.Month => step == TimeStep.Months,
            TimeDetail.Date => step.LabelsAreDates,
            _ => true,
        };

    private LocalDateTime? LabelOfTime(TimeText time)
    {
        if (!step.LabelsAreDates)
        {
            return step.LabelOf(time.Time);
        }

        var onDate = step.LabelOf(time.Time.Date.AtMidnight())!.Value;
        if (!IsDays)
        {
            return null;
        }

        if (step.IntervalOf(onDate).End == time.Time)
        {
            return onDate;
        }

        var before = step.After(onDate, -1);
        return time.IsEndOfDay && step.IntervalOf(before).End == time.Time ? before : null;
    }

    private void AddNoLabel(ReadOnlySpan<char> text, TimeText time, Place place, Problems problems)
    {
        var mayBeEither = step.LabelsAreDates && time.Time.TimeOfDay == LocalTime.Midnight;
        problems.Add(
            "RR0253",
            place,
            mayBeEither ? $"'{text}' may mean the start or the end of a step of {step.ToSettingText()}."
                : step.LabelsAreDates ? $"'{text}' is not the end of a step of {step.ToSettingText()}."
                : $"'{text}' does not lie on {step.ToSettingText()}, which are counted from midnight.",
            mayBeEither
                    ? "Write the date alone (2024-01-31) where it names the day or month; where days end at midnight and are dated by the morning, read with TimeStep.Days(endingAt: \"00:00\")."
                : step.LabelsAreDates ? "Give the step that the file has, such as TimeStep.Days(endingAt: \"07:00\")."
                : "Give the step that the file has, such as TimeStep.Minutes(5); times between steps cannot be placed."
        );
    }

    private string ClockWords(ReadOnlySpan<char> text, Offset offset) =>
        step.UtcOffset is { } declared
            ? $"'{text}' is by a clock at {Words(offset)}; the step is declared at {Words(declared)}."
            : $"'{text}' is by a clock at {Words(offset)}; the step does not say its clock.";

    private string ClockMend(Offset offset) =>
        step.UtcOffset is null
            ? $"Add   utcOffset: \"{OffsetPattern.CreateWithInvariantCulture("+HH:mm").Format(offset)}\"   to the step."
            : "A record has one clock all year: write all its times at one offset, without summer time.";

    private static string Words(Offset offset) =>
        $"UTC{OffsetPattern.CreateWithInvariantCulture("+HH:mm").Format(offset)}";
}

using NodaTime;
using NodaTime.Text;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Time;

/// <summary>
/// The steps of a record, each an interval of local time that is open at its start and closed at its end, (start, end],
/// and named by a label under which the record's file lists it: a date for days, months and years, a time for hours and
/// minutes. Steps of two conventions are never equal, so they cannot be mixed unseen.
/// </summary>
public abstract record TimeStep : ISettingValue
{
    private static readonly LocalTimePattern TimePattern = LocalTimePattern.CreateWithInvariantCulture("HH:mm");
    private static readonly OffsetPattern OffsetText = OffsetPattern.CreateWithInvariantCulture("+HH:mm");

    private protected TimeStep(Offset? utcOffset) => UtcOffset = utcOffset;

    /// <summary>Calendar months, from midnight to midnight.</summary>
    public static TimeStep Months { get; } = new MonthSteps(1, MonthsLong: 1);

    /// <summary>How far the clock of the record is ahead of UTC; null where it is not said.</summary>
    public Offset? UtcOffset { get; }

    /// <summary>That offset as settings write it, such as <c>+01:00</c>; null where it is not said.</summary>
    public string? UtcOffsetText => UtcOffset is { } offset ? OffsetText.Format(offset) : null;

    /// <summary>True where a label is a date, false where it is a date and time.</summary>
    public abstract bool LabelsAreDates { get; }

    /// <summary>
    /// Observation days. A total dated D covers the 24 hours that end on D at the given time; <c>24:00</c> means the
    /// calendar day D itself.
    /// </summary>
    /// <param name="endingAt"><c>00:00</c> to <c>24:00</c>.</param>
    /// <param name="utcOffset">How far that clock is ahead of UTC, such as <c>+01:00</c>, where it is known.</param>
    /// <exception cref="RefusedException">The time or offset is not of that form.</exception>
    public static TimeStep Days(string endingAt, string? utcOffset = null) =>
        string.Equals(endingAt, "24:00", StringComparison.Ordinal)
            ? new DaySteps(LocalTime.Midnight, EndsOnNextDate: true, OffsetOf(utcOffset))
            : new DaySteps(TimeOf(endingAt), EndsOnNextDate: false, OffsetOf(utcOffset));

    /// <summary>Hours, labelled by the time at which they end, or start.</summary>
    /// <param name="hours">1, 2, 3, 4, 6, 8 or 12: whole parts of a day, counted from midnight.</param>
    /// <param name="utcOffset">How far the clock is ahead of UTC, such as <c>+01:00</c>, where it is known.</param>
    /// <param name="datedByStart">True where the file lists a step under the time at which it starts.</param>
    /// <exception cref="RefusedException">The number or offset is not of that form.</exception>
    public static TimeStep Hours(int hours = 1, string? utcOffset = null, bool datedByStart = false) =>
        SpanSteps.Of(hours, 60, OffsetOf(utcOffset), datedByStart);

    /// <summary>Minutes, labelled by the time at which they end, or start.</summary>
    /// <param name="minutes">A whole part of a day, such as 5, 10, 15 or 30, counted from midnight.</param>
    /// <param name="utcOffset">How far the clock is ahead of UTC, such as <c>+01:00</c>, where it is known.</param>
    /// <param name="datedByStart">True where the file lists a step under the time at which it starts.</param>
    /// <exception cref="RefusedException">The number or offset is not of that form.</exception>
    public static TimeStep Minutes(int minutes, string? utcOffset = null, bool datedByStart = false) =>
        SpanSteps.Of(minutes, 1, OffsetOf(utcOffset), datedByStart);

    /// <summary>Water years, from midnight to midnight, labelled by the calendar year in which they end.</summary>
    /// <param name="firstMonth">The month that opens the water year, 1 to 12.</param>
    /// <exception cref="RefusedException">The month is not 1 to 12.</exception>
    public static TimeStep WaterYears(int firstMonth) =>
        new MonthSteps(Every.MonthOrRefuse(firstMonth, "TimeStep.WaterYears(firstMonth: 10)"), MonthsLong: 12);

    /// <summary>The interval that a label names.</summary>
    /// <param name="label">A label of this step.</param>
    public abstract RainInterval IntervalOf(LocalDateTime label);

    /// <summary>The label some steps after another; before it where negative.</summary>
    /// <param name="label">A label of this step.</param>
    /// <param name="steps">How many.</param>
    public abstract LocalDateTime After(LocalDateTime label, int steps);

    /// <summary>How many steps lie from one label to another; negative where the second is earlier.</summary>
    /// <param name="first">A label of this step.</param>
    /// <param name="second">A label of this step.</param>
    public abstract int StepsBetween(LocalDateTime first, LocalDateTime second);

    /// <summary>The label of the step that a date and time names: the step itself, or the one whose dates hold it.</summary>
    /// <param name="time">Any time; a date is its midnight.</param>
    /// <returns>The label; null where no step has that name, such as 09:05 among quarters of an hour.</returns>
    public abstract LocalDateTime? LabelOf(LocalDateTime time);

    /// <summary>The date to which a step belongs when steps are summed over months or years.</summary>
    /// <param name="label">A label of this step.</param>
    public abstract LocalDate DateOf(LocalDateTime label);

    /// <summary>The label as a record's file or a table writes it.</summary>
    /// <param name="label">A label of this step.</param>
    public abstract string LabelText(LocalDateTime label);

    /// <summary>The step in words, such as <c>days ending 09:00</c>.</summary>
    public abstract string ToSettingText();

    /// <summary>A number of steps in words, such as <c>1 day ending 09:00</c>, <c>24 hours</c>.</summary>
    /// <param name="count">How many.</param>
    public string Words(int count)
    {
        var many = ToSettingText();
        return Counted.Of(count, many.Remove($"{many} ".IndexOf("s ", StringComparison.Ordinal), 1), many);
    }

    /// <inheritdoc/>
    public sealed override string ToString() => ToSettingText();

    /// <summary>A time of day as settings write it.</summary>
    private protected static string Text(LocalTime time) => TimePattern.Format(time);

    /// <summary>What follows a step's words where the offset of its clock is known.</summary>
    private protected string OffsetWords => UtcOffsetText is { } offset ? $" at UTC{offset}" : "";

    private static LocalTime TimeOf(string text) =>
        TimePattern.Parse(text).TryGetValue(default, out var time)
            ? time
            : throw new RefusedException(
                Finding.Error(
                    "RR0501",
                    Place.Of("time step"),
                    $"'{text}' is not a time of day from 00:00 to 24:00.",
                    "Write hours and minutes, such as TimeStep.Days(endingAt: \"09:00\"); \"24:00\" is the calendar day."
                )
            );

    private static Offset? OffsetOf(string? text) =>
        text is null ? null
        : OffsetText.Parse(text).TryGetValue(default, out var offset) ? offset
        : throw new RefusedException(
            Finding.Error(
                "RR0520",
                Place.Of("time step"),
                $"'{text}' is not an offset from UTC.",
                "Write sign, hours and minutes, such as utcOffset: \"+01:00\" or \"-05:30\"."
            )
        );
}

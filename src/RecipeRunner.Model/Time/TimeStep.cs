using System.Globalization;
using NodaTime;
using NodaTime.Text;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Time;

/// <summary>
/// The steps of a record, each an interval of local time that is open at its start and closed at its end, (start, end],
/// and named by a date: the label under which the record's file lists it.
/// </summary>
public abstract record TimeStep : ISettingValue
{
    private static readonly LocalTimePattern Pattern = LocalTimePattern.CreateWithInvariantCulture("HH:mm");

    /// <summary>Calendar months, from midnight to midnight.</summary>
    public static TimeStep Months { get; } = new MonthStep();

    /// <summary>
    /// Observation days. A total dated D covers the 24 hours that end on D at the given time; <c>24:00</c> means the
    /// calendar day D itself.
    /// </summary>
    /// <param name="endingAt"><c>00:00</c> to <c>24:00</c>.</param>
    /// <exception cref="RefusedException">The time is not of that form.</exception>
    public static TimeStep Days(string endingAt)
    {
        if (string.Equals(endingAt, "24:00", StringComparison.Ordinal))
        {
            return new DayStep(LocalTime.Midnight, EndsOnNextDate: true);
        }

        return Pattern.Parse(endingAt).TryGetValue(default, out var time)
            ? new DayStep(time, EndsOnNextDate: false)
            : throw new RefusedException(
                Finding.Error(
                    "RR0501",
                    Place.Of("time step"),
                    $"'{endingAt}' is not a time of day from 00:00 to 24:00.",
                    "Write hours and minutes, such as TimeStep.Days(endingAt: \"09:00\"); \"24:00\" is the calendar day."
                )
            );
    }

    /// <summary>The interval that a label names.</summary>
    /// <param name="label">A date; for months any date of the month.</param>
    public abstract RainInterval IntervalOf(LocalDate label);

    /// <summary>The label of the step that follows.</summary>
    /// <param name="label">A label of this step.</param>
    public abstract LocalDate Next(LocalDate label);

    /// <summary>The label as a record's file or a table writes it.</summary>
    public abstract string LabelText(LocalDate label);

    /// <summary>The step in words, such as <c>days ending 09:00</c>.</summary>
    public abstract string ToSettingText();

    /// <inheritdoc/>
    public sealed override string ToString() => ToSettingText();

    private sealed record DayStep(LocalTime EndingAt, bool EndsOnNextDate) : TimeStep
    {
        public override RainInterval IntervalOf(LocalDate label)
        {
            var end = (EndsOnNextDate ? label.PlusDays(1) : label) + EndingAt;
            return new RainInterval(end.PlusDays(-1), end);
        }

        public override LocalDate Next(LocalDate label) => label.PlusDays(1);

        public override string LabelText(LocalDate label) => LocalDatePattern.Iso.Format(label);

        public override string ToSettingText() =>
            EndsOnNextDate ? "days ending 24:00" : $"days ending {Pattern.Format(EndingAt)}";
    }

    private sealed record MonthStep : TimeStep
    {
        public override RainInterval IntervalOf(LocalDate label)
        {
            var first = label.With(DateAdjusters.StartOfMonth);
            return new RainInterval(first.AtMidnight(), first.PlusMonths(1).AtMidnight());
        }

        public override LocalDate Next(LocalDate label) => label.With(DateAdjusters.StartOfMonth).PlusMonths(1);

        public override string LabelText(LocalDate label) =>
            string.Create(CultureInfo.InvariantCulture, $"{label.Year:0000}-{label.Month:00}");

        public override string ToSettingText() => "months";
    }
}

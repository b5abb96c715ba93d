using System.Globalization;
using NodaTime;
using NodaTime.Text;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Time;

/// <summary>
/// A longer stretch into which steps are summed. A step belongs to the period that holds its label: the rain dated
/// 1 October belongs to October, whatever the hour at which its observation day ends (common practice, no source).
/// </summary>
public abstract record Every : ISettingValue
{
    /// <summary>Everything that the record holds, as one.</summary>
    public static Every WholeRecord { get; } = new WholePeriod();

    /// <summary>Calendar months.</summary>
    public static Every Month { get; } = new YearPeriod(1, "months", MonthsLong: 1);

    /// <summary>Calendar years.</summary>
    public static Every CalendarYear { get; } = new YearPeriod(1, "calendar years", MonthsLong: 12);

    /// <summary>Water years, each named by the calendar year in which it ends.</summary>
    /// <param name="firstMonth">The month that opens the water year, 1 to 12.</param>
    /// <exception cref="RefusedException">The month is not 1 to 12.</exception>
    public static Every WaterYear(int firstMonth) =>
        firstMonth is >= 1 and <= 12
            ? new YearPeriod(
                firstMonth,
                string.Create(CultureInfo.InvariantCulture, $"water years from month {firstMonth}"),
                MonthsLong: 12
            )
            : throw new RefusedException(
                Finding.Error(
                    "RR0502",
                    Place.Of("period"),
                    string.Create(CultureInfo.InvariantCulture, $"A water year cannot start in month {firstMonth}."),
                    "Give a month from 1 to 12, such as Every.WaterYear(firstMonth: 10)."
                )
            );

    /// <summary>The first date of the period that holds a date.</summary>
    /// <param name="date">A label.</param>
    /// <param name="recordStart">The first label of the record, which opens the whole.</param>
    public abstract LocalDate StartOf(LocalDate date, LocalDate recordStart);

    /// <summary>The first date after the period that starts on a date.</summary>
    /// <param name="start">The first date of a period.</param>
    /// <param name="recordEnd">The first label after the record, which closes the whole.</param>
    public abstract LocalDate EndOf(LocalDate start, LocalDate recordEnd);

    /// <summary>The name of the period that starts on a date, such as <c>2024-01</c> or <c>2024</c>.</summary>
    public abstract string NameOf(LocalDate start);

    /// <inheritdoc/>
    public abstract string ToSettingText();

    /// <inheritdoc/>
    public sealed override string ToString() => ToSettingText();

    private sealed record WholePeriod : Every
    {
        public override LocalDate StartOf(LocalDate date, LocalDate recordStart) => recordStart;

        public override LocalDate EndOf(LocalDate start, LocalDate recordEnd) => recordEnd;

        public override string NameOf(LocalDate start) => "whole record";

        public override string ToSettingText() => "the whole record";
    }

    private sealed record YearPeriod(int FirstMonth, string Text, int MonthsLong) : Every
    {
        public override LocalDate StartOf(LocalDate date, LocalDate recordStart)
        {
            var into = (date.Month - FirstMonth + 12) % MonthsLong;
            return date.With(DateAdjusters.StartOfMonth).PlusMonths(-into);
        }

        public override LocalDate EndOf(LocalDate start, LocalDate recordEnd) => start.PlusMonths(MonthsLong);

        public override string NameOf(LocalDate start)
        {
            var last = start.PlusMonths(MonthsLong).PlusDays(-1);
            return MonthsLong == 1
                ? LocalDatePattern.CreateWithInvariantCulture("uuuu'-'MM").Format(start)
                : string.Create(CultureInfo.InvariantCulture, $"{last.Year:0000}");
        }

        public override string ToSettingText() => Text;
    }
}

using System.Globalization;
using NodaTime;
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

    /// <summary>
    /// Seasons of three months, from December: <c>DJF</c>, <c>MAM</c>, <c>JJA</c>, <c>SON</c>, each named with the calendar
    /// year in which it ends (the usual division of climatology; common practice, no source).
    /// </summary>
    public static Every Season { get; } = new YearPeriod(12, "seasons", MonthsLong: 3);

    /// <summary>Water years, each named by the calendar year in which it ends.</summary>
    /// <param name="firstMonth">The month that opens the water year, 1 to 12.</param>
    /// <exception cref="RefusedException">The month is not 1 to 12.</exception>
    public static Every WaterYear(int firstMonth) =>
        new YearPeriod(
            MonthOrRefuse(firstMonth, "Every.WaterYear(firstMonth: 10)"),
            string.Create(CultureInfo.InvariantCulture, $"water years from month {firstMonth}"),
            MonthsLong: 12
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

    /// <summary>What the periods that recur each year share, such as <c>DJF</c>, <c>07</c>; the name itself for longer ones.</summary>
    /// <param name="start">The first date of a period.</param>
    public abstract string PartOfYear(LocalDate start);

    /// <inheritdoc/>
    public abstract string ToSettingText();

    /// <inheritdoc/>
    public sealed override string ToString() => ToSettingText();

    /// <summary>A month, or a refusal that shows how to write it.</summary>
    internal static int MonthOrRefuse(int month, string example) =>
        month is >= 1 and <= 12
            ? month
            : throw new RefusedException(
                Finding.Error(
                    "RR0502",
                    Place.Of("period"),
                    string.Create(CultureInfo.InvariantCulture, $"A water year cannot start in month {month}."),
                    $"Give a month from 1 to 12, such as {example}."
                )
            );

    private sealed record WholePeriod : Every
    {
        public override LocalDate StartOf(LocalDate date, LocalDate recordStart) => recordStart;

        public override LocalDate EndOf(LocalDate start, LocalDate recordEnd) => recordEnd;

        public override string NameOf(LocalDate start) => "whole record";

        public override string PartOfYear(LocalDate start) => NameOf(start);

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
            var last = start.PlusMonths(MonthsLong - 1);
            var year = string.Create(CultureInfo.InvariantCulture, $"{last.Year:0000}");
            return MonthsLong == 12 ? year : $"{year}-{PartOfYear(start)}";
        }

        public override string PartOfYear(LocalDate start) =>
            MonthsLong switch
            {
                1 => string.Create(CultureInfo.InvariantCulture, $"{start.Month:00}"),
                3 => string.Concat(Enumerable.Range(0, 3).Select(m => "JFMAMJJASOND"[(start.Month - 1 + m) % 12])),
                _ => "year",
            };

        public override string ToSettingText() => Text;
    }
}

using System.Globalization;
using NodaTime;

namespace RecipeRunner.Model.Time;

/// <summary>Calendar months or water years; a label is the first date at midnight.</summary>
internal sealed record MonthSteps(int FirstMonth, int MonthsLong) : TimeStep((Offset?)null)
{
    /// <inheritdoc/>
    public override bool LabelsAreDates => true;

    /// <inheritdoc/>
    public override RainInterval IntervalOf(LocalDateTime label) => new(label, After(label, 1));

    /// <inheritdoc/>
    public override LocalDateTime After(LocalDateTime label, int steps) => label.PlusMonths(steps * MonthsLong);

    /// <inheritdoc/>
    public override int StepsBetween(LocalDateTime first, LocalDateTime second) =>
        Period.Between(first.Date, second.Date, PeriodUnits.Months).Months / MonthsLong;

    /// <inheritdoc/>
    public override LocalDateTime? LabelOf(LocalDateTime time)
    {
        var into = (time.Month - FirstMonth + 12) % MonthsLong;
        return time.Date.With(DateAdjusters.StartOfMonth).PlusMonths(-into).AtMidnight();
    }

    /// <inheritdoc/>
    public override LocalDate DateOf(LocalDateTime label) => label.Date;

    /// <inheritdoc/>
    public override string LabelText(LocalDateTime label)
    {
        var last = label.Date.PlusMonths(MonthsLong - 1);
        return MonthsLong == 1
            ? string.Create(CultureInfo.InvariantCulture, $"{last.Year:0000}-{last.Month:00}")
            : string.Create(CultureInfo.InvariantCulture, $"{last.Year:0000}");
    }

    /// <inheritdoc/>
    public override string ToSettingText() =>
        MonthsLong == 1
            ? "months"
            : string.Create(CultureInfo.InvariantCulture, $"water years from month {FirstMonth}");
}

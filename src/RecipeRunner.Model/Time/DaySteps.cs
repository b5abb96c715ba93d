using NodaTime;
using NodaTime.Text;

namespace RecipeRunner.Model.Time;

/// <summary>Observation days; a label is the date at midnight.</summary>
internal sealed record DaySteps(LocalTime EndingAt, bool EndsOnNextDate, Offset? Clock) : TimeStep(Clock)
{
    /// <inheritdoc/>
    public override bool LabelsAreDates => true;

    /// <inheritdoc/>
    public override RainInterval IntervalOf(LocalDateTime label)
    {
        var end = (EndsOnNextDate ? label.Date.PlusDays(1) : label.Date) + EndingAt;
        return new RainInterval(end.PlusDays(-1), end);
    }

    /// <inheritdoc/>
    public override LocalDateTime After(LocalDateTime label, int steps) => label.PlusDays(steps);

    /// <inheritdoc/>
    public override int StepsBetween(LocalDateTime first, LocalDateTime second) =>
        Period.DaysBetween(first.Date, second.Date);

    /// <inheritdoc/>
    public override LocalDateTime? LabelOf(LocalDateTime time) => time.Date.AtMidnight();

    /// <inheritdoc/>
    public override LocalDate DateOf(LocalDateTime label) => label.Date;

    /// <inheritdoc/>
    public override string LabelText(LocalDateTime label) => LocalDatePattern.Iso.Format(label.Date);

    /// <inheritdoc/>
    public override string ToSettingText() => $"days ending {(EndsOnNextDate ? "24:00" : Text(EndingAt))}{OffsetWords}";
}

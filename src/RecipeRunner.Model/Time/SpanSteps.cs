using System.Globalization;
using NodaTime;
using NodaTime.Text;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Time;

/// <summary>Steps of some minutes that divide the day, counted from midnight; a label is a time.</summary>
internal sealed record SpanSteps(int MinutesLong, bool DatedByStart, Offset? Clock) : TimeStep(Clock)
{
    private const int MinutesOfDay = 1440;

    private static readonly LocalDateTimePattern Pattern = LocalDateTimePattern.CreateWithInvariantCulture(
        "uuuu'-'MM'-'dd'T'HH':'mm"
    );

    /// <inheritdoc/>
    public override bool LabelsAreDates => false;

    /// <summary>Steps of a number of units.</summary>
    /// <exception cref="RefusedException">They do not divide the day, or are the whole of it.</exception>
    public static SpanSteps Of(int count, int minutesEach, Offset? clock, bool datedByStart) =>
        count >= 1 && count < MinutesOfDay / minutesEach && MinutesOfDay % (count * minutesEach) == 0
            ? new SpanSteps(count * minutesEach, datedByStart, clock)
            : throw new RefusedException(
                Finding.Error(
                    "RR0521",
                    Place.Of("time step"),
                    FormattableString.Invariant(
                        $"A step of {count} {(minutesEach == 1 ? "minutes" : "hours")} does not divide the day."
                    ),
                    "Give a whole part of 24 hours, such as TimeStep.Minutes(15) or TimeStep.Hours(1); days are TimeStep.Days(endingAt: …)."
                )
            );

    /// <inheritdoc/>
    public override RainInterval IntervalOf(LocalDateTime label) =>
        DatedByStart
            ? new RainInterval(label, label.PlusMinutes(MinutesLong))
            : new RainInterval(label.PlusMinutes(-MinutesLong), label);

    /// <inheritdoc/>
    public override LocalDateTime After(LocalDateTime label, int steps) => label.PlusMinutes((long)steps * MinutesLong);

    /// <inheritdoc/>
    public override int StepsBetween(LocalDateTime first, LocalDateTime second) =>
        (int)(Period.Between(first, second, PeriodUnits.Minutes).Minutes / MinutesLong);

    /// <inheritdoc/>
    public override LocalDateTime? LabelOf(LocalDateTime time) =>
        time.TimeOfDay.TickOfDay % (MinutesLong * NodaConstants.TicksPerMinute) == 0 ? time : null;

    /// <inheritdoc/>
    public override LocalDate DateOf(LocalDateTime label) => IntervalOf(label).Start.Date;

    /// <inheritdoc/>
    public override string LabelText(LocalDateTime label) => Pattern.Format(label);

    /// <inheritdoc/>
    public override string ToSettingText()
    {
        var length =
            MinutesLong % 60 != 0 ? string.Create(CultureInfo.InvariantCulture, $"steps of {MinutesLong} minutes")
            : MinutesLong == 60 ? "hours"
            : string.Create(CultureInfo.InvariantCulture, $"steps of {MinutesLong / 60} hours");
        return $"{length}{(DatedByStart ? " dated by their start" : "")}{OffsetWords}";
    }
}

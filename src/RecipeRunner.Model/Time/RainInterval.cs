using NodaTime;
using NodaTime.Text;

namespace RecipeRunner.Model.Time;

/// <summary>The time over which a depth of rain fell: after the start, up to and including the end.</summary>
/// <param name="Start">Local time, not included.</param>
/// <param name="End">Local time, included.</param>
public readonly record struct RainInterval(LocalDateTime Start, LocalDateTime End)
{
    private static readonly LocalDateTimePattern Pattern = LocalDateTimePattern.CreateWithInvariantCulture(
        "uuuu'-'MM'-'dd'T'HH':'mm"
    );

    /// <summary>The start as tables write it, such as <c>2024-01-13T09:00</c>.</summary>
    public string StartText => Pattern.Format(Start);

    /// <summary>The end as tables write it.</summary>
    public string EndText => Pattern.Format(End);

    /// <summary>How long it is.</summary>
    public double Hours => Period.Between(Start, End, PeriodUnits.Minutes).Minutes / 60.0;
}

using System.Globalization;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Reading.Ghcn;

/// <summary>The times of day at which gauges were read, and which of them are not that at which the declared days end.</summary>
internal sealed class ObservationTimes
{
    private readonly Dictionary<string, Dictionary<string, int>> byGauge = new(StringComparer.Ordinal);

    /// <summary>Takes a time in.</summary>
    /// <param name="id">The gauge.</param>
    /// <param name="time">Hours and minutes, such as <c>0700</c>.</param>
    public void Add(ReadOnlySpan<char> id, ReadOnlySpan<char> time)
    {
        var gauges = byGauge.GetAlternateLookup<ReadOnlySpan<char>>();
        if (!gauges.TryGetValue(id, out var counts))
        {
            gauges[id] = counts = new Dictionary<string, int>(StringComparer.Ordinal);
        }

        var times = counts.GetAlternateLookup<ReadOnlySpan<char>>();
        times[time] = times.TryGetValue(time, out var count) ? count + 1 : 1;
    }

    /// <summary>Points out the gauges that were read at other times than the declared step ends.</summary>
    public void Tell(StepContext context, string source, TimeStep step)
    {
        var midnight = new NodaTime.LocalDateTime(2024, 1, 31, 0, 0);
        var end = step.IntervalOf(midnight).End;
        var declared = string.Create(CultureInfo.InvariantCulture, $"{end.Hour:00}{end.Minute:00}");
        var others = byGauge
            .OrderBy(pair => pair.Key, StringComparer.Ordinal)
            .Select(pair => (pair.Key, Times: pair.Value.Where(time => !IsDeclared(time.Key, declared)).ToArray()))
            .Where(pair => pair.Times.Length > 0)
            .Select(pair =>
                $"{pair.Key} {string.Join("/", pair.Times.OrderByDescending(time => time.Value).ThenBy(time => time.Key, StringComparer.Ordinal).Select(time => time.Key))}"
            )
            .ToArray();
        if (others.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0280",
                    new Place(source),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"Of {byGauge.Count:N0} gauges with a time of observation, {others.Length:N0} were also read at other times than {step.ToSettingText()} says: {Listing.Of(others)}."
                    ),
                    "Rain of one storm stands on different dates at such gauges. Read gauges of one time together, or take the difference for granted."
                )
            );
        }
    }

    private static bool IsDeclared(string time, string declared) =>
        string.Equals(time, declared, StringComparison.Ordinal)
        || (declared is "0000" && time is "2400")
        || (declared is "2400" && time is "0000");
}

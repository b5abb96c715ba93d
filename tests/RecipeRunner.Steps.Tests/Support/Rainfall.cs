using System.Collections.Immutable;
using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Steps.Tests.Support;

/// <summary>Records and areal series made by hand for tests.</summary>
public static class Rainfall
{
    public static TimeStep Daily { get; } = TimeStep.Days(endingAt: "09:00");

    /// <summary>Records of gauges, each written as its steps: a depth, or <c>.</c> missing, <c>T</c> trace, <c>e5</c> estimated,
    /// <c>x5</c> failed, <c>a</c> part of a total, <c>a=5</c> its end.</summary>
    public static RainRecords Records(
        this Bench bench,
        TimeStep step,
        LocalDateTime first,
        params (string Id, string Steps)[] gauges
    )
    {
        var cells = gauges.Select(gauge => gauge.Steps.Split(' ')).ToArray();
        var count = cells[0].Length;
        var (depths, statuses) = (new double[count * gauges.Length], new RecordStatus[count * gauges.Length]);
        var totals = ImmutableArray.CreateBuilder<Accumulation>();
        for (var g = 0; g < gauges.Length; g++)
        {
            var began = -1;
            for (var t = 0; t < count; t++)
            {
                var at = (t * gauges.Length) + g;
                (depths[at], statuses[at]) = Value(cells[g][t]);
                began =
                    cells[g][t][0] != 'a' ? -1
                    : began < 0 ? t
                    : began;
                if (cells[g][t].StartsWith("a=", StringComparison.Ordinal))
                {
                    totals.Add(new Accumulation(g, began, t, Number(cells[g][t][2..])));
                    began = -1;
                }
            }
        }

        return bench.Study.Take(
            new RainRecords(
                [.. gauges.Select(gauge => gauge.Id)],
                new Timeline(step, first, count),
                depths,
                statuses,
                "records of a test",
                totals.ToImmutable()
            )
        );
    }

    private static (double Depth, RecordStatus Status) Value(string cell) =>
        cell[0] switch
        {
            '.' => (0, RecordStatus.Missing),
            'T' => (0, RecordStatus.Trace),
            'a' => (0, RecordStatus.Accumulated),
            'e' => (Number(cell[1..]), RecordStatus.Estimated),
            'x' => (Number(cell[1..]), RecordStatus.Failed),
            _ => (Number(cell), RecordStatus.Observed),
        };

    private static double Number(string text) => double.Parse(text, System.Globalization.CultureInfo.InvariantCulture);
}

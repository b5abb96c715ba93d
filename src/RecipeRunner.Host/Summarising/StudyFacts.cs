using System.Globalization;
using RecipeRunner.Host.Running;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Weights;

namespace RecipeRunner.Host.Summarising;

/// <summary>What a person wants to know first of a study: basins, gauges used and unused, steps of time, share withheld.</summary>
public static class StudyFacts
{
    /// <summary>Name and text of each fact that the study has.</summary>
    /// <param name="record">The study.</param>
    public static IEnumerable<(string Name, string Text)> Of(StudyRecord record)
    {
        if (record.MainWeights is { } weights)
        {
            var area = weights.Basins.Basins.Sum(basin => basin.Shape.Area) / 1e6;
            yield return (
                "basins",
                string.Create(CultureInfo.InvariantCulture, $"{weights.Basins.Basins.Length:N0}, {area:N0} km²")
            );
            yield return ("gauges", Gauges(weights));
        }

        if (record.MainRecords is { } rain)
        {
            yield return ("values", rain.StatusWords());
        }

        var series = record.Results<ArealRainfall>().ToArray();
        if (series.Length > 0)
        {
            var (given, withheld) = (series.Sum(areal => areal.Count), series.Sum(areal => areal.WithheldCount));
            var longest = series.MaxBy(areal => areal.Times.Count)!.Times;
            yield return (
                "time",
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{longest.Step.Words(longest.Count)}{(series.Length > 1 ? $", {series.Length} series" : "")}"
                )
            );
            yield return (
                "withheld",
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{withheld:N0} of {given:N0} areal values ({100.0 * withheld / Math.Max(1, given):0.0} %)"
                )
            );
        }
    }

    private static string Gauges(WeightTable weights)
    {
        var gauges = weights.Cells.Gauges.Gauges;
        var used = weights.Weights.Select(weight => weight.Gauge).ToHashSet();
        var unused = Enumerable
            .Range(0, gauges.Length)
            .Where(gauge => !used.Contains(gauge))
            .Select(gauge => gauges[gauge].Id)
            .ToArray();
        var named = unused.Length is > 0 and <= 8 ? $" ({string.Join(", ", unused)})" : "";
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{used.Count:N0} with weight, {unused.Length:N0} without{named}"
        );
    }
}

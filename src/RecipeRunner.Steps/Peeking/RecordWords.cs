using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Wording;
using RecipeRunner.Steps.Reading.Records;

namespace RecipeRunner.Steps.Peeking;

/// <summary>Says of records what a look at their file shows: gauges, span, missing by year, longest silences, the largest value.</summary>
internal static class RecordWords
{
    private const int GaugesShown = 8;
    private const int YearsInRow = 8;
    private const int SilencesShown = 3;

    /// <summary>The lines.</summary>
    /// <param name="records">The records.</param>
    /// <param name="unit">The unit of their values in words.</param>
    /// <param name="isMillimetres">True where the unit is known to be millimetres.</param>
    public static IEnumerable<(string Name, string Text)> Of(RainRecords records, string unit, bool isMillimetres)
    {
        var survey = RecordSurvey.Of(records, 2);
        yield return ("gauges", Gauges(records));
        yield return (
            "span",
            string.Create(
                CultureInfo.InvariantCulture,
                $"{records.Times}, {Counted.Of(records.Times.Count, "step")}, as {records.Times.Step.ToSettingText()}"
            )
        );
        yield return (
            "missing",
            $"{Percent(survey.Missing.Sum(count => (long)count), records.Times.Count * (long)records.GaugeIds.Length)} of all values"
        );
        foreach (var years in ByYear(records).Chunk(YearsInRow))
        {
            yield return ("by year", string.Join(", ", years));
        }

        if (survey.Silences.Count > 0)
        {
            var longest = survey
                .Silences.OrderByDescending(silence => silence.Length)
                .ThenBy(silence => silence.Gauge)
                .ThenBy(silence => silence.First)
                .Take(SilencesShown)
                .Select(silence => RecordFindings.Words(records, silence));
            yield return ("silences", $"longest in steps: {string.Join("; ", longest)}");
        }

        if (survey.Impossible is [var (step, gauge, depth, limit), ..])
        {
            yield return (
                "caution",
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{Counted.Of(survey.ImpossibleCount, "value is", "values are")}{(isMillimetres ? "" : ", if in millimetres,")} more than was ever measured in so long a time ({limit} mm), the first {depth:0.###} at {records.GaugeIds[gauge]}, {records.Times.TextAt(step)}."
                )
            );
        }

        yield return ("largest", Largest(records, unit));
    }

    private static string Gauges(RainRecords records) =>
        string.Create(
            CultureInfo.InvariantCulture,
            $"{records.GaugeIds.Length:N0}: {string.Join(", ", records.GaugeIds.Take(GaugesShown))}{(records.GaugeIds.Length > GaugesShown ? ", …" : "")}"
        );

    private static IEnumerable<string> ByYear(RainRecords records)
    {
        var (year, missing, all) = (records.Times.DateAt(0).Year, 0L, 0L);
        for (var step = 0; step < records.Times.Count; step++)
        {
            var next = records.Times.DateAt(step).Year;
            if (next != year)
            {
                yield return FormattableString.Invariant($"{year} {Percent(missing, all)}");
                (year, missing, all) = (next, 0, 0);
            }

            missing += records.StatusesAt(step).Count(RecordStatus.Missing);
            all += records.GaugeIds.Length;
        }

        yield return FormattableString.Invariant($"{year} {Percent(missing, all)}");
    }

    private static string Percent(long part, long all) =>
        string.Create(CultureInfo.InvariantCulture, $"{100.0 * part / Math.Max(1, all):0.0} %");

    private static string Largest(RainRecords records, string unit)
    {
        var (largest, at) = (-1.0, (Step: 0, Gauge: 0));
        for (var step = 0; step < records.Times.Count; step++)
        {
            var depths = records.DepthsAt(step);
            for (var gauge = 0; gauge < depths.Length; gauge++)
            {
                if (depths[gauge] > largest)
                {
                    (largest, at) = (depths[gauge], (step, gauge));
                }
            }
        }

        return string.Create(
            CultureInfo.InvariantCulture,
            $"{largest:0.###} at {records.GaugeIds[at.Gauge]} on {records.Times.TextAt(at.Step)}, in {unit}"
        );
    }
}

using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>Points out what is doubtful in records: depths beyond any that was ever measured, gauges without a value, long silences, values that are not plain observations.</summary>
internal static class RecordFindings
{
    private const int LongSilenceSteps = 7;
    private const int LongSilenceHours = 7 * 24;
    private const int MostListed = 5;

    /// <summary>Adds the findings.</summary>
    public static void Tell(StepContext context, RainRecords records)
    {
        var longSilence = LongSilence(records.Times);
        var survey = RecordSurvey.Of(records, longSilence);
        TellOfImpossible(context, records, survey);
        TellOfSilent(context, records, survey);
        TellOfSilences(context, records, survey, longSilence);
        TellOfFailed(context, records, survey);
        var counts = records.CountByStatus();
        TellOfCount(
            context,
            records,
            "RR0270",
            counts[(int)RecordStatus.Trace],
            (
                "is a trace, too little to measure; it counts as zero",
                "are a trace, too little to measure; they count as zero"
            )
        );
        TellOfCount(
            context,
            records,
            "RR0274",
            counts[(int)RecordStatus.Estimated],
            ("is marked as estimated; it is used as it is", "are marked as estimated; they are used as they are")
        );
    }

    /// <summary>Gauge, first and last step and length of a silence in words.</summary>
    public static string Words(RainRecords records, Silence silence)
    {
        var first = records.Times.TextAt(silence.First);
        var last = records.Times.TextAt(silence.First + silence.Length - 1);
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{records.GaugeIds[silence.Gauge]} {first} to {last} ({silence.Length})"
        );
    }

    private static void TellOfImpossible(StepContext context, RainRecords records, RecordSurvey survey)
    {
        foreach (var (t, g, depth, limit) in survey.Impossible)
        {
            context.Find(
                Finding.Caution(
                    "RR0260",
                    new Place(records.Source, Item: $"gauge {records.GaugeIds[g]}"),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{depth:0.#} mm on {records.Times.TextAt(t)} is more than was ever measured anywhere in so long a time ({limit} mm). {Counted.Of(survey.ImpossibleCount, "value is", "values are")}."
                    ),
                    "Is the unit right? Is it a total of several steps, or a marker of a missing value?"
                )
            );
        }
    }

    private static void TellOfSilent(StepContext context, RainRecords records, RecordSurvey survey)
    {
        var silent = Enumerable
            .Range(0, records.GaugeIds.Length)
            .Where(g => survey.Missing[g] == records.Times.Count)
            .Select(g => records.GaugeIds[g])
            .ToArray();
        if (silent.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0261",
                    new Place(records.Source),
                    $"No value at all for {Listing.Of(silent)}.",
                    "Are these gauges closed, or named differently elsewhere?"
                )
            );
        }
    }

    private static void TellOfSilences(StepContext context, RainRecords records, RecordSurvey survey, int longSilence)
    {
        var silences = survey
            .Silences.Where(silence => silence.Length < records.Times.Count)
            .OrderByDescending(silence => silence.Length)
            .ThenBy(silence => silence.Gauge)
            .ThenBy(silence => silence.First)
            .ToArray();
        if (silences.Length == 0)
        {
            return;
        }

        var listed = silences.Take(MostListed).Select(silence => Words(records, silence));
        context.Find(
            Finding.Notice(
                "RR0262",
                new Place(records.Source),
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"Gauges are silent for {longSilence:N0} steps or more {Counted.Times(silences.Length)}; longest: {string.Join("; ", listed)}."
                ),
                "The gap policy says who takes their share."
            )
        );
    }

    private static void TellOfFailed(StepContext context, RainRecords records, RecordSurvey survey)
    {
        var gauges = Enumerable.Range(0, records.GaugeIds.Length).Where(g => survey.Failed[g] > 0).ToArray();
        if (gauges.Length == 0)
        {
            return;
        }

        var words = gauges
            .OrderByDescending(g => survey.Failed[g])
            .ThenBy(g => g)
            .Select(g => string.Create(CultureInfo.InvariantCulture, $"{records.GaugeIds[g]} ({survey.Failed[g]:N0})"))
            .ToArray();
        context.Find(
            Finding.Notice(
                "RR0271",
                new Place(records.Source),
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{Counted.Of(survey.Failed.Sum(), "value failed a check of quality and is not used", "values failed a check of quality and are not used")}: {Listing.Of(words)}."
                )
            )
        );
    }

    /// <summary>The fewest steps of silence that are worth telling: a week of steps shorter than a day, else seven.</summary>
    private static int LongSilence(Timeline times)
    {
        var hours = times.IntervalAt(0).Hours;
        return hours < 24 ? (int)(LongSilenceHours / hours) : LongSilenceSteps;
    }

    private static void TellOfCount(
        StepContext context,
        RainRecords records,
        string code,
        int count,
        (string One, string Many) words
    )
    {
        if (count > 0)
        {
            context.Find(
                Finding.Notice(
                    code,
                    new Place(records.Source),
                    $"{Counted.Of(count, $"value {words.One}", $"values {words.Many}")}."
                )
            );
        }
    }
}

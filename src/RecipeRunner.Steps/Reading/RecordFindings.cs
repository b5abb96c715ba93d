using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Reading;

/// <summary>Points out what is doubtful in records: depths beyond any that was ever measured, gauges without a value, long silences.</summary>
internal static class RecordFindings
{
    /// <summary>The most rain in 24 hours on record, 1,825 mm at Foc-Foc, La Réunion, January 1966 (WMO; from memory).</summary>
    private const double LargestDayMillimetres = 1825;

    /// <summary>The most in a calendar month, 9,300 mm at Cherrapunji, July 1861 (WMO; from memory).</summary>
    private const double LargestMonthMillimetres = 9300;

    private const int LongSilence = 7;
    private const int MostListed = 5;

    /// <summary>Adds the findings.</summary>
    public static void Tell(StepContext context, RainRecords records)
    {
        TellOfImpossible(context, records);
        TellOfSilent(context, records);
        TellOfSilences(context, records);
    }

    private static void TellOfImpossible(StepContext context, RainRecords records)
    {
        var limit = records.Times.Step == TimeStep.Months ? LargestMonthMillimetres : LargestDayMillimetres;
        var found = Cells(records).Where(cell => records.DepthsAt(cell.Step)[cell.Gauge] > limit).ToArray();
        foreach (var (t, g) in found.Take(MostListed))
        {
            context.Find(
                Finding.Caution(
                    "RR0260",
                    new Place(records.Source, Item: $"gauge {records.GaugeIds[g]}"),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{records.DepthsAt(t)[g]:0.#} mm on {records.Times.TextAt(t)} is more than was ever measured anywhere in a step of this length ({limit} mm). {found.Length} values are."
                    ),
                    "Is the unit right? Is it a total of several steps, or a marker of a missing value?"
                )
            );
        }
    }

    private static void TellOfSilent(StepContext context, RainRecords records)
    {
        var silent = Enumerable
            .Range(0, records.GaugeIds.Length)
            .Where(g =>
                Enumerable.Range(0, records.Times.Count).All(t => records.StatusesAt(t)[g] == RecordStatus.Missing)
            )
            .ToArray();
        if (silent.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0261",
                    new Place(records.Source),
                    $"No value at all for {Listing.Of([.. silent.Select(g => records.GaugeIds[g])])}.",
                    "Are these gauges closed, or named differently elsewhere?"
                )
            );
        }
    }

    private static void TellOfSilences(StepContext context, RainRecords records)
    {
        var silences = Enumerable
            .Range(0, records.GaugeIds.Length)
            .SelectMany(g => Silences(records, g))
            .Where(silence => silence.Length >= LongSilence && silence.Length < records.Times.Count)
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
                    $"Gauges are silent for {LongSilence} steps or more {silences.Length} times; longest: {string.Join("; ", listed)}."
                ),
                "The gap policy says who takes their share."
            )
        );
    }

    private static string Words(RainRecords records, (int Gauge, int First, int Length) silence)
    {
        var first = records.Times.TextAt(silence.First);
        var last = records.Times.TextAt(silence.First + silence.Length - 1);
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{records.GaugeIds[silence.Gauge]} {first} to {last} ({silence.Length})"
        );
    }

    private static IEnumerable<(int Gauge, int First, int Length)> Silences(RainRecords records, int gauge)
    {
        var length = 0;
        for (var t = 0; t <= records.Times.Count; t++)
        {
            if (t < records.Times.Count && records.StatusesAt(t)[gauge] == RecordStatus.Missing)
            {
                length++;
            }
            else if (length > 0)
            {
                yield return (gauge, t - length, length);
                length = 0;
            }
        }
    }

    private static IEnumerable<(int Step, int Gauge)> Cells(RainRecords records) =>
        Enumerable
            .Range(0, records.Times.Count)
            .SelectMany(t => Enumerable.Range(0, records.GaugeIds.Length).Select(g => (t, g)));
}

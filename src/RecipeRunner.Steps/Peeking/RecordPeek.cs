using System.Globalization;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;
using RecipeRunner.Steps.Reading.Records;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Peeking;

/// <summary>Looks into a table that holds a record, and tells what a reader would refuse instead of refusing it.</summary>
internal sealed class RecordPeek(TextInput text, PeekColumn[] columns, PeekForm form, bool hasHeader)
{
    /// <summary>The lines; null where no step of time fits the file.</summary>
    public List<(string Name, string Text)>? Lines()
    {
        var (times, gauges) = (new PeekTimes(), new SortedSet<string>(StringComparer.Ordinal));
        Gather(times, gauges);
        if (times.Steps() is not { } steps)
        {
            return null;
        }

        var byColumn = form.Gauge < 0 ? form.Values.Select(column => columns[column].Name).ToArray() : [];
        gauges.UnionWith(byColumn);
        RecordSpan.RequireRoom(text.Name, steps.Times, gauges.Count);
        var scan = Scan([.. gauges], byColumn, steps.Times);
        return
        [
            ("records", form.Words + (hasHeader ? "" : "; no header")),
            .. RecordWords.Of(scan.Records(text.Name), "the file's unit", isMillimetres: false),
            .. Doubts(times, scan),
            .. Marks(scan),
            ("read with", ReadWith(steps.Said, scan)),
        ];
    }

    private void Gather(PeekTimes times, SortedSet<string> gauges)
    {
        using var reader = CsvText.Open(text);
        var skip = hasHeader;
        foreach (var row in reader)
        {
            if (skip || CsvText.IsBlank(row))
            {
                skip = skip && CsvText.IsBlank(row);
                continue;
            }

            times.Add(row.ColCount > form.Time ? row[form.Time].Span.Trim() : "", CsvText.LineOf(row));
            if (form.Gauge >= 0 && row.ColCount > form.Gauge)
            {
                gauges.Add(row[form.Gauge].Span.Trim().ToString());
            }
        }
    }

    private RecordScan Scan(string[] ids, string[] byColumn, Timeline times)
    {
        var scan = new RecordScan(ids, form, times);
        using var reader = CsvText.Open(text);
        foreach (var row in reader)
        {
            scan.Add(row, byColumn);
        }

        return scan;
    }

    private static IEnumerable<(string Name, string Text)> Doubts(PeekTimes times, RecordScan scan)
    {
        (int Count, string One, string Many, string What)[] doubts =
        [
            (
                times.Unreadable,
                "row has",
                "rows have",
                FormattableString.Invariant($"no time that can be read, the first in line {times.FirstUnreadable}")
            ),
            (scan.TwiceCount, "value stands", "values stand", $"twice, the first {scan.Twice}"),
            (scan.NegativeCount, "value is", "values are", $"below zero, the first {scan.Negative}"),
        ];
        foreach (var (count, one, many, what) in doubts.Where(doubt => doubt.Count > 0))
        {
            yield return ("caution", $"{Counted.Of(count, one, many)} {what}.");
        }

        if (scan.Texts.Count > 0)
        {
            yield return ("caution", $"Not numbers: {Listing.Of([.. scan.Texts.Select(WithCount)])}.");
        }
    }

    private static IEnumerable<(string Name, string Text)> Marks(RecordScan scan)
    {
        if (scan.Marks.Count > 0)
        {
            yield return (
                "markers",
                $"{Listing.Of([.. scan.Marks.Select(WithCount)])}: taken as missing or trace here"
            );
        }
    }

    private static string WithCount(KeyValuePair<string, int> mark) =>
        string.Create(CultureInfo.InvariantCulture, $"{mark.Key} ({mark.Value:N0})");

    private string ReadWith(string step, RecordScan scan)
    {
        List<string> parts = [$"\"{text.Name}\"", "RainUnit.…", step];
        Declare("missing", [.. scan.Marks.Keys.Where(mark => !UsualMarks.IsTrace(mark))]);
        Declare("trace", [.. scan.Marks.Keys.Where(mark => UsualMarks.IsTrace(mark))]);
        var said = form.Said(columns, hasHeader);
        if (said.Length > 0)
        {
            parts.Add(said);
        }

        return $"ReadRecords({string.Join(", ", parts)})";

        void Declare(string name, string[] marks)
        {
            if (marks.Length > 0)
            {
                parts.Add($"{name}: [{string.Join(", ", marks.Select(mark => $"\"{mark}\""))}]");
            }
        }
    }
}

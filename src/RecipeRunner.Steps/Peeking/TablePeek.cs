using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading;
using RecipeRunner.Steps.Reading.Records;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Peeking;

/// <summary>Looks into a text table: as records where its rows begin with times, otherwise column by column.</summary>
internal static class TablePeek
{
    public static List<(string Name, string Text)> Of(StepContext context, string name)
    {
        var columns = Columns(context, name);
        var firstRow = columns.Select(column => column.First).ToArray();
        var isRecord =
            firstRow.Length >= 2
            && (LooksLikeTime(firstRow[0]) || (firstRow.Length == 3 && LooksLikeTime(firstRow[1])));
        return isRecord ? OfRecords(context, name, columns) : OfColumns(columns);
    }

    private static List<(string Name, string Text)> OfColumns(PeekColumn[] columns)
    {
        List<(string Name, string Text)> lines =
        [
            ("rows", columns[0].Count.ToString("N0", CultureInfo.InvariantCulture)),
        ];
        lines.AddRange(columns.Select(column => ("column", $"{column.Name}: {column.Describe()}")));
        lines.Add(("system", "a table does not say its reference system; give crs: when reading"));
        return lines;
    }

    private static List<(string Name, string Text)> OfRecords(StepContext context, string name, PeekColumn[] columns)
    {
        var time = LooksLikeTime(columns[0].First) ? columns[0] : columns[1];
        var step = StepOf(time.First);
        var markers = columns
            .Where(column => column != time)
            .SelectMany(column => column.Markers)
            .Distinct(StringComparer.Ordinal)
            .Order(StringComparer.Ordinal)
            .ToArray();
        var records = new ReadRecordsStep(name, RainUnit.Millimetres, step, [.. markers], [], [], [], null).Execute(
            context
        );
        List<(string Name, string Text)> lines =
        [
            (
                "records",
                ReferenceEquals(time, columns[0]) ? "wide: time, then a column a gauge" : "long: gauge, time, value"
            ),
            (
                "gauges",
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{records.GaugeIds.Length:N0}: {string.Join(", ", records.GaugeIds.Take(8))}{(records.GaugeIds.Length > 8 ? ", …" : "")}"
                )
            ),
            (
                "span",
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{records.Times.TextAt(0)} to {records.Times.TextAt(records.Times.Count - 1)}, {records.Times.Count:N0} steps, as {step.ToSettingText()}"
                )
            ),
            (
                "missing",
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{100.0 * records.SilentCount / Math.Max(1, records.Times.Count * records.GaugeIds.Length):0.0} % of all values"
                )
            ),
        ];
        if (markers.Length > 0)
        {
            lines.Add(
                (
                    "markers",
                    $"{string.Join(", ", markers)} were taken as missing; say so when reading:   missing: [{string.Join(", ", markers.Select(marker => $"\"{marker}\""))}]"
                )
            );
        }

        lines.Add(("largest", Largest(records)));
        return lines;
    }

    private static bool LooksLikeTime(string text) =>
        TimeText.TryRead(text, out var time) && time.Detail != TimeDetail.Year;

    /// <summary>Months where the label is a month, else days that end at the label's time; a date alone is taken as the day.</summary>
    private static TimeStep StepOf(string label) =>
        label.Length == "2024-01".Length ? TimeStep.Months
        : label.Length >= "2024-01-31T09:00".Length
            ? TimeStep.Days(label.Substring("2024-01-31T".Length, "09:00".Length))
        : TimeStep.Days("24:00");

    private static string Largest(RainRecords records)
    {
        var (step, gauge) = Enumerable
            .Range(0, records.Times.Count)
            .SelectMany(t => Enumerable.Range(0, records.GaugeIds.Length).Select(g => (t, g)))
            .MaxBy(cell => records.DepthsAt(cell.t)[cell.g]);
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{records.DepthsAt(step)[gauge]:0.###} at {records.GaugeIds[gauge]} on {records.Times.TextAt(step)}, in the file's unit"
        );
    }

    private static PeekColumn[] Columns(StepContext context, string name)
    {
        using var text = TextInput.Open(context, name);
        using var reader = CsvText.Open(text);
        var columns = CsvText.Names(reader, name).Select(column => new PeekColumn(column)).ToArray();
        foreach (var row in reader)
        {
            for (var c = 0; c < Math.Min(columns.Length, row.ColCount); c++)
            {
                columns[c].Add(row[c].Span.Trim());
            }
        }

        return columns;
    }
}

using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading;

namespace RecipeRunner.Steps.Peeking;

/// <summary>Looks into a text table: as records where its rows begin with times, otherwise column by column.</summary>
internal static class TablePeek
{
    private static readonly string[] UsualMarkers = ["-9999", "-999", "-99.9", "-99", "NA", "NaN", "M", "-"];

    public static List<(string Name, string Text)> Of(StepContext context, string name)
    {
        var columns = Columns(context, name);
        var firstRow = columns.Select(column => column.Cells.FirstOrDefault() ?? "").ToArray();
        var isRecord =
            firstRow.Length >= 2
            && (
                LabelReader.LooksLikeTime(firstRow[0])
                || (firstRow.Length == 3 && LabelReader.LooksLikeTime(firstRow[1]))
            );
        return isRecord ? OfRecords(context, name, columns) : OfColumns(columns);
    }

    private static List<(string Name, string Text)> OfColumns(PeekColumn[] columns)
    {
        List<(string Name, string Text)> lines =
        [
            ("rows", columns[0].Cells.Count.ToString("N0", CultureInfo.InvariantCulture)),
        ];
        lines.AddRange(columns.Select(column => ("column", $"{column.Name}: {column.Describe()}")));
        lines.Add(("system", "a table does not say its reference system; give crs: when reading"));
        return lines;
    }

    private static List<(string Name, string Text)> OfRecords(StepContext context, string name, PeekColumn[] columns)
    {
        var time = LabelReader.LooksLikeTime(columns[0].Cells[0]) ? columns[0] : columns[1];
        var step = time.Cells[0].Length == "2024-01".Length ? TimeStep.Months : TimeStep.Days("24:00");
        var markers = UsualMarkers
            .Where(marker =>
                columns
                    .Where(column => column != time)
                    .Any(column => column.Cells.Contains(marker, StringComparer.Ordinal))
            )
            .ToArray();
        var records = new ReadRecordsStep(name, RainUnit.Millimetres, step, [.. markers]).Execute(context);
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
                    $"{step.LabelText(records.Labels[0])} to {step.LabelText(records.Labels[^1])}, {records.Labels.Length:N0} steps of {(step == TimeStep.Months ? "a month" : "a day")}"
                )
            ),
            (
                "missing",
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{100.0 * records.MissingCount / Math.Max(1, records.Labels.Length * records.GaugeIds.Length):0.0} % of all values"
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

    private static string Largest(RainRecords records)
    {
        var (step, gauge) = Enumerable
            .Range(0, records.Labels.Length)
            .SelectMany(t => Enumerable.Range(0, records.GaugeIds.Length).Select(g => (t, g)))
            .MaxBy(cell => records.DepthsAt(cell.t)[cell.g]);
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{records.DepthsAt(step)[gauge]:0.###} at {records.GaugeIds[gauge]} on {records.Step.LabelText(records.Labels[step])}, in the file's unit"
        );
    }

    private static PeekColumn[] Columns(StepContext context, string name)
    {
        using var stream = context.OpenInput(name);
        using var reader = CsvText.Open(stream, name);
        var columns = CsvText.Names(reader, name).Select(column => new PeekColumn(column, [])).ToArray();
        foreach (var row in reader)
        {
            for (var c = 0; c < Math.Min(columns.Length, row.ColCount); c++)
            {
                columns[c].Cells.Add(row[c].ToString().Trim());
            }
        }

        return columns;
    }

    private sealed record PeekColumn(string Name, List<string> Cells)
    {
        public string Describe()
        {
            var filled = Cells.Where(cell => cell.Length > 0).ToArray();
            var numbers = filled
                .Select(cell => NumberText.TryRead(cell, out var number) ? number : (double?)null)
                .ToArray();
            var blank = Cells.Count - filled.Length;
            var blanks = blank == 0 ? "" : string.Create(CultureInfo.InvariantCulture, $", {blank:N0} blank");
            if (filled.Length > 0 && numbers.All(number => number.HasValue))
            {
                return string.Create(
                    CultureInfo.InvariantCulture,
                    $"numbers from {numbers.Min():0.######} to {numbers.Max():0.######}{blanks}"
                );
            }

            var odd = filled.FirstOrDefault(cell => !NumberText.TryRead(cell, out _));
            var mixed = numbers.Any(number => number.HasValue) ? $", some not numbers, such as '{odd}'" : "";
            var distinct = filled.Distinct(StringComparer.Ordinal).Count();
            return string.Create(
                CultureInfo.InvariantCulture,
                $"text, {distinct:N0} different, such as {string.Join(", ", filled.Take(3))}{mixed}{blanks}"
            );
        }
    }
}

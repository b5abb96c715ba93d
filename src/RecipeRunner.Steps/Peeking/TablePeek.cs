using System.Globalization;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading;
using RecipeRunner.Steps.Reading.Ghcn;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Peeking;

/// <summary>Looks into a text table: as GHCN-Daily or another record where its rows hold times and values, otherwise column by column.</summary>
internal static class TablePeek
{
    /// <summary>The lines.</summary>
    public static List<(string Name, string Text)> Of(StepContext context, string name)
    {
        using var text = TextInput.Open(context, name);
        if (GhcnFile.LooksLike(text))
        {
            return OfGhcn(context, name);
        }

        var hasHeader = HasHeader(text);
        var columns = Columns(text, hasHeader);
        var form = PeekForm.Of(columns);
        var lines = form is null ? null : new RecordPeek(text, columns, form, hasHeader).Lines();
        return lines ?? OfColumns(columns);
    }

    private static List<(string Name, string Text)> OfGhcn(StepContext context, string name)
    {
        var records = new ReadGhcnDailyStep(name, TimeStep.Days("24:00"), null).Execute(context);
        return
        [
            ("records", "GHCN-Daily, as NOAA gives it out"),
            .. RecordWords.Of(records, "millimetres", isMillimetres: true),
            ("values", records.StatusWords()),
            ("read with", $"ReadGhcnDaily(\"{name}\", TimeStep.Days(endingAt: \"…\"))"),
        ];
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

    /// <summary>False where the first row holds a time, which no header does.</summary>
    private static bool HasHeader(TextInput text)
    {
        using var reader = CsvText.Open(text);
        return !reader.MoveNext() || !CsvText.Cells(reader.Current).Any(PeekForm.LooksLikeTime);
    }

    private static PeekColumn[] Columns(TextInput text, bool hasHeader)
    {
        using var reader = CsvText.Open(text);
        var columns = hasHeader
            ? CsvText.Names(reader, text.Name).Select(column => new PeekColumn(column)).ToArray()
            : null;
        foreach (var row in reader)
        {
            if (CsvText.IsBlank(row))
            {
                continue;
            }

            columns ??=
            [
                .. Enumerable
                    .Range(1, row.ColCount)
                    .Select(number => new PeekColumn(FormattableString.Invariant($"column {number}"))),
            ];
            for (var c = 0; c < Math.Min(columns.Length, row.ColCount); c++)
            {
                columns[c].Add(row[c].Span.Trim());
            }
        }

        return columns ?? throw CsvText.Empty(text.Name);
    }
}

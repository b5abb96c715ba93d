using nietras.SeparatedValues;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading;

/// <summary>Walks the rows of a record file, wide or long, into a table of records.</summary>
internal static class RecordRows
{
    private const int RowsBetweenReports = 1000;

    /// <summary>Reads all rows.</summary>
    /// <exception cref="RefusedException">The file is of neither form.</exception>
    public static void Read(SepReader reader, string[] names, RecordTable table, Stream stream, StepContext context)
    {
        Action<SepReader.Row>? take = null;
        var count = 0;
        foreach (var row in reader)
        {
            if (CsvText.IsBlank(row))
            {
                continue;
            }

            take ??= FormOf(row, names, table);
            if (CsvText.Fits(row, names.Length))
            {
                take(row);
            }
            else
            {
                table.Problems.Add(
                    "RR0241",
                    new Place(table.File, row.LineNumberFrom),
                    FormattableString.Invariant($"It has {row.ColCount} cells; the header has {names.Length}."),
                    "Was the file cut? A cell that holds the separator stands in quotes; decimals are written with a point."
                );
            }

            if (++count % RowsBetweenReports == 0)
            {
                context.Cancellation.ThrowIfCancellationRequested();
                context.Progress((double)stream.Position / stream.Length);
            }
        }
    }

    private static Action<SepReader.Row> FormOf(SepReader.Row row, string[] names, RecordTable table)
    {
        if (row.ColCount >= 2 && LabelReader.LooksLikeTime(row[0].ToString().Trim()))
        {
            return Wide(names, table);
        }

        if (names.Length == 3 && row.ColCount >= 3 && LabelReader.LooksLikeTime(row[1].ToString().Trim()))
        {
            return table.AddLong;
        }

        throw new RefusedException(
            Finding.Error(
                "RR0254",
                new Place(table.File, row.LineNumberFrom),
                $"The row '{Start(row)}' fits neither form of record.",
                "A wide file has the time first (2024-01-31), then a column a gauge; a long file has gauge, time, value."
            )
        );
    }

    private static Action<SepReader.Row> Wide(string[] names, RecordTable table)
    {
        for (var column = 1; column < names.Length; column++)
        {
            if (names[column].Length == 0)
            {
                table.Problems.Add(
                    "RR0244",
                    new Place(table.File, 1, column + 1),
                    "The header does not name this gauge.",
                    "Write the gauge's id at the head of its column, or take an empty last column away."
                );
            }
        }

        table.SetGauges(names.AsSpan(1));
        return table.AddWide;
    }

    private static string Start(SepReader.Row row)
    {
        var text = row.ToString();
        return text.Length <= 60 ? text : text[..60] + "…";
    }
}

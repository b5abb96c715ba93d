using nietras.SeparatedValues;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>Takes rows that have a time and a value a gauge.</summary>
internal sealed class WideTaker : IRowTaker
{
    private readonly string file;
    private readonly RecordSettings settings;
    private readonly RecordLayout layout;
    private readonly LabelReader labels;
    private readonly CellReader cells;
    private readonly WideGrid grid;
    private readonly string[] ids;
    private readonly int[] columns;

    /// <summary>Creates a taker.</summary>
    public WideTaker(
        string file,
        RecordSettings settings,
        RecordLayout layout,
        LabelReader labels,
        CellReader cells,
        int rows
    )
    {
        (this.file, this.settings, this.layout, this.labels, this.cells) = (file, settings, layout, labels, cells);
        var gauges = layout.Gauges.OrderBy(gauge => gauge.Id, StringComparer.Ordinal).ToArray();
        ids = [.. gauges.Select(gauge => gauge.Id)];
        columns = [.. gauges.Select(gauge => gauge.Column)];
        grid = new WideGrid(file, settings.Step, ids, Math.Max(1, rows));
    }

    /// <inheritdoc/>
    public void Take(SepReader.Row row, Problems problems)
    {
        var line = CsvText.LineOf(row);
        var timeColumn = layout.Time[0] + 1;
        if (
            labels.Read(TimeCells.Of(row, layout.Time), line, timeColumn, problems) is not { } label
            || grid.RowAt(label, (line, timeColumn), problems) is not { } start
        )
        {
            return;
        }

        var hours = settings.HoursOf(label);
        for (var i = 0; i < columns.Length; i++)
        {
            var column = columns[i];
            grid.Set(start + i, cells.Read(row[column].Span, (line, column + 1), ids[i], hours, problems));
        }
    }

    /// <inheritdoc/>
    public RecordPart Finish(StepContext context, Problems problems)
    {
        if (grid.OutOfOrder > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0257",
                    new Place(file),
                    FormattableString.Invariant(
                        $"{Counted.Of(grid.OutOfOrder, "row is", "rows are")} earlier than the row before; the file was put in order."
                    )
                )
            );
        }

        return grid.Finish();
    }
}

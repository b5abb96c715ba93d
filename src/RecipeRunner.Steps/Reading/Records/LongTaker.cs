using System.Globalization;
using nietras.SeparatedValues;
using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>Takes rows that have one value: of a gauge that the row names, or of the file's one gauge.</summary>
internal sealed class LongTaker : IRowTaker
{
    private readonly string file;
    private readonly RecordSettings settings;
    private readonly RecordLayout layout;
    private readonly LabelReader labels;
    private readonly CellReader cells;
    private readonly FlagReader flags;
    private readonly LongRows rows;
    private readonly string fileGauge;

    /// <summary>Creates a taker.</summary>
    public LongTaker(string file, RecordSettings settings, RecordLayout layout, LabelReader labels, CellReader cells)
    {
        (this.file, this.settings, this.layout, this.labels, this.cells) = (file, settings, layout, labels, cells);
        flags = new FlagReader(file, settings.Form?.Flags ?? []);
        rows = new LongRows(file, settings.Step);
        fileGauge = TextInput.StemOf(file);
    }

    /// <inheritdoc/>
    public void Take(SepReader.Row row, Problems problems)
    {
        var line = CsvText.LineOf(row);
        var id = layout.Gauge < 0 ? fileGauge : row[layout.Gauge].Span.Trim();
        if (id.IsEmpty)
        {
            problems.Add(
                "RR0244",
                new Place(file, line, layout.Gauge + 1),
                "The gauge has no id.",
                "Write the gauge's id."
            );
            return;
        }

        var place = (line, layout.Time[0] + 1);
        if (labels.Read(TimeCells.Of(row, layout.Time), place.line, place.Item2, problems) is not { } label)
        {
            return;
        }

        var gauge = rows.GaugeOf(id);
        var cell = ValueOf(row, label, rows.IdOf(gauge), problems);
        var steps = StepsOf(row, rows.IdOf(gauge), problems);
        if (steps > 1 && cell.Status != RecordStatus.Missing)
        {
            rows.AddTotal(gauge, label, steps, cell.Status.Reports() ? cell.Depth : null, place, problems);
            cell = default;
        }

        rows.Add(gauge, label, cell, place, problems);
    }

    /// <inheritdoc/>
    public RecordPart Finish(StepContext context, Problems problems) => rows.Finish(problems);

    private Cell ValueOf(SepReader.Row row, LocalDateTime label, string gauge, Problems problems)
    {
        var line = CsvText.LineOf(row);
        var hours = settings.HoursOf(label);
        var cell = cells.Read(row[layout.Value].Span, (line, layout.Value + 1), gauge, hours, problems);
        return layout.Flag < 0
            ? cell
            : flags.Apply(cell, row[layout.Flag].Span.Trim(), (line, layout.Flag + 1), gauge, problems);
    }

    private int StepsOf(SepReader.Row row, string gauge, Problems problems)
    {
        var text = layout.Over < 0 ? default : row[layout.Over].Span.Trim();
        if (text.IsEmpty)
        {
            return 1;
        }

        if (!int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out var steps) || steps < 1)
        {
            problems.Add(
                "RR0275",
                new Place(file, CsvText.LineOf(row), layout.Over + 1, $"gauge {gauge}"),
                $"'{text}' is not a number of steps that a value covers.",
                "Write 1, 2, 3 …, or leave it blank for one step."
            );
        }

        return steps;
    }
}

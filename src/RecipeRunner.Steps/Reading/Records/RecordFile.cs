using nietras.SeparatedValues;
using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>How the recipe says that record files are to be read.</summary>
internal sealed record RecordSettings(RainUnit Unit, TimeStep Step, RecordMarks Marks, RecordForm? Form)
{
    /// <summary>How long a step is, where the unit is an intensity and must be multiplied by it.</summary>
    public double HoursOf(LocalDateTime label) => Unit.IsIntensity ? Step.IntervalOf(label).Hours : 0;
}

/// <summary>Reads one record file, wide or long.</summary>
internal sealed class RecordFile
{
    private const int RowsBetweenReports = 1000;

    private readonly TextInput text;
    private readonly StepContext context;
    private readonly RecordSettings settings;
    private readonly LabelReader labels;
    private readonly Problems problems = new();

    private RecordFile(TextInput text, StepContext context, RecordSettings settings)
    {
        (this.text, this.context, this.settings) = (text, context, settings);
        labels = new LabelReader(text.Name, settings.Step);
    }

    /// <summary>Reads a file.</summary>
    /// <exception cref="RefusedException">With every problem found.</exception>
    public static (RecordPart Part, RecordLayout Layout) Read(StepContext context, string name, RecordSettings settings)
    {
        using var input = TextInput.Open(context, name);
        return new RecordFile(input, context, settings).Read();
    }

    private (RecordPart Part, RecordLayout Layout) Read()
    {
        using var reader = CsvText.Open(text);
        IRowTaker? taker = null;
        string[]? head = null;
        RecordLayout? layout = null;
        var count = 0;
        while (reader.MoveNext())
        {
            var row = reader.Current;
            if (CsvText.IsBlank(row))
            {
                continue;
            }

            if (layout is null)
            {
                layout = head is null
                    ? LayoutOfFirst(row)
                    : RecordLayout.Found(head, CsvText.Cells(row), PlaceOf(row), labels);
                taker = layout is null ? null : TakerOf(layout);
                if (head is null && layout is not { HasHeader: false })
                {
                    head = CsvText.WithoutEmptyEnd(CsvText.Cells(row));
                    continue;
                }
            }

            Take(row, layout!, taker!);
            if (++count % RowsBetweenReports == 0)
            {
                context.Cancellation.ThrowIfCancellationRequested();
                context.Progress(text.Share);
            }
        }

        if (taker is null)
        {
            throw head is null
                ? CsvText.Empty(text.Name)
                : new RefusedException(
                    Finding.Error("RR0256", new Place(text.Name), "It has a header but no rows.", "Was the file cut?")
                );
        }

        problems.ThrowIfAny();
        var part = taker.Finish(context, problems);
        return (part, layout!);
    }

    /// <summary>The layout, where the recipe's form gives it with the first row.</summary>
    private RecordLayout? LayoutOfFirst(SepReader.Row row)
    {
        var first = CsvText.Cells(row);
        if (settings.Form is { } form)
        {
            return RecordLayout.Of(form, first, text.Name, labels);
        }

        RecordLayout.RequireHeader(first, text.Name, labels);
        CsvText.RequireDistinct(CsvText.WithoutEmptyEnd(first), text.Name);
        return null;
    }

    private void Take(SepReader.Row row, RecordLayout layout, IRowTaker taker)
    {
        if (CsvText.Fits(row, layout.Width))
        {
            taker.Take(row, problems);
            return;
        }

        problems.Add(
            "RR0241",
            PlaceOf(row),
            FormattableString.Invariant(
                $"It has {row.ColCount} cells; the {(layout.HasHeader ? "header" : "first row")} has {layout.Width}."
            ),
            "Was the file cut? A cell that holds the separator stands in quotes; decimals are written with a point."
        );
    }

    private IRowTaker TakerOf(RecordLayout layout)
    {
        var cells = new CellReader(text.Name, settings.Unit, settings.Marks);
        return layout.Kind == RecordFormKind.Wide
            ? new WideTaker(text.Name, settings, layout, labels, cells, text.Lines - (layout.HasHeader ? 1 : 0))
            : new LongTaker(text.Name, settings, layout, labels, cells);
    }

    private Place PlaceOf(SepReader.Row row) => new(text.Name, CsvText.LineOf(row));
}

/// <summary>Takes the rows of a file in one form.</summary>
internal interface IRowTaker
{
    /// <summary>Takes a row that has a cell for each column.</summary>
    void Take(SepReader.Row row, Problems problems);

    /// <summary>What the file holds.</summary>
    RecordPart Finish(StepContext context, Problems problems);
}

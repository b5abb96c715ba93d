using System.Text;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Emitting;

/// <summary>
/// Writes a table into the study as <c>tables/NAME.csv</c> (RFC 4180, UTF-8, decimal point, blank where there is no
/// value), and beside it <c>tables/NAME.columns.csv</c>, which says the unit and meaning of each column.
/// </summary>
/// <param name="Table">What to write: weights, areal rainfall, totals, coverage.</param>
/// <param name="Name">The table's name, without an ending.</param>
/// <example><code>EmitTable(weights, "weights");</code></example>
[Step("Emit table", Word = "table")]
public sealed record EmitTableStep(ITabular Table, string Name) : Step<EmittedFiles>
{
    private static readonly UTF8Encoding Utf8 = new(encoderShouldEmitUTF8Identifier: false);

    /// <inheritdoc/>
    public override EmittedFiles Execute(StepContext context)
    {
        var table = Table.ToTable();
        var name = EmittedName.Without(Name, ".csv");
        string[] paths = [$"tables/{name}.csv", $"tables/{name}.columns.csv"];
        Write(context, paths[0], table);
        Write(context, paths[1], Meanings(table));
        return new EmittedFiles([.. paths], table.RowCount, "rows");
    }

    private static Table Meanings(Table table) =>
        new([
            Column.OfText("column", "", table.Columns.Select(column => column.Name)),
            Column.OfText("unit", "", table.Columns.Select(column => column.Unit)),
            Column.OfText("meaning", "", table.Columns.Select(column => column.Meaning)),
        ]);

    private static void Write(StepContext context, string path, Table table)
    {
        using var writer = new StreamWriter(context.CreateOutput(path), Utf8, 1 << 16);
        writer.Write(CsvLine.Of(table.Columns.Select(column => column.Name)) + "\n");
        for (var row = 0; row < table.RowCount; row++)
        {
            context.Cancellation.ThrowIfCancellationRequested();
            writer.Write(CsvLine.Of(table.Columns.Select(column => CellText.Of(column, row))) + "\n");
        }
    }
}

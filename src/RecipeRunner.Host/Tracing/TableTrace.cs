using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Host.Rerunning;
using RecipeRunner.Host.Running;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Host.Tracing;

/// <summary>A cell of an emitted table, followed back to the steps behind it.</summary>
/// <param name="File">The table, relative to the payload.</param>
/// <param name="Line">The line in the file.</param>
/// <param name="Row">What names the row: its first cell.</param>
/// <param name="Column">The column's name.</param>
/// <param name="Text">The value; empty where blank.</param>
/// <param name="Unit">Its unit; empty for none.</param>
/// <param name="Meaning">What the column says.</param>
/// <param name="Areal">The basin and the step's label where the value is areal rainfall, so that it can be traced to its gauges; else null.</param>
/// <param name="Steps">The steps behind it, the last first.</param>
public sealed record CellTrace(
    string File,
    int Line,
    string Row,
    string Column,
    string Text,
    string Unit,
    string Meaning,
    (string Basin, string Time, int? Step)? Areal,
    ImmutableArray<JournalEntry> Steps
);

/// <summary>Follows cells of emitted tables back.</summary>
/// <param name="replay">The study, run again.</param>
public sealed class TableTrace(StudyReplay replay)
{
    /// <summary>Traces a cell.</summary>
    /// <param name="table">The table's name, with or without <c>tables/</c> and <c>.csv</c>.</param>
    /// <param name="row">The line in the file, the header being 1, or the text of the row's first cell.</param>
    /// <param name="column">The column's name.</param>
    /// <exception cref="RefusedException">There is no such cell.</exception>
    public CellTrace Of(string table, string row, string column)
    {
        var file = FileOf(table);
        var emitted = replay.Record.Journal.First(entry => entry.FilesWritten.Contains(file, StringComparer.Ordinal));
        var source = replay.Record.Journal[emitted.Inputs[0].Entry - 1];
        var cells = ((ITabular)source.Output).ToTable();
        var (c, r) = (ColumnOf(file, cells, column), RowOf(file, cells, row));
        return new CellTrace(
            file,
            r + 2,
            TextAt(cells.Columns[0], r),
            column,
            TextAt(cells.Columns[c], r),
            cells.Columns[c].Unit,
            cells.Columns[c].Meaning,
            ArealAt(source, column, r),
            Ancestry.Of(replay.Record, emitted)
        );
    }

    /// <summary>Areal rainfall stands a step a row and a basin a column, so the cell names its value.</summary>
    private static (string Basin, string Time, int? Step)? ArealAt(JournalEntry source, string column, int row) =>
        source is { Output: ArealRainfall areal, Step: IArealStep }
        && areal.Basins.Basins.Any(basin => string.Equals(basin.Id, column, StringComparison.Ordinal))
            ? (column, areal.Times.TextAt(row), source.Number)
            : null;

    private static string TextAt(Column column, int row) =>
        column.Kind == ColumnKind.Text
            ? column.Texts[row]
            : column.Numbers[row]?.ToString("R", CultureInfo.InvariantCulture) ?? "";

    private string FileOf(string table)
    {
        var name = table.EndsWith(".csv", StringComparison.Ordinal) ? table : table + ".csv";
        name = name.StartsWith("tables/", StringComparison.Ordinal) ? name : "tables/" + name;
        string[] tables =
        [
            .. replay
                .Record.Journal.SelectMany(entry => entry.FilesWritten)
                .Where(file =>
                    file.StartsWith("tables/", StringComparison.Ordinal)
                    && !file.EndsWith(".columns.csv", StringComparison.Ordinal)
                ),
        ];
        return tables.Contains(name, StringComparer.Ordinal)
            ? name
            : throw Refusal(
                "RR0824",
                new Place(name),
                "The study has no such table.",
                NearWords.Mend(name, tables),
                tables
            );
    }

    private static int ColumnOf(string file, Table cells, string column)
    {
        string[] names = [.. cells.Columns.Select(item => item.Name)];
        var index = Array.IndexOf(names, column);
        return index >= 0
            ? index
            : throw Refusal(
                "RR0825",
                new Place(file, Item: $"column {column}"),
                "The table has no such column.",
                NearWords.Mend(column, names),
                names
            );
    }

    private static int RowOf(string file, Table cells, string row)
    {
        if (int.TryParse(row, NumberStyles.None, CultureInfo.InvariantCulture, out var line))
        {
            return line >= 2 && line - 2 < cells.RowCount ? line - 2 : throw NoRow(file, cells, row);
        }

        var rows = Enumerable
            .Range(0, cells.RowCount)
            .Where(r => string.Equals(TextAt(cells.Columns[0], r), row, StringComparison.Ordinal))
            .Take(2)
            .ToArray();
        return rows.Length == 1 ? rows[0] : throw NoRow(file, cells, row);
    }

    private static RefusedException NoRow(string file, Table cells, string row) =>
        new(
            Finding.Error(
                "RR0826",
                new Place(file, Item: $"row {row}"),
                "No row, or more than one, is named so.",
                FormattableString.Invariant(
                    $"Give the line in the file, 2 to {cells.RowCount + 1}, or a text that one row alone begins with."
                )
            )
        );

    private static RefusedException Refusal(string code, Place place, string what, string near, string[] names) =>
        new(Finding.Error(code, place, what, $"{near} There are {Listing.Of(names)}.".TrimStart()));
}

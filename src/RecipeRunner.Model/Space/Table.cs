using System.Collections.Immutable;

namespace RecipeRunner.Model.Space;

/// <summary>What the cells of a column hold.</summary>
public enum ColumnKind
{
    /// <summary>Text.</summary>
    Text,

    /// <summary>Numbers, or blank.</summary>
    Number,

    /// <summary>Whole numbers.</summary>
    Count,
}

/// <summary>A named column with its unit and meaning, so that a reader of the file need not guess.</summary>
public sealed class Column
{
    private Column(
        string name,
        string unit,
        string meaning,
        ColumnKind kind,
        int decimals,
        ImmutableArray<string> texts,
        ImmutableArray<double?> numbers
    )
    {
        Name = name;
        Unit = unit;
        Meaning = meaning;
        Kind = kind;
        Decimals = decimals;
        Texts = texts;
        Numbers = numbers;
    }

    /// <summary>The name in the file's header; at most ten letters, digits and underscores where it must survive in a shapefile.</summary>
    public string Name { get; }

    /// <summary>The unit, such as <c>mm</c>; empty for a column without one.</summary>
    public string Unit { get; }

    /// <summary>What the column says, in a few words.</summary>
    public string Meaning { get; }

    /// <summary>What its cells hold.</summary>
    public ColumnKind Kind { get; }

    /// <summary>The most digits that are written after the decimal point of a number, 0 to 15.</summary>
    public int Decimals { get; }

    /// <summary>The cells of a text column; empty otherwise.</summary>
    public ImmutableArray<string> Texts { get; }

    /// <summary>The cells of a number or count column, null where blank; empty otherwise.</summary>
    public ImmutableArray<double?> Numbers { get; }

    /// <summary>The number of cells.</summary>
    public int Length => Kind == ColumnKind.Text ? Texts.Length : Numbers.Length;

    /// <summary>A column of text.</summary>
    public static Column OfText(string name, string meaning, IEnumerable<string> cells) =>
        new(name, "", meaning, ColumnKind.Text, 0, [.. cells], []);

    /// <summary>A column of numbers; null is blank.</summary>
    /// <param name="name">The name in the file's header.</param>
    /// <param name="unit">The unit; empty for none.</param>
    /// <param name="decimals">The most digits to write after the decimal point, 0 to 15.</param>
    /// <param name="meaning">What the column says.</param>
    /// <param name="cells">The cells.</param>
    public static Column OfNumbers(
        string name,
        string unit,
        int decimals,
        string meaning,
        IEnumerable<double?> cells
    ) => new(name, unit, meaning, ColumnKind.Number, decimals, [], [.. cells]);

    /// <summary>A column of whole numbers.</summary>
    public static Column OfCounts(string name, string unit, string meaning, IEnumerable<int> cells) =>
        new(name, unit, meaning, ColumnKind.Count, 0, [], [.. cells.Select(cell => (double?)cell)]);
}

/// <summary>Columns of the same length.</summary>
public sealed class Table
{
    /// <summary>Creates the table.</summary>
    /// <param name="columns">Columns with distinct names and the same number of cells.</param>
    /// <exception cref="ArgumentException">Two columns share a name, or lengths differ.</exception>
    public Table(ImmutableArray<Column> columns)
    {
        if (columns.Select(column => column.Length).Distinct().Skip(1).Any())
        {
            throw new ArgumentException("The columns of a table must have the same number of cells.", nameof(columns));
        }

        if (
            columns.GroupBy(column => column.Name, StringComparer.Ordinal).FirstOrDefault(g => g.Skip(1).Any()) is
            { } twin
        )
        {
            throw new ArgumentException($"Two columns are named '{twin.Key}'.", nameof(columns));
        }

        Columns = columns;
    }

    /// <summary>The columns.</summary>
    public ImmutableArray<Column> Columns { get; }

    /// <summary>The number of rows; 0 without columns.</summary>
    public int RowCount => Columns.IsEmpty ? 0 : Columns[0].Length;
}

/// <summary>An artifact that can be written as a table.</summary>
public interface ITabular
{
    /// <summary>The artifact as columns, in a fixed order of rows.</summary>
    Table ToTable();
}

using nietras.SeparatedValues;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading.Texts;

/// <summary>Opens a text table (RFC 4180; comma, semicolon, tab or bar, found from its first row).</summary>
internal static class CsvText
{
    /// <summary>Opens the table before its first row.</summary>
    /// <exception cref="RefusedException">It is empty.</exception>
    public static SepReader Open(TextInput text)
    {
        if (text.Lines == 0)
        {
            throw Empty(text.Name);
        }

        return Sep.Reader(options =>
                options with
                {
                    Unescape = true,
                    DisableColCountCheck = true,
                    HasHeader = false,
                    DisableFastFloat = true,
                }
            )
            .From(text.Start());
    }

    /// <summary>Reads the header: column names without the blanks around them; nameless columns at the
    /// end, which spreadsheets leave, are not counted. The reader then stands before the first row.</summary>
    /// <exception cref="RefusedException">Two columns have one name.</exception>
    public static string[] Names(SepReader reader, string name)
    {
        if (!reader.MoveNext())
        {
            throw Empty(name);
        }

        var names = WithoutEmptyEnd(Cells(reader.Current));
        RequireDistinct(names, name);
        return names;
    }

    /// <summary>The cells of a row without the blanks around them.</summary>
    public static string[] Cells(SepReader.Row row) => [.. row[..].ToStringsArray().Select(cell => cell.Trim())];

    /// <summary>The cells up to the last that holds anything.</summary>
    public static string[] WithoutEmptyEnd(string[] cells) =>
        cells[..(Array.FindLastIndex(cells, cell => cell.Length > 0) + 1)];

    /// <summary>Refuses a header that names two columns alike.</summary>
    /// <exception cref="RefusedException">Two columns have one name.</exception>
    public static void RequireDistinct(string[] names, string name)
    {
        var twins = names
            .Where(column => column.Length > 0)
            .GroupBy(column => column, StringComparer.Ordinal)
            .Where(group => group.Skip(1).Any())
            .ToArray();
        var problems = new Problems();
        foreach (var twin in twins)
        {
            problems.Add(
                "RR0202",
                new Place(name, 1, Array.LastIndexOf(names, twin.Key) + 1),
                $"The header names the column '{twin.Key}' more than once.",
                "Give each column a name of its own."
            );
        }

        problems.ThrowIfAny();
    }

    /// <summary>The line on which a row begins. The library counts the first row as if it stood on the second line.</summary>
    public static int LineOf(SepReader.Row row) => row.RowIndex == 0 ? 1 : row.LineNumberFrom;

    /// <summary>True for an empty line, which says nothing.</summary>
    public static bool IsBlank(SepReader.Row row) => row.ColCount == 1 && row[0].Span.Trim().IsEmpty;

    /// <summary>True where a row has a cell for each named column; cells beyond them are blank.</summary>
    public static bool Fits(SepReader.Row row, int columns)
    {
        for (var column = columns; column < row.ColCount; column++)
        {
            if (!row[column].Span.Trim().IsEmpty)
            {
                return false;
            }
        }

        return row.ColCount >= columns;
    }

    /// <summary>The refusal of a table without a row.</summary>
    public static RefusedException Empty(string name) =>
        new(
            Finding.Error(
                "RR0201",
                new Place(name),
                "The file is empty.",
                "Was it copied whole? A table starts with a header line that names its columns."
            )
        );
}

using nietras.SeparatedValues;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading;

/// <summary>Opens a text table (RFC 4180; comma, semicolon, tab or bar, found from the header) and checks that it is UTF-8.</summary>
internal static class CsvText
{
    /// <summary>Opens the table before its header, which is line 1.</summary>
    /// <exception cref="RefusedException">It is empty, or not UTF-8.</exception>
    public static SepReader Open(Stream stream, string name)
    {
        Utf8Text.Require(stream, name);
        if (stream.Length == 0)
        {
            throw Empty(name);
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
            .From(stream);
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

        var names = reader.Current[..].ToStringsArray().Select(column => column.Trim()).ToArray();
        names = names[..(Array.FindLastIndex(names, column => column.Length > 0) + 1)];
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
        return names;
    }

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

    private static RefusedException Empty(string name) =>
        new(
            Finding.Error(
                "RR0201",
                new Place(name),
                "The file is empty.",
                "Was it copied whole? A table starts with a header line that names its columns."
            )
        );
}

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
            throw new RefusedException(
                Finding.Error(
                    "RR0201",
                    new Place(name),
                    "The file is empty.",
                    "Was it copied whole? A table starts with a header line that names its columns."
                )
            );
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

    /// <summary>Reads the header: column names without the blanks around them. The reader then stands before the first row.</summary>
    /// <exception cref="RefusedException">Two columns have one name.</exception>
    public static string[] Names(SepReader reader, string name)
    {
        reader.MoveNext();
        var names = reader.Current[..].ToStringsArray().Select(column => column.Trim()).ToArray();
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
}

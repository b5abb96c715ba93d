using nietras.SeparatedValues;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>Puts a time together from the cells of its parts: year, month, day, hour, minute; or date and time of day.</summary>
internal static class TimeCells
{
    /// <summary>The most columns over which a time is split.</summary>
    public const int MostColumns = 5;

    private const string Before = "--T:";

    /// <summary>The time of a row.</summary>
    public static string Of(string[] cells, int[] columns) =>
        columns.Length == 1 ? CellAt(cells, columns[0]) : Join([.. columns.Select(column => CellAt(cells, column))]);

    /// <summary>The time of a row; cells must be there.</summary>
    public static ReadOnlySpan<char> Of(SepReader.Row row, int[] columns)
    {
        if (columns.Length == 1)
        {
            return row[columns[0]].Span.Trim();
        }

        var parts = new string[columns.Length];
        for (var i = 0; i < parts.Length; i++)
        {
            parts[i] = row[columns[i]].Span.Trim().ToString();
        }

        return Join(parts);
    }

    private static string CellAt(string[] cells, int column) => column < cells.Length ? cells[column] : "";

    private static string Join(string[] parts)
    {
        if (parts is [{ Length: > 4 }, var clock])
        {
            return $"{parts[0]}T{(clock.IndexOf(':', StringComparison.Ordinal) == 1 ? "0" : "")}{clock}";
        }

        var text = parts[0];
        for (var i = 1; i < parts.Length; i++)
        {
            text += Before[i - 1] + parts[i].PadLeft(2, '0');
        }

        return parts.Length == 4 ? text + ":00" : text;
    }
}

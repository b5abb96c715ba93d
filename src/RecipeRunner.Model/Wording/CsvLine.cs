namespace RecipeRunner.Model.Wording;

/// <summary>Writes lines of comma-separated values (RFC 4180).</summary>
public static class CsvLine
{
    /// <summary>The cells as one line without its end; a cell stands in quotes where it holds a comma, a quote or a line end.</summary>
    /// <param name="cells">The cells.</param>
    public static string Of(IEnumerable<string> cells) => string.Join(',', cells.Select(Quoted));

    private static string Quoted(string cell) =>
        cell.AsSpan().IndexOfAny(",\"\r\n") < 0 ? cell : $"\"{cell.Replace("\"", "\"\"", StringComparison.Ordinal)}\"";
}

namespace RecipeRunner.Steps.Peeking;

/// <summary>Marks that are so usual that a look at a file takes them for what they nearly always mean (common practice, no source).</summary>
internal static class UsualMarks
{
    private static readonly string[] Missing =
    [
        "-9999",
        "-9999.0",
        "-999",
        "-999.0",
        "-999.9",
        "-99.9",
        "-99",
        "NA",
        "NaN",
        "nan",
        "NULL",
        "null",
        "M",
        "-",
        "--",
    ];

    private static readonly string[] Trace = ["T", "Tr", "TR", "t", "tr"];

    /// <summary>True for a usual mark of a missing value.</summary>
    public static bool IsMissing(ReadOnlySpan<char> text) => Holds(Missing, text);

    /// <summary>True for a usual mark of a trace.</summary>
    public static bool IsTrace(ReadOnlySpan<char> text) => Holds(Trace, text);

    private static bool Holds(string[] texts, ReadOnlySpan<char> text)
    {
        foreach (var candidate in texts)
        {
            if (text.SequenceEqual(candidate))
            {
                return true;
            }
        }

        return false;
    }
}

using System.Globalization;

namespace RecipeRunner.Testing;

/// <summary>Reads the comma-separated reference files, quoted fields included.</summary>
public static class ReferenceTable
{
    /// <summary>The rows of a file below tests/reference, each by column name.</summary>
    public static List<Dictionary<string, string>> Rows(string relative)
    {
        var lines = File.ReadLines(ReferenceFolder.PathOf(relative)).Select(Split).ToArray();
        return
        [
            .. lines
                .Skip(1)
                .Select(line =>
                    lines[0].Zip(line).ToDictionary(pair => pair.First, pair => pair.Second, StringComparer.Ordinal)
                ),
        ];
    }

    /// <summary>A number of a row.</summary>
    public static double Number(this Dictionary<string, string> row, string column) =>
        double.Parse(row[column], CultureInfo.InvariantCulture);

    private static string[] Split(string line)
    {
        var fields = new List<string> { "" };
        var quoted = false;
        foreach (var letter in line)
        {
            if (letter == '"')
            {
                quoted = !quoted;
            }
            else if (letter == ',' && !quoted)
            {
                fields.Add("");
            }
            else
            {
                fields[^1] += letter;
            }
        }

        return [.. fields];
    }
}

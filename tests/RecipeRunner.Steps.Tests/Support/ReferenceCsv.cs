using nietras.SeparatedValues;
using RecipeRunner.Testing;

namespace RecipeRunner.Steps.Tests.Support;

/// <summary>Reads the tables of tests/reference.</summary>
public static class ReferenceCsv
{
    /// <summary>The rows, each by column name.</summary>
    public static List<Dictionary<string, string>> Rows(string relative)
    {
        using var reader = Sep.Reader(options => options with { Unescape = true })
            .FromFile(ReferenceFolder.PathOf(relative));
        var names = reader.Header.ColNames;
        var rows = new List<Dictionary<string, string>>();
        foreach (var row in reader)
        {
            var cells = new Dictionary<string, string>(StringComparer.Ordinal);
            for (var c = 0; c < names.Count; c++)
            {
                cells.Add(names[c], row[c].ToString());
            }

            rows.Add(cells);
        }

        return rows;
    }

    /// <summary>A cell as a number.</summary>
    public static double Number(this Dictionary<string, string> row, string column) =>
        double.Parse(row[column], System.Globalization.CultureInfo.InvariantCulture);
}

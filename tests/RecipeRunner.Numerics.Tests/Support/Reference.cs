using System.Globalization;

namespace RecipeRunner.Numerics.Tests.Support;

/// <summary>Reads the outside data of tests/reference.</summary>
internal static class Reference
{
    private static readonly string Folder = FindFolder();

    public static string PathOf(string file) => Path.Combine(Folder, file);

    /// <summary>The rows of a file whose fields hold no quotes, each a lookup by column name.</summary>
    public static List<Dictionary<string, string>> Rows(string file)
    {
        string[] lines = File.ReadAllLines(PathOf(file));
        string[] names = lines[0].Split(',');
        return [.. lines.Skip(1).Select(line => ToRow(names, line.Split(',')))];
    }

    public static double Number(this Dictionary<string, string> row, string column) =>
        double.Parse(row[column], NumberStyles.Float, CultureInfo.InvariantCulture);

    private static Dictionary<string, string> ToRow(string[] names, string[] fields)
    {
        fields.Length.ShouldBe(names.Length);
        return names.Zip(fields).ToDictionary(pair => pair.First, pair => pair.Second, StringComparer.Ordinal);
    }

    private static string FindFolder()
    {
        for (DirectoryInfo? at = new(AppContext.BaseDirectory); at is not null; at = at.Parent)
        {
            string candidate = Path.Combine(at.FullName, "tests", "reference");
            if (Directory.Exists(candidate))
            {
                return candidate;
            }
        }

        throw new DirectoryNotFoundException("tests/reference is not above the test's folder");
    }
}

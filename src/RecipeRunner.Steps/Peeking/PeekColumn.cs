using System.Globalization;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Peeking;

/// <summary>What a column holds, gathered cell by cell in little room.</summary>
internal sealed class PeekColumn(string name)
{
    private const int MostDistinct = 1000;
    private const int Shown = 3;
    private static readonly string[] UsualMarkers = ["-9999", "-999", "-99.9", "-99", "NA", "NaN", "M", "-"];

    private readonly HashSet<string> distinct = new(StringComparer.Ordinal);
    private readonly List<string> examples = [];
    private int blanks;
    private int numbers;
    private double lowest = double.PositiveInfinity;
    private double highest = double.NegativeInfinity;
    private string odd = "";

    /// <summary>The column's name.</summary>
    public string Name => name;

    /// <summary>The number of cells.</summary>
    public int Count { get; private set; }

    /// <summary>The first cell; empty where there is none.</summary>
    public string First { get; private set; } = "";

    /// <summary>Usual marks of a missing value that stand in it.</summary>
    public HashSet<string> Markers { get; } = new(StringComparer.Ordinal);

    /// <summary>Takes in a cell.</summary>
    public void Add(ReadOnlySpan<char> cell)
    {
        if (Count++ == 0)
        {
            First = cell.ToString();
        }

        if (cell.IsEmpty)
        {
            blanks++;
            return;
        }

        AddNumber(cell);
        AddText(cell);
        foreach (var marker in UsualMarkers)
        {
            if (cell.SequenceEqual(marker))
            {
                Markers.Add(marker);
            }
        }
    }

    /// <summary>The column in a few words.</summary>
    public string Describe()
    {
        var empty = blanks == 0 ? "" : string.Create(CultureInfo.InvariantCulture, $", {blanks:N0} blank");
        if (numbers > 0 && numbers == Count - blanks)
        {
            return string.Create(
                CultureInfo.InvariantCulture,
                $"numbers from {lowest:0.######} to {highest:0.######}{empty}"
            );
        }

        var mixed = numbers > 0 ? $", some not numbers, such as '{odd}'" : "";
        var many = distinct.Count == MostDistinct ? " or more" : "";
        return string.Create(
            CultureInfo.InvariantCulture,
            $"text, {distinct.Count:N0}{many} different, such as {string.Join(", ", examples)}{mixed}{empty}"
        );
    }

    private void AddNumber(ReadOnlySpan<char> cell)
    {
        if (NumberText.TryRead(cell, out var number))
        {
            numbers++;
            lowest = Math.Min(lowest, number);
            highest = Math.Max(highest, number);
        }
        else if (odd.Length == 0)
        {
            odd = cell.ToString();
        }
    }

    private void AddText(ReadOnlySpan<char> cell)
    {
        if (distinct.Count < MostDistinct && distinct.Add(cell.ToString()) && examples.Count < Shown)
        {
            examples.Add(cell.ToString());
        }
    }
}

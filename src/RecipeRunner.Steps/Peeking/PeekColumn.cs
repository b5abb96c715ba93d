using System.Globalization;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Peeking;

/// <summary>What a column holds, gathered cell by cell in little room.</summary>
internal sealed class PeekColumn(string name)
{
    private const int MostDistinct = 1000;
    private const int Shown = 3;

    private readonly HashSet<string> distinct = new(StringComparer.Ordinal);
    private readonly List<string> examples = [];
    private int blanks;
    private int numbers;
    private int marks;
    private double lowest = double.PositiveInfinity;
    private double highest = double.NegativeInfinity;
    private string odd = "";

    /// <summary>The column's name.</summary>
    public string Name => name;

    /// <summary>The number of cells.</summary>
    public int Count { get; private set; }

    /// <summary>The first cell; empty where there is none.</summary>
    public string First { get; private set; } = "";

    /// <summary>True where at least half of the cells that hold anything are numbers, or the usual marks beside numbers.</summary>
    public bool IsNumeric => 2 * (numbers + marks) >= Count - blanks;

    /// <summary>True where any cell is a number.</summary>
    public bool HasNumbers => numbers > 0;

    /// <summary>True where some text stands in it more than once.</summary>
    public bool Repeats => distinct.Count < Count - blanks;

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
            return;
        }

        marks += UsualMarks.IsMissing(cell) || UsualMarks.IsTrace(cell) ? 1 : 0;
        if (odd.Length == 0)
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

using System.Collections.Immutable;
using System.Globalization;

namespace RecipeRunner.Host.Comparing;

/// <summary>Tells which lines of a recipe changed, by the longest sequence of lines that both have.</summary>
internal static class RecipeLines
{
    /// <summary>The lines that went and came, in the recipe's order.</summary>
    public static ImmutableArray<Change> Changed(string[] was, string[] now)
    {
        var kept = Kept(was, now);
        var changes = ImmutableArray.CreateBuilder<Change>();
        var (i, j) = (0, 0);
        while (i < was.Length || j < now.Length)
        {
            if (i < was.Length && j < now.Length && string.Equals(was[i], now[j], StringComparison.Ordinal))
            {
                (i, j) = (i + 1, j + 1);
            }
            else if (j == now.Length || (i < was.Length && kept[i + 1, j] >= kept[i, j + 1]))
            {
                changes.Add(new Change(Name(i), was[i], ""));
                i++;
            }
            else
            {
                changes.Add(new Change(Name(j), "", now[j]));
                j++;
            }
        }

        return changes.ToImmutable();
    }

    /// <summary>How many lines can be kept from each pair of places on.</summary>
    private static int[,] Kept(string[] was, string[] now)
    {
        var kept = new int[was.Length + 1, now.Length + 1];
        for (var i = was.Length - 1; i >= 0; i--)
        {
            for (var j = now.Length - 1; j >= 0; j--)
            {
                kept[i, j] = string.Equals(was[i], now[j], StringComparison.Ordinal)
                    ? kept[i + 1, j + 1] + 1
                    : Math.Max(kept[i + 1, j], kept[i, j + 1]);
            }
        }

        return kept;
    }

    private static string Name(int index) => string.Create(CultureInfo.InvariantCulture, $"line {index + 1}");
}

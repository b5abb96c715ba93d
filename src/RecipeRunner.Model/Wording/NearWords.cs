namespace RecipeRunner.Model.Wording;

/// <summary>Finds the names that a misspelt name may have meant.</summary>
public static class NearWords
{
    /// <summary>Up to three candidates near a word, nearest first: at most a third of its letters differ, or one holds the other.</summary>
    /// <param name="word">The word that was not found.</param>
    /// <param name="candidates">The words that exist.</param>
    public static IReadOnlyList<string> Find(string word, IEnumerable<string> candidates) =>
        [
            .. candidates
                .Distinct(StringComparer.Ordinal)
                .Select(candidate =>
                    (candidate, distance: Distance(word.ToUpperInvariant(), candidate.ToUpperInvariant()))
                )
                .Where(pair => pair.distance <= Math.Max(1, word.Length / 3) || Holds(word, pair.candidate))
                .OrderBy(pair => pair.distance)
                .ThenBy(pair => pair.candidate, StringComparer.Ordinal)
                .Take(3)
                .Select(pair => pair.candidate),
        ];

    /// <summary>A sentence that offers the near words; empty where none is near.</summary>
    /// <param name="word">The word that was not found.</param>
    /// <param name="candidates">The words that exist.</param>
    public static string Mend(string word, IEnumerable<string> candidates)
    {
        var near = Find(word, candidates);
        return near.Count == 0 ? "" : $"Did you mean {string.Join(" or ", near)}?";
    }

    private static bool Holds(string word, string candidate) =>
        word.Length >= 3
        && candidate.Length >= 3
        && (
            candidate.Contains(word, StringComparison.OrdinalIgnoreCase)
            || word.Contains(candidate, StringComparison.OrdinalIgnoreCase)
        );

    /// <summary>The number of letters to insert, drop, change, or swap with the next (Damerau 1964, doi:10.1145/363958.363994).</summary>
    private static int Distance(string a, string b)
    {
        var (earlier, row) = (new int[b.Length + 1], Enumerable.Range(0, b.Length + 1).ToArray());
        for (var i = 1; i <= a.Length; i++)
        {
            var next = new int[b.Length + 1];
            next[0] = i;
            for (var j = 1; j <= b.Length; j++)
            {
                var change = row[j - 1] + (a[i - 1] == b[j - 1] ? 0 : 1);
                next[j] = Math.Min(change, Math.Min(row[j], next[j - 1]) + 1);
                if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1])
                {
                    next[j] = Math.Min(next[j], earlier[j - 2] + 1);
                }
            }

            (earlier, row) = (row, next);
        }

        return row[b.Length];
    }
}

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

    /// <summary>The number of letters to insert, drop or change (Levenshtein 1966).</summary>
    private static int Distance(string a, string b)
    {
        var row = Enumerable.Range(0, b.Length + 1).ToArray();
        for (var i = 1; i <= a.Length; i++)
        {
            var diagonal = row[0];
            row[0] = i;
            for (var j = 1; j <= b.Length; j++)
            {
                var change = diagonal + (a[i - 1] == b[j - 1] ? 0 : 1);
                diagonal = row[j];
                row[j] = Math.Min(change, Math.Min(row[j], row[j - 1]) + 1);
            }
        }

        return row[b.Length];
    }
}

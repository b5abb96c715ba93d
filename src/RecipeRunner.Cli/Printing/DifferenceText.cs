using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Host.Comparing;

namespace RecipeRunner.Cli.Printing;

/// <summary>What changed from one study to another, in lines for a terminal.</summary>
internal static class DifferenceText
{
    private const int Most = 8;
    private const int TextShown = 70;
    private const int DigestShown = 12;

    public static IEnumerable<string> Of(StudyDifference difference, string was, string now) =>
        difference.IsEmpty
            ? [$"NO DIFFERENCE  {was} and {now} have the same inputs, settings, recipe and values"]
            :
            [
                $"DIFFERENT      {was} and {now}",
                .. Lines("tool", difference.Tools),
                .. Lines("input", difference.Inputs, DigestShown),
                .. Lines("setting", difference.Settings),
                .. Lines("recipe", difference.RecipeLines),
                .. Lines("gauge", difference.Gauges),
                .. Lines("basin", difference.Basins),
                .. Lines("weight", difference.Weights),
                $"  {"rain", -8} {DifferenceWords.Rain(difference)}",
                .. Worst(difference),
            ];

    private static IEnumerable<string> Lines(string word, ImmutableArray<Change> changes, int length = TextShown)
    {
        foreach (var change in changes.Take(Most))
        {
            yield return $"  {word, -8} {change.Name}: {Text(change.Was, length)} -> {Text(change.Is, length)}";
        }

        if (changes.Length > Most)
        {
            yield return string.Create(CultureInfo.InvariantCulture, $"  {word, -8} and {changes.Length - Most} more");
        }
    }

    private static IEnumerable<string> Worst(StudyDifference difference) =>
        difference
            .Rain.OrderByDescending(change => Math.Abs(change.Difference))
            .Take(Most)
            .Select(change =>
            {
                var cells = DifferenceTable.Row(change);
                return $"  {"largest", -8} {cells[0]} {cells[1]}: {cells[2]} -> {cells[3]} mm; settings {cells[5]}, weights {cells[6]}, gauges reporting {cells[7]}, depths {cells[8]}";
            });

    private static string Text(string text, int length) =>
        text.Length == 0 ? "nothing"
        : text.Length > length ? text[..length] + "…"
        : text;
}

using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Host.Summarising;

namespace RecipeRunner.Host.Comparing;

/// <summary>What changed from one study to another, as one page for people.</summary>
public static class DifferencePage
{
    private const int MostRows = 400;

    /// <summary>The page, self-contained.</summary>
    /// <param name="difference">What changed.</param>
    /// <param name="was">The first study as the person named it.</param>
    /// <param name="now">The second.</param>
    public static string Of(StudyDifference difference, string was, string now)
    {
        var page = PageFrame
            .Open($"What changed from {was} to {now}")
            .Element("h1", "What changed between two studies")
            .Element("p", $"From {was} to {now}.")
            .Element("p class=\"caution\"", Caution.Text);
        RainSection(page, difference);
        Section(page, "Tool", difference.Tools);
        Section(page, "Inputs", difference.Inputs);
        Section(page, "Settings", difference.Settings);
        Section(page, "Recipe lines", difference.RecipeLines);
        Section(page, "Gauges", difference.Gauges);
        Section(page, "Basins", difference.Basins);
        Section(page, "Weights of the full network", difference.Weights);
        return PageFrame.Close(page);
    }

    private static void RainSection(Html page, StudyDifference difference)
    {
        page.Element("h2", "Areal rainfall");
        page.Element("p", DifferenceWords.Rain(difference));
        if (difference.Rain.IsEmpty)
        {
            return;
        }

        page.Table(
            "The largest changes in mm. Parts: other settings, other weights, other gauges reporting, other depths; they add up to the difference.",
            [.. DifferenceTable.Heads.Select((head, i) => (i < 2 ? "" : ">") + head.Replace('_', ' '))],
            difference
                .Rain.OrderByDescending(change => Math.Abs(change.Difference))
                .Take(MostRows)
                .Select(DifferenceTable.Row)
        );
    }

    private static void Section(Html page, string heading, ImmutableArray<Change> changes)
    {
        if (changes.IsEmpty)
        {
            return;
        }

        page.Element("h2", heading);
        page.Table(
            string.Create(
                CultureInfo.InvariantCulture,
                $"{changes.Length} differ{(changes.Length > MostRows ? $"; the first {MostRows} are shown" : "")}."
            ),
            ["what", "was", "is"],
            changes.Take(MostRows).Select(change => (string[])[change.Name, change.Was, change.Is])
        );
    }
}

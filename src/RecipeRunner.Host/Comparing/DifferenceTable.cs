using System.Globalization;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Host.Comparing;

/// <summary>Changed areal values as rows for people and machines.</summary>
public static class DifferenceTable
{
    /// <summary>The columns: basin, step, values in mm, and the four parts, which add up to the difference.</summary>
    public static IReadOnlyList<string> Heads { get; } =
    [
        "basin",
        "step",
        "was_mm",
        "is_mm",
        "difference_mm",
        "by_settings_mm",
        "by_weights_mm",
        "by_reporting_mm",
        "by_depths_mm",
    ];

    /// <summary>
    /// One change as cells under <see cref="Heads"/>. The digits that are written add up as well: what rounding leaves over goes to
    /// the largest part.
    /// </summary>
    public static IReadOnlyList<string> Row(RainChange change)
    {
        var (was, now) = (Written(change.WasMillimetres), Written(change.IsMillimetres));
        decimal[] parts =
        [
            Written(change.BySettings),
            Written(change.ByWeights),
            Written(change.ByReporting),
            Written(change.ByDepths),
        ];
        var largest = Array.IndexOf(parts, parts.MaxBy(Math.Abs));
        parts[largest] += now - was - parts.Sum();
        return
        [
            change.Basin,
            change.Step,
            .. new[] { was, now, now - was }
                .Concat(parts)
                .Select(number => number.ToString("0.#########", CultureInfo.InvariantCulture)),
        ];
    }

    /// <summary>All changes as lines of CSV (RFC 4180).</summary>
    public static IEnumerable<string> Csv(StudyDifference difference) =>
        difference.Rain.Select(change => CsvLine.Of(Row(change))).Prepend(CsvLine.Of(Heads));

    private static decimal Written(double number) => Math.Round((decimal)number, 9);
}

using System.Globalization;

namespace RecipeRunner.Host.Comparing;

/// <summary>Differences in a sentence or two.</summary>
public static class DifferenceWords
{
    /// <summary>How areal values changed, and because of what.</summary>
    public static string Rain(StudyDifference difference)
    {
        if (difference.NotCompared.Length > 0)
        {
            return difference.NotCompared;
        }

        var rain = difference.Rain;
        var head = string.Create(
            CultureInfo.InvariantCulture,
            $"{rain.Length + difference.WithoutParts:N0} of {difference.ValuesInBoth:N0} values differ; {difference.ValuesGone:N0} are only in the first study, {difference.ValuesNew:N0} only in the second."
        );
        return rain.IsEmpty
            ? head
            : head
                + string.Create(
                    CultureInfo.InvariantCulture,
                    $" Sums of absolute parts in mm: settings {Sum(difference, c => c.BySettings):0.0##}, weights {Sum(difference, c => c.ByWeights):0.0##}, gauges reporting {Sum(difference, c => c.ByReporting):0.0##}, depths {Sum(difference, c => c.ByDepths):0.0##}."
                );
    }

    private static double Sum(StudyDifference difference, Func<RainChange, double> part) =>
        difference.Rain.Sum(change => Math.Abs(part(change)));
}

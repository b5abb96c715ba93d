using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Comparing;

/// <summary>
/// Says because of what areal values changed: on the way from the first study to the second, settings change first, then weights,
/// then the gauges that report, then their depths, and each change of a value on that way is the part of that cause. The last
/// part is the rest, so the parts add up to the difference.
/// </summary>
internal sealed class RainAttribution
{
    private readonly ArealRainfall was;
    private readonly NamedSeries now;
    private readonly NamedSeries otherSettings;
    private readonly NamedSeries otherWeights;
    private readonly NamedSeries otherReporting;

    private RainAttribution((IArealStep Step, ArealRainfall Areal) first, (IArealStep Step, ArealRainfall Areal) second)
    {
        was = first.Areal;
        now = new NamedSeries(second.Areal);
        otherSettings = new NamedSeries(second.Step.Recompute(first.Step.Weights, first.Step.Rain));
        otherWeights = new NamedSeries(second.Step.Recompute(second.Step.Weights, first.Step.Rain));
        otherReporting = new NamedSeries(
            second.Step.Recompute(second.Step.Weights, MixedRecords.Of(first.Step.Rain, second.Step.Rain))
        );
    }

    /// <summary>Adds the changes of areal values to a difference.</summary>
    public static StudyDifference Add(
        StudyDifference difference,
        (IArealStep Step, ArealRainfall Areal) first,
        (IArealStep Step, ArealRainfall Areal) second
    ) => new RainAttribution(first, second).Into(difference);

    private StudyDifference Into(StudyDifference difference)
    {
        var changes = new List<RainChange>();
        var (both, gone, without) = (0, 0, 0);
        for (var b = 0; b < was.Basins.Basins.Length; b++)
        {
            for (var t = 0; t < was.Times.Count; t++)
            {
                if (was.At(t, b).DepthMillimetres is not { } before)
                {
                    continue;
                }

                var (basin, label) = (was.Basins.Basins[b].Id, was.Times.LabelAt(t));
                if (now.At(basin, label) is not { } after)
                {
                    gone++;
                    continue;
                }

                both++;
                if (!before.Equals(after) && Parts(basin, label, before, after) is var change)
                {
                    without += change is null ? 1 : 0;
                    changes.AddRange(change is null ? [] : [change]);
                }
            }
        }

        return difference with
        {
            Rain = [.. changes],
            ValuesInBoth = both,
            ValuesGone = gone,
            ValuesNew = now.GivenCount - both,
            WithoutParts = without,
        };
    }

    private RainChange? Parts(string basin, LocalDateTime label, double before, double after)
    {
        if (
            otherSettings.At(basin, label) is not { } settings
            || otherWeights.At(basin, label) is not { } weights
            || otherReporting.At(basin, label) is not { } reporting
        )
        {
            return null;
        }

        var (bySettings, byWeights, byReporting) = (settings - before, weights - settings, reporting - weights);
        var rest = after - before - bySettings - byWeights - byReporting;
        return new RainChange(
            basin,
            was.Times.Step.LabelText(label),
            before,
            after,
            bySettings,
            byWeights,
            byReporting,
            rest
        );
    }
}

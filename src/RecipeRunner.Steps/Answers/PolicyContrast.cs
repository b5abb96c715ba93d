using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Time;
using RecipeRunner.Numerics.Statistics;

namespace RecipeRunner.Steps.Answers;

/// <summary>How far the gap policies part in one basin and season.</summary>
internal sealed record PolicyContrast
{
    private const string Both = "over the steps at which Redraw and Rescale have a value; blank where there are none";

    /// <summary>Index of the basin.</summary>
    public required int Basin { get; init; }

    /// <summary>Part of the year.</summary>
    public required string Season { get; init; }

    /// <summary>Steps of the record.</summary>
    public required int Steps { get; init; }

    /// <summary>Steps at which all gauges with weight reported: there all policies agree, and Withhold has a value.</summary>
    public required int Complete { get; init; }

    /// <summary>Steps with a value under Redraw.</summary>
    public required int RedrawGiven { get; init; }

    /// <summary>Steps with a value under Rescale.</summary>
    public required int RescaleGiven { get; init; }

    /// <summary>Steps with a value under both of them.</summary>
    public required int Shared { get; init; }

    /// <summary>Millimetres under Redraw, where both have a value.</summary>
    public required double RedrawSum { get; init; }

    /// <summary>Millimetres under Rescale, where both have a value.</summary>
    public required double RescaleSum { get; init; }

    /// <summary>Millimetres under Withhold.</summary>
    public required double CompleteSum { get; init; }

    /// <summary>Rescale minus Redraw at the step where they part most; 0 where they never do.</summary>
    public required double Largest { get; init; }

    /// <summary>That step; -1 where they never part.</summary>
    public required int LargestStep { get; init; }

    /// <summary>The contrast over some steps.</summary>
    public static PolicyContrast Of(ArealRainfall redraw, ArealRainfall rescale, int basin, string season, int[] steps)
    {
        var (redrawSum, rescaleSum, completeSum) = (
            default(CompensatedSum),
            default(CompensatedSum),
            default(CompensatedSum)
        );
        var (largest, largestStep, shared) = (0.0, -1, 0);
        foreach (var t in steps)
        {
            if (
                redraw.At(t, basin).DepthMillimetres is not { } drawn
                || rescale.At(t, basin).DepthMillimetres is not { } scaled
            )
            {
                continue;
            }

            shared++;
            redrawSum.Add(drawn);
            rescaleSum.Add(scaled);
            completeSum.Add(redraw.At(t, basin).Status == ArealStatus.Complete ? drawn : 0);
            (largest, largestStep) =
                Math.Abs(scaled - drawn) > Math.Abs(largest) ? (scaled - drawn, t) : (largest, largestStep);
        }

        return new PolicyContrast
        {
            Basin = basin,
            Season = season,
            Steps = steps.Length,
            Complete = steps.Count(t => redraw.At(t, basin).Status == ArealStatus.Complete),
            RedrawGiven = steps.Count(t => redraw.At(t, basin).Status != ArealStatus.Withheld),
            RescaleGiven = steps.Count(t => rescale.At(t, basin).Status != ArealStatus.Withheld),
            Shared = shared,
            RedrawSum = redrawSum.Value,
            RescaleSum = rescaleSum.Value,
            CompleteSum = completeSum.Value,
            Largest = largest,
            LargestStep = largestStep,
        };
    }

    /// <summary>
    /// Columns <c>basin, season, steps, steps_redraw, steps_rescale, steps_withhold, redraw_mm, rescale_mm, difference_mm,
    /// difference_percent, largest_mm, largest_end, withhold_mm, left_out_percent</c>.
    /// </summary>
    public static Table TableOf(PolicyContrast[] rows, BasinLayer basins, Timeline times) =>
        new([
            Column.OfText("basin", "Basin id", rows.Select(row => basins.Basins[row.Basin].Id)),
            Column.OfText("season", "Part of the year, all years together", rows.Select(row => row.Season)),
            Column.OfCounts("steps", "", "Steps of the record", rows.Select(row => row.Steps)),
            Column.OfCounts("steps_redraw", "", "Steps with a value under Redraw", rows.Select(row => row.RedrawGiven)),
            Column.OfCounts(
                "steps_rescale",
                "",
                "Steps with a value under Rescale",
                rows.Select(row => row.RescaleGiven)
            ),
            Column.OfCounts(
                "steps_withhold",
                "",
                "Steps with a value under Withhold: those at which every gauge with weight reported",
                rows.Select(row => row.Complete)
            ),
            Column.OfNumbers(
                "redraw_mm",
                "mm",
                6,
                $"Sum under Redraw, {Both}",
                rows.Select(row => row.Shared == 0 ? null : (double?)row.RedrawSum)
            ),
            Column.OfNumbers(
                "rescale_mm",
                "mm",
                6,
                $"Sum under Rescale, {Both}",
                rows.Select(row => row.Shared == 0 ? null : (double?)row.RescaleSum)
            ),
            Column.OfNumbers(
                "difference_mm",
                "mm",
                6,
                "Rescale minus Redraw",
                rows.Select(row => row.Shared == 0 ? null : (double?)(row.RescaleSum - row.RedrawSum))
            ),
            Column.OfNumbers(
                "difference_percent",
                "%",
                4,
                "That difference in percent of the sum under Redraw; blank without rain",
                rows.Select(row => Percent(row.RescaleSum - row.RedrawSum, row.RedrawSum))
            ),
            Column.OfNumbers(
                "largest_mm",
                "mm",
                6,
                "Rescale minus Redraw at the step where they part most",
                rows.Select(row => row.Shared == 0 ? null : (double?)row.Largest)
            ),
            Column.OfText(
                "largest_end",
                "Local time at which that step ended; blank where they never part",
                rows.Select(row => row.LargestStep < 0 ? "" : times.IntervalAt(row.LargestStep).EndText)
            ),
            Column.OfNumbers(
                "withhold_mm",
                "mm",
                6,
                "Sum under Withhold; blank where it has no value",
                rows.Select(row => row.Complete == 0 ? null : (double?)row.CompleteSum)
            ),
            Column.OfNumbers(
                "left_out_percent",
                "%",
                4,
                "Rain of Redraw at the steps that Withhold leaves out, in percent; blank without rain",
                rows.Select(row => Percent(row.RedrawSum - row.CompleteSum, row.RedrawSum))
            ),
        ]);

    private static double? Percent(double part, double whole) => whole > 0 ? 100 * part / whole : null;
}

using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Answers;

/// <summary>
/// Ranks the basins of one storm by their mean depth and gives the mean depth over the wettest one, two and more of them, against
/// their area together: the depth-area relation of the storm. Areas are added up, so basins should not lie within each other.
/// </summary>
/// <param name="Storms">Storms.</param>
/// <param name="Storm">The storm's number, from 1.</param>
/// <param name="Basins">The basins to rank; all where not given.</param>
/// <example><code>EmitTable(storms.DepthArea(storm: 1), "depth-area");</code></example>
[Step("Depth-area", Word = "depth-area", Source = "WMO-No. 1045, Manual on Estimation of PMP, 2009 (from memory)")]
public sealed record DepthAreaStep(StormList Storms, int Storm, ImmutableArray<string> Basins) : Step<ResultTable>
{
    /// <inheritdoc/>
    public override ResultTable Execute(StepContext context)
    {
        var storm = StormNumber.Of(Storms, Storm);
        var chosen = Chosen();
        TellOfNested(context, [.. chosen.Select(b => Storms.Areal.Basins.Basins[b])]);
        var ranked = chosen
            .Where(b => storm.Depths[b].DepthMillimetres is not null)
            .OrderByDescending(b => storm.Depths[b].DepthMillimetres)
            .ThenBy(b => b)
            .Select(b => new Ranked(Storms.Areal.Basins.Basins[b], storm.Depths[b]))
            .ToArray();
        TellOfLeftOut(context, storm, chosen);
        var heading = string.Create(
            CultureInfo.InvariantCulture,
            $"Depth and area of storm {Storm}, {Storms.Areal.Times.IntervalAt(storm.FirstStep).StartText} to {Storms.Areal.Times.IntervalAt(storm.LastStep).EndText}"
        );
        return new ResultTable(heading, TableOf(ranked));
    }

    private static Table TableOf(Ranked[] ranked)
    {
        var areas = Cumulated(ranked.Select(row => row.Basin.Shape.Area / 1e6));
        var volumes = Cumulated(ranked.Select(row => row.Depth.DepthMillimetres!.Value * row.Basin.Shape.Area / 1e6));
        return new Table([
            Column.OfCounts("rank", "", "Rank by mean depth", Enumerable.Range(1, ranked.Length)),
            Column.OfText("basin", "Basin id", ranked.Select(row => row.Basin.Id)),
            Column.OfNumbers(
                "area_km2",
                "km²",
                4,
                "Area of the basin",
                ranked.Select(row => (double?)(row.Basin.Shape.Area / 1e6))
            ),
            Column.OfNumbers(
                "depth_mm",
                "mm",
                6,
                "Mean depth over the basin",
                ranked.Select(row => row.Depth.DepthMillimetres)
            ),
            Column.OfNumbers(
                "area_together_km2",
                "km²",
                4,
                "Area of this basin and all wetter ones",
                areas.Select(area => (double?)area)
            ),
            Column.OfNumbers(
                "depth_together_mm",
                "mm",
                6,
                "Mean depth over that area",
                volumes.Zip(areas, (volume, area) => (double?)(volume / area))
            ),
            Column.OfCounts(
                "steps_withheld",
                "",
                "Steps of the storm without a value in this basin",
                ranked.Select(row => row.Depth.StepsWithheld)
            ),
            Column.OfNumbers(
                "weight_least",
                "",
                12,
                "The least share of the basin's weight that reported at a step",
                ranked.Select(row => (double?)row.Depth.LeastWeightReporting)
            ),
        ]);
    }

    private static double[] Cumulated(IEnumerable<double> values)
    {
        var sum = 0.0;
        return [.. values.Select(value => sum += value)];
    }

    private int[] Chosen()
    {
        var ids = Storms.Areal.Basins.Basins.Select(basin => basin.Id).ToArray();
        var problems = new Problems();
        foreach (var id in Basins.Where(id => !ids.Contains(id, StringComparer.Ordinal)))
        {
            problems.Add("RR0541", Place.Of($"basin {id}"), "There is no such basin.", NearWords.Mend(id, ids));
        }

        problems.ThrowIfAny();
        return
        [
            .. Enumerable
                .Range(0, ids.Length)
                .Where(b => Basins.IsEmpty || Basins.Contains(ids[b], StringComparer.Ordinal)),
        ];
    }

    private void TellOfLeftOut(StepContext context, Storm storm, int[] chosen)
    {
        var without = chosen
            .Where(b => storm.Depths[b].DepthMillimetres is null)
            .Select(b => Storms.Areal.Basins.Basins[b].Id)
            .ToArray();
        if (without.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0547",
                    Place.Of("depth-area"),
                    $"Left out, because no step of the storm has a value there: {Listing.Of(without)}."
                )
            );
        }
    }

    private static void TellOfNested(StepContext context, Basin[] basins)
    {
        var nested = NestedBasins.Of(basins);
        if (nested.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0548",
                    Place.Of("depth-area"),
                    $"Basins lie within others, so their area counts twice: {Listing.Of(nested)}.",
                    "Name the basins to rank:   basins: [\"…\"]"
                )
            );
        }
    }

    private sealed record Ranked(Basin Basin, StormDepth Depth);
}

/// <summary>The verb for <see cref="DepthAreaStep"/>.</summary>
public static class DepthAreaVerb
{
    /// <inheritdoc cref="DepthAreaStep"/>
    /// <param name="storms">Storms.</param>
    /// <param name="storm">The storm's number, from 1.</param>
    /// <param name="basins">The basins to rank; all where not given.</param>
    public static ResultTable DepthArea(this StormList storms, int storm, IReadOnlyList<string>? basins = null) =>
        storms.Run(new DepthAreaStep(storms, storm, [.. basins ?? []]));
}

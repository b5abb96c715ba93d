using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Answers;

/// <summary>
/// Finds storms: stretches of wet steps, parted from others by enough dry ones, with enough rain in all. They are found in the mean
/// over all basins by area, or in one basin, and each basin's depth is given for every storm. A step without a value is neither wet
/// nor dry: a storm that holds one, or may have gone on in one, is marked.
/// </summary>
/// <param name="Areal">Mean areal rainfall.</param>
/// <param name="DryFor">How many dry steps on end part two storms, 1 or more.</param>
/// <param name="AtLeast">The least depth of a storm in mm.</param>
/// <param name="WetFrom">The least depth in mm of a wet step; below it a step is dry.</param>
/// <param name="Basin">The basin in which storms are found; the mean of all where not given.</param>
/// <example><code>var storms = areal.Storms(dryFor: 2, atLeast: 30);</code></example>
[Step("Storms")]
public sealed record StormsStep(ArealRainfall Areal, int DryFor, double AtLeast, double WetFrom, string? Basin)
    : Step<StormList>
{
    /// <inheritdoc/>
    public override StormList Execute(StepContext context)
    {
        Require();
        var series = Basin is null ? RegionalSeries.OfAll(Areal) : RegionalSeries.OfOne(Areal, IndexOf(Basin));
        var storms = StormFinder
            .Find(series, DryFor, WetFrom)
            .Where(spell => spell.DepthMillimetres >= AtLeast)
            .Select(spell => new Storm(
                spell.FirstStep,
                spell.LastStep,
                spell.DepthMillimetres,
                spell.TouchesGap,
                [.. Enumerable.Range(0, Areal.Basins.Basins.Length).Select(basin => BasinStorm.Of(Areal, basin, spell))]
            ))
            .ToArray();
        context.Assume(
            string.Create(
                CultureInfo.InvariantCulture,
                $"A storm is parted from the next by {DryFor} or more steps on end with less than {WetFrom} mm, in {(Basin is null ? "the mean of all basins by area" : $"basin {Basin}")}, and has {AtLeast} mm or more."
            )
        );
        TellOfUnseen(context, series);
        TellOfGaps(context, storms);
        return new StormList(Areal, [.. storms]);
    }

    private void Require()
    {
        if (DryFor < 1 || !(AtLeast >= 0) || !(WetFrom > 0))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0540",
                    Place.Of("storms"),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"dryFor is {DryFor}, atLeast {AtLeast} mm, wetFrom {WetFrom} mm."
                    ),
                    "Give 1 dry step or more, a depth of 0 or more, and a wet step of more than 0 mm."
                )
            );
        }
    }

    private int IndexOf(string id)
    {
        var ids = Areal.Basins.Basins.Select(basin => basin.Id).ToArray();
        var index = Array.IndexOf(ids, id);
        return index >= 0
            ? index
            : throw new RefusedException(
                Finding.Error("RR0541", Place.Of($"basin {id}"), "There is no such basin.", NearWords.Mend(id, ids))
            );
    }

    /// <summary>Storms are sought only where the series has a value; how much it lacks says what may have been missed.</summary>
    private static void TellOfUnseen(StepContext context, double?[] series)
    {
        var unseen = series.Count(depth => depth is null);
        if (unseen > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0553",
                    Place.Of("storms"),
                    $"{Counted.Of(unseen, "step")} of {series.Length.ToString("N0", CultureInfo.InvariantCulture)} cannot be looked at, because a basin in which storms are sought has no value there.",
                    "Storms in them are not listed. Fewer are lost where basin: names one basin, or where less must report."
                )
            );
        }
    }

    private void TellOfGaps(StepContext context, Storm[] storms)
    {
        var touching = storms
            .Select((storm, s) => (Number: s + 1, Storm: storm))
            .Where(pair => pair.Storm.TouchesGap)
            .Select(pair =>
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{pair.Number} ({Areal.Times.TextAt(pair.Storm.FirstStep)})"
                )
            )
            .ToArray();
        if (touching.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0542",
                    Place.Of("storms"),
                    $"Steps without a value, or an end of the record, lie within or beside these storms, so their depths may be too low: {Listing.Of(touching)}.",
                    "See steps_withheld and touches_gap in the table of storms."
                )
            );
        }
    }
}

/// <summary>The verb for <see cref="StormsStep"/>.</summary>
public static class StormsVerb
{
    /// <inheritdoc cref="StormsStep"/>
    /// <param name="areal">Mean areal rainfall.</param>
    /// <param name="dryFor">How many dry steps on end part two storms, 1 or more.</param>
    /// <param name="atLeast">The least depth of a storm in mm.</param>
    /// <param name="wetFrom">The least depth in mm of a wet step; 0.1 where not given.</param>
    /// <param name="basin">The basin in which storms are found; the mean of all where not given.</param>
    public static StormList Storms(
        this ArealRainfall areal,
        int dryFor,
        double atLeast,
        double wetFrom = 0.1,
        string? basin = null
    ) => areal.Run(new StormsStep(areal, dryFor, atLeast, wetFrom, basin));
}

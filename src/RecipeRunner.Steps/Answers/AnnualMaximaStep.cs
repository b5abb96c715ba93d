using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;
using RecipeRunner.Steps.Series;

namespace RecipeRunner.Steps.Answers;

/// <summary>
/// Finds the most areal rain over one, two or more steps on end in each year and basin, with its dates. All of these steps must have
/// a value and lie in the record; they count for the year that holds the last of them. A year in which too few steps have a value
/// gives no maximum, as a larger one may have been missed. Steps are those of observation: no factor is applied for rain that falls
/// across the hour of observation.
/// </summary>
/// <param name="Areal">Mean areal rainfall.</param>
/// <param name="Durations">How many steps on end, each 1 or more.</param>
/// <param name="Years">What a year is: <c>Every.CalendarYear</c> or <c>Every.WaterYear(firstMonth: 10)</c>.</param>
/// <param name="Complete">How many of a year's steps must have a value.</param>
/// <example><code>var maxima = areal.AnnualMaxima([1, 2, 3], Every.WaterYear(firstMonth: 10), complete: AtLeast.Percent(95));</code></example>
[Step("Annual maxima", Word = "maxima")]
public sealed record AnnualMaximaStep(
    ArealRainfall Areal,
    ImmutableArray<int> Durations,
    Every Years,
    ICompletenessRule Complete
) : Step<AnnualMaxima>
{
    /// <inheritdoc/>
    public override AnnualMaxima Execute(StepContext context)
    {
        Require();
        var years = Periods.Of(Areal.Times, Years);
        var maxima =
            from basin in Enumerable.Range(0, Areal.Basins.Basins.Length)
            let present = years.Select(year => PresentIn(year, basin)).ToArray()
            from duration in Durations
            let sums = new RunningSums(Areal, basin, duration)
            from y in Enumerable.Range(0, years.Length)
            select MaximumOf(basin, sums, years[y], present[y]);
        var result = new AnnualMaxima(Areal, Years, [.. maxima]);
        context.Assume("A maximum over several steps counts for the year that holds the last of them.");
        TellOfYears(context, result, years.Length);
        TellOfNoRun(context, result);
        return result;
    }

    private void Require()
    {
        var yearly = Years != Every.WholeRecord && Years.PartOfYear(new NodaTime.LocalDate(2000, 1, 1)) == "year";
        if (!yearly)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0543",
                    Place.Of("annual maxima"),
                    $"Annual maxima cannot be taken over {Years.ToSettingText()}.",
                    "Give Every.CalendarYear or Every.WaterYear(firstMonth: 10)."
                )
            );
        }

        if (
            Durations.IsEmpty
            || Durations.Any(duration => duration < 1)
            || Durations.Distinct().Count() < Durations.Length
        )
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0544",
                    Place.Of("annual maxima"),
                    $"Durations are {(Durations.IsEmpty ? "not given" : string.Join(", ", Durations))}.",
                    "Give different numbers of steps, each 1 or more, such as [1, 2, 3]."
                )
            );
        }
    }

    private int PresentIn(StepsOfPeriod year, int basin)
    {
        var present = 0;
        for (var t = year.FirstStep; t < year.FirstStep + year.Count; t++)
        {
            present += Areal.At(t, basin).DepthMillimetres is null ? 0 : 1;
        }

        return present;
    }

    private AnnualMaximum MaximumOf(int basin, RunningSums sums, StepsOfPeriod year, int present)
    {
        var (largest, last) = sums.LargestEndingWithin(year.FirstStep, year.Count);
        var first = largest is null ? -1 : last - sums.Duration + 1;
        var (gauges, weight) = (0, 0.0);
        if (first >= 0)
        {
            var values = Enumerable.Range(first, sums.Duration).Select(t => Areal.At(t, basin)).ToArray();
            (gauges, weight) = (values.Min(value => value.GaugesReporting), values.Min(value => value.WeightReporting));
        }

        return new AnnualMaximum(
            basin,
            sums.Duration,
            Years.NameOf(year.Start),
            largest,
            first,
            gauges,
            weight,
            present,
            year.Expected,
            largest is not null && Complete.IsMetBy(present, year.Expected)
        );
    }

    private bool HasEnough(AnnualMaximum row) => Complete.IsMetBy(row.StepsWithValue, row.StepsExpected);

    /// <summary>Years that are complete enough, and yet have no run of so many steps that all have a value.</summary>
    private void TellOfNoRun(StepContext context, AnnualMaxima maxima)
    {
        var without = maxima
            .Maxima.Where(row => row.LargestMillimetres is null && HasEnough(row))
            .Select(row => $"{Areal.Basins.Basins[row.Basin].Id} {row.Year} ({Counted.Of(row.DurationSteps, "step")})")
            .ToArray();
        if (without.Length > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0552",
                    Place.Of("annual maxima"),
                    $"No maximum, because nowhere do so many steps on end have a value: {Listing.Of(without)}.",
                    "Ask for shorter durations, or for more gauges to report."
                )
            );
        }
    }

    private void TellOfYears(StepContext context, AnnualMaxima maxima, int years)
    {
        var counts = maxima
            .Maxima.Where(row => row.DurationSteps == Durations[0])
            .GroupBy(row => row.Basin)
            .Select(basin => (Areal.Basins.Basins[basin.Key].Id, Complete: basin.Count(HasEnough)))
            .ToArray();
        context.State(
            "complete years",
            string.Create(
                CultureInfo.InvariantCulture,
                $"{counts.Min(basin => basin.Complete)} to {counts.Max(basin => basin.Complete)} of {years} a basin"
            )
        );
        var lacking = counts
            .Where(basin => basin.Complete < years)
            .Select(basin => string.Create(CultureInfo.InvariantCulture, $"{basin.Id} {years - basin.Complete}"))
            .ToArray();
        if (lacking.Length > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0545",
                    Place.Of("annual maxima"),
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"Of {Counted.Of(years, "year")} some are left without a maximum, because too few of their steps have a value ({Complete.ToSettingText()} must): {Listing.Of(lacking)}."
                    ),
                    "largest_found_mm still gives the largest that was found; the true maximum is no smaller."
                )
            );
        }
    }
}

/// <summary>The verb for <see cref="AnnualMaximaStep"/>.</summary>
public static class AnnualMaximaVerb
{
    /// <inheritdoc cref="AnnualMaximaStep"/>
    /// <param name="areal">Mean areal rainfall.</param>
    /// <param name="durations">How many steps on end, each 1 or more.</param>
    /// <param name="years">What a year is; calendar years where not given.</param>
    /// <param name="complete">How many of a year's steps must have a value; all of them where not given.</param>
    public static AnnualMaxima AnnualMaxima(
        this ArealRainfall areal,
        IReadOnlyList<int> durations,
        Every? years = null,
        ICompletenessRule? complete = null
    ) =>
        areal.Run(
            new AnnualMaximaStep(areal, [.. durations], years ?? Every.CalendarYear, complete ?? AtLeast.Percent(100))
        );
}

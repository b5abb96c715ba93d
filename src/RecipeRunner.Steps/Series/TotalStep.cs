using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;
using RecipeRunner.Numerics.Statistics;

namespace RecipeRunner.Steps.Series;

/// <summary>
/// Sums areal rainfall over months, years, water years or the whole record. A period in which too few of the steps that
/// the calendar expects have a value is withheld; where some are missing the sum is of those that are there, and a
/// finding says so.
/// </summary>
/// <param name="Areal">Mean areal rainfall.</param>
/// <param name="Period">What to sum over: <c>Every.Month</c>, <c>Every.WaterYear(firstMonth: 10)</c>…</param>
/// <param name="Complete">How many of the expected steps must have a value; all of them where not given.</param>
/// <example><code>var yearly = areal.Total(Every.WaterYear(firstMonth: 10), complete: AtLeast.Percent(95));</code></example>
[Step("Total", Word = "total")]
public sealed record TotalStep(ArealRainfall Areal, Every Period, ICompletenessRule Complete) : Step<ArealTotals>
{
    /// <inheritdoc/>
    public override ArealTotals Execute(StepContext context)
    {
        var periods = Periods.Of(Areal.Times, Period);
        var basins = Areal.Basins.Basins.Length;
        var totals = periods
            .SelectMany(period => Enumerable.Range(0, basins).Select(basin => TotalOf(basin, period)))
            .ToArray();
        context.Assume("A step's rain belongs to the period that holds the date under which it is recorded.");
        var result = new ArealTotals(Areal.Basins, Period, [.. periods.Select(period => period.Start)], totals);
        TellOfShortSums(context, result);
        return result;
    }

    private ArealTotal TotalOf(int basin, StepsOfPeriod period)
    {
        var (sum, weight) = (default(CompensatedSum), default(CompensatedSum));
        var (present, gauges) = (0, int.MaxValue);
        for (var t = period.FirstStep; t < period.FirstStep + period.Count; t++)
        {
            var value = Areal.At(t, basin);
            if (value.DepthMillimetres is { } depth)
            {
                sum.Add(depth);
                weight.Add(value.WeightReporting);
                gauges = Math.Min(gauges, value.GaugesReporting);
                present++;
            }
        }

        if (present == 0)
        {
            return new ArealTotal(null, 0, period.Expected, 0, 0);
        }

        var enough = Complete.IsMetBy(present, period.Expected);
        return new ArealTotal(enough ? sum.Value : null, present, period.Expected, gauges, weight.Value / present);
    }

    private void TellOfShortSums(StepContext context, ArealTotals totals)
    {
        var named = Enumerable
            .Range(0, totals.Starts.Length)
            .SelectMany(p =>
                Areal.Basins.Basins.Select(
                    (basin, b) => (Name: $"{basin.Id} {Period.NameOf(totals.Starts[p])}", Total: totals.At(p, b))
                )
            )
            .Where(pair => pair.Total.StepsWithValue < pair.Total.StepsExpected)
            .Select(pair =>
                (
                    Text: FormattableString.Invariant(
                        $"{pair.Name} ({pair.Total.StepsWithValue} of {pair.Total.StepsExpected})"
                    ),
                    pair.Total.DepthMillimetres
                )
            )
            .ToArray();
        var shorts = named.Where(pair => pair.DepthMillimetres is not null).Select(pair => pair.Text).ToArray();
        if (shorts.Length > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0505",
                    Place.Of($"totals over {Period.ToSettingText()}"),
                    $"Some leave out steps without a value, so they may be too low: {Listing.Of(shorts)}.",
                    "Emit totals.Completeness() to see all, or ask for complete: AtLeast.Percent(100) to withhold them."
                )
            );
        }

        var withheld = named.Where(pair => pair.DepthMillimetres is null).Select(pair => pair.Text).ToArray();
        if (withheld.Length > 0)
        {
            context.Find(
                Finding.Notice(
                    "RR0506",
                    Place.Of($"totals over {Period.ToSettingText()}"),
                    $"Withheld, because too few of their steps have a value ({Complete.ToSettingText()} must): {Listing.Of(withheld)}.",
                    "The record may begin or end within a period, or values were withheld for want of gauges."
                )
            );
        }
    }
}

/// <summary>The verb for <see cref="TotalStep"/>.</summary>
public static class TotalVerb
{
    /// <inheritdoc cref="TotalStep"/>
    /// <param name="areal">Mean areal rainfall.</param>
    /// <param name="period">What to sum over; the whole record where not given.</param>
    /// <param name="complete">How many of the expected steps must have a value; all of them where not given.</param>
    public static ArealTotals Total(
        this ArealRainfall areal,
        Every? period = null,
        ICompletenessRule? complete = null
    ) => areal.Run(new TotalStep(areal, period ?? Every.WholeRecord, complete ?? AtLeast.Percent(100)));
}

using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Rain;

/// <summary>The most rain over some steps on end in one basin and year.</summary>
/// <param name="Basin">Index of the basin.</param>
/// <param name="DurationSteps">How many steps on end.</param>
/// <param name="Year">The year's name.</param>
/// <param name="LargestMillimetres">The largest sum of so many steps on end that all have a value; null where there is none.</param>
/// <param name="FirstStep">Index of the first of these steps, the earliest where several are equal; -1 where there is none.</param>
/// <param name="LeastGaugesReporting">The least number of gauges with weight that reported at one of them.</param>
/// <param name="LeastWeightReporting">The least share of the basin's weight that reported at one of them, 0 to 1.</param>
/// <param name="StepsWithValue">Steps of the year that have a value.</param>
/// <param name="StepsExpected">Steps that the year has by the calendar.</param>
/// <param name="Complete">True where enough steps have a value for the maximum to stand for the year.</param>
public readonly record struct AnnualMaximum(
    int Basin,
    int DurationSteps,
    string Year,
    double? LargestMillimetres,
    int FirstStep,
    int LeastGaugesReporting,
    double LeastWeightReporting,
    int StepsWithValue,
    int StepsExpected,
    bool Complete
)
{
    /// <summary>The maximum of the year; null where the year is not complete enough to tell.</summary>
    public double? DepthMillimetres => Complete ? LargestMillimetres : null;
}

/// <summary>Annual maxima of areal rainfall for several durations, by basin, duration, year.</summary>
public sealed class AnnualMaxima : Artifact, IShownTable
{
    /// <summary>Creates the list.</summary>
    /// <param name="areal">The areal rainfall.</param>
    /// <param name="years">What a year is.</param>
    /// <param name="maxima">The maxima, by basin, duration, year.</param>
    public AnnualMaxima(ArealRainfall areal, Every years, ImmutableArray<AnnualMaximum> maxima)
    {
        Areal = areal;
        Years = years;
        Maxima = maxima;
    }

    /// <summary>The areal rainfall.</summary>
    public ArealRainfall Areal { get; }

    /// <summary>What a year is.</summary>
    public Every Years { get; }

    /// <summary>The maxima, by basin, duration, year.</summary>
    public ImmutableArray<AnnualMaximum> Maxima { get; }

    /// <inheritdoc/>
    public string Heading => "Annual maxima";

    /// <summary>
    /// Columns <c>basin, duration_steps, year, depth_mm, largest_found_mm, start, end, gauges_least, weight_least,
    /// steps_with_value, steps_expected, complete</c>.
    /// </summary>
    public Table ToTable() =>
        new([
            Column.OfText("basin", "Basin id", Maxima.Select(row => Areal.Basins.Basins[row.Basin].Id)),
            Column.OfCounts(
                "duration_steps",
                "",
                $"How many {Areal.Times.Step.ToSettingText()} on end",
                Maxima.Select(row => row.DurationSteps)
            ),
            Column.OfText("year", $"Year ({Years.ToSettingText()})", Maxima.Select(row => row.Year)),
            Column.OfNumbers(
                "depth_mm",
                "mm",
                6,
                "The annual maximum; blank where too few steps of the year have a value",
                Maxima.Select(row => row.DepthMillimetres)
            ),
            Column.OfNumbers(
                "largest_found_mm",
                "mm",
                6,
                "The largest sum found, also where the year is not complete: the true maximum is no smaller",
                Maxima.Select(row => row.LargestMillimetres)
            ),
            Column.OfText(
                "start",
                "Local time after which it began",
                Maxima.Select(row => row.FirstStep < 0 ? "" : Areal.Times.IntervalAt(row.FirstStep).StartText)
            ),
            Column.OfText(
                "end",
                "Local time up to which it lasted",
                Maxima.Select(row =>
                    row.FirstStep < 0 ? "" : Areal.Times.IntervalAt(row.FirstStep + row.DurationSteps - 1).EndText
                )
            ),
            Column.OfCounts(
                "gauges_least",
                "",
                "The least number of gauges with weight that reported at one of these steps",
                Maxima.Select(row => row.LeastGaugesReporting)
            ),
            Column.OfNumbers(
                "weight_least",
                "",
                12,
                "The least share of the basin's weight in the full network that reported at one of these steps; blank where none was found",
                Maxima.Select(row => row.FirstStep < 0 ? null : (double?)row.LeastWeightReporting)
            ),
            Column.OfCounts(
                "steps_with_value",
                "",
                "Steps of the year that have a value",
                Maxima.Select(row => row.StepsWithValue)
            ),
            Column.OfCounts(
                "steps_expected",
                "",
                "Steps that the year has by the calendar",
                Maxima.Select(row => row.StepsExpected)
            ),
            Column.OfText("complete", "yes where enough have one", Maxima.Select(row => row.Complete ? "yes" : "no")),
        ]);

    /// <inheritdoc/>
    public override string Describe()
    {
        var years = Maxima.Where(row => row.Basin == 0 && row.DurationSteps == Maxima[0].DurationSteps).ToArray();
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{Counted.Of(Maxima.Length, "maximum", "maxima")}, {years.Count(row => row.Complete):N0} of {Counted.Of(years.Length, "year")} complete in {Areal.Basins.Basins[0].Id}"
        );
    }

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(Areal);
        writer.Write(Years.ToSettingText());
        writer.Write(ToTable());
    }
}

using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Weights;
using RecipeRunner.Steps.Series;
using RecipeRunner.Steps.Tests.Support;
using RecipeRunner.Steps.Weighting;

namespace RecipeRunner.Steps.Tests.Series;

/// <summary>
/// A square with a gauge on each corner: each has a quarter. With the corner (1,1) silent the cells drawn anew give 1/4,
/// 3/8, 3/8 (source: tests/reference/handbook, geo-square-corners and geo-square-three-corners), while rescaling gives a
/// third each.
/// </summary>
public sealed class GapPolicyTests : IDisposable
{
    private const double Side = 1 << 20;
    private readonly Bench bench = new();
    private readonly WeightTable weights;

    public GapPolicyTests()
    {
        var gauges = bench.Network(("A", 0, 0), ("B", Side, 0), ("C", 0, Side), ("D", Side, Side));
        weights = bench.Basins(("square", Bench.Box(0, 0, Side, Side))).WeighBy(gauges.ThiessenCells());
    }

    public void Dispose() => bench.Dispose();

    [Theory]
    [InlineData(GapPolicy.Redraw, 21.25)]
    [InlineData(GapPolicy.Rescale, 20.0)]
    public void A_silent_corner_is_handled_as_the_policy_says(GapPolicy gaps, double expected)
    {
        var value = weights.MeanRain(Rain([10, 20, 30, null]), gaps).At(0, 0);

        value.DepthMillimetres!.Value.ShouldBe(expected, 1e-11);
        value.ShouldBe(new ArealValue(value.DepthMillimetres, ArealStatus.Partial, 3, 0, 0.75, 0));
    }

    [Theory]
    [InlineData(GapPolicy.Redraw)]
    [InlineData(GapPolicy.Rescale)]
    [InlineData(GapPolicy.Withhold)]
    public void All_reporting_is_complete_under_any_policy(GapPolicy gaps)
    {
        var value = weights.MeanRain(Rain([10, 20, 30, 40]), gaps).At(0, 0);

        value.ShouldBe(new ArealValue(25, ArealStatus.Complete, 4, 0, 1, 0));
    }

    [Fact]
    public void Withhold_gives_no_value_where_any_gauge_with_weight_is_missing()
    {
        var value = weights.MeanRain(Rain([10, 20, 30, null]), GapPolicy.Withhold).At(0, 0);

        (value.Status, value.DepthMillimetres).ShouldBe((ArealStatus.Withheld, null));
        bench.Study.Findings.ShouldContain(finding => finding.Code == "RR0513");
    }

    [Theory]
    [InlineData(75, ArealStatus.Partial)]
    [InlineData(76, ArealStatus.Withheld)]
    public void Below_the_threshold_the_value_is_withheld(double percent, ArealStatus expected) =>
        weights
            .MeanRain(Rain([10, 20, 30, null]), GapPolicy.Redraw, AtLeast.Percent(percent))
            .At(0, 0)
            .Status.ShouldBe(expected);

    [Fact]
    public void One_gauge_has_the_whole_and_none_has_nothing()
    {
        var areal = weights.MeanRain(Rain([null, 7, null, null], [null, null, null, null]), GapPolicy.Redraw);

        areal.At(0, 0).ShouldBe(new ArealValue(7, ArealStatus.Partial, 1, 0, 0.25, 0));
        areal.At(1, 0).ShouldBe(new ArealValue(null, ArealStatus.Withheld, 0, 0, 0, null));
    }

    [Fact]
    public void Only_values_of_the_step_itself_report_and_estimates_are_counted()
    {
        var rain = bench.Records(
            Rainfall.Daily,
            new NodaTime.LocalDateTime(2024, 1, 1, 0, 0),
            ("A", "10 T 10"),
            ("B", "e10 a 10"),
            ("C", "10 x90 10"),
            ("D", "10 10 .")
        );

        var areal = weights.MeanRain(rain, GapPolicy.Rescale);

        areal.At(0, 0).ShouldBe(new ArealValue(10, ArealStatus.Complete, 4, 1, 1, 0));
        areal.At(1, 0).ShouldBe(new ArealValue(5, ArealStatus.Partial, 2, 0, 0.5, 0));
    }

    [Fact]
    public void Values_are_withheld_below_a_number_of_gauges_and_beyond_a_distance()
    {
        var gauges = bench.Network(("A", 100, 50), ("far", 5000, 50));
        var basin = bench.Basins(("box", Bench.Box(0, 0, 200, 100))).WeighBy(gauges.ThiessenCells());
        var rain = bench.Records(
            Rainfall.Daily,
            new NodaTime.LocalDateTime(2024, 1, 1, 0, 0),
            ("A", "."),
            ("far", "8")
        );

        ArealStatus Under(ReportingRule rule) => basin.MeanRain(rain, GapPolicy.Redraw, rule).At(0, 0).Status;

        Under(Within.Kilometres(4.8)).ShouldBe(ArealStatus.Partial);
        Under(Within.Kilometres(4.7)).ShouldBe(ArealStatus.Withheld);
        Within
            .Kilometres(1.001)
            .IsMetBy(1, 1, 1001)
            .ShouldBeTrue("1.001 times 1000 is a little less than 1001 in binary");
        Under(AtLeast.Gauges(1)).ShouldBe(ArealStatus.Withheld);
        Under(ReportingRule.Any).ShouldBe(ArealStatus.Partial);
        rain = bench.Records(Rainfall.Daily, new NodaTime.LocalDateTime(2024, 1, 1, 0, 0), ("A", "5"), ("far", "8"));
        Under(AtLeast.Gauges(1)).ShouldBe(ArealStatus.Complete);
        Under(AtLeast.Gauges(2)).ShouldBe(ArealStatus.Withheld, "one gauge has all the weight, and two are asked for");
        Bench.Refused(() => Within.Kilometres(-1))[0].Code.ShouldBe("RR0503");
        Bench.Refused(() => AtLeast.Gauges(0))[0].Code.ShouldBe("RR0503");
        Bench.Refused(() => AtLeast.Steps(0))[0].Code.ShouldBe("RR0503");
    }

    [Fact]
    public void A_gauge_beyond_the_basin_stands_in_when_those_within_are_silent()
    {
        var gauges = bench.Network(("A", 100, 50), ("far", 5000, 50));
        var basin = bench.Basins(("box", Bench.Box(0, 0, 200, 100))).WeighBy(gauges.ThiessenCells());
        bench.Write("rain.csv", "date,A,far\n2024-01-01,,8\n");
        var rain = bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Days("24:00"));

        basin.MeanRain(rain, GapPolicy.Redraw).At(0, 0).ShouldBe(new ArealValue(8, ArealStatus.Partial, 0, 0, 0, 4800));
        basin.MeanRain(rain, GapPolicy.Rescale).At(0, 0).Status.ShouldBe(ArealStatus.Withheld);
        basin.MeanRain(rain, GapPolicy.Redraw, AtLeast.Percent(1)).At(0, 0).Status.ShouldBe(ArealStatus.Withheld);
    }

    [Fact]
    public void Records_and_network_that_do_not_match_are_found_by_name()
    {
        bench.Write("rain.csv", "date,A,B,C,E1\n2024-01-01,1,2,3,4\n");
        var rain = bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Days("24:00"));
        weights.MeanRain(rain, GapPolicy.Redraw);

        bench.Study.Findings.ShouldContain(finding => finding.Code == "RR0511" && finding.What.Contains('D'));
        bench.Study.Findings.ShouldContain(finding => finding.Code == "RR0512" && finding.What.Contains("E1"));

        bench.Write("rain.csv", "date,P,Q\n2024-01-01,1,2\n");
        var strange = bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Days("24:00"));
        Bench.Refused(() => weights.MeanRain(strange, GapPolicy.Redraw))[0].Code.ShouldBe("RR0510");
    }

    [Fact]
    public void Redrawn_cells_equal_those_of_the_reporting_gauges_alone()
    {
        var random = new Random(1948);
        var all = Enumerable
            .Range(0, 12)
            .Select(i => ($"G{i:00}", Math.Round(random.NextDouble() * 1e5), Math.Round(random.NextDouble() * 1e5)))
            .ToArray();
        var basins = bench.Basins(("west", Bench.Box(1e4, 2e4, 5e4, 9e4)), ("east", Bench.Box(5e4, 1e4, 9.5e4, 6e4)));
        var full = basins.WeighBy(bench.Network(all).ThiessenCells());
        var depths = all.Select((_, i) => i % 3 == 1 ? (double?)null : i * 1.5).ToArray();
        var live = all.Where((_, i) => depths[i] is not null).ToArray();

        var redrawn = full.MeanRain(Rain(depths), GapPolicy.Redraw);
        var alone = basins.WeighBy(bench.Network(live).ThiessenCells()).MeanRain(Rain(depths), GapPolicy.Withhold);

        for (var basin = 0; basin < 2; basin++)
        {
            redrawn.At(0, basin).DepthMillimetres!.Value.ShouldBe(alone.At(0, basin).DepthMillimetres!.Value, 1e-12);
        }
    }

    private RainRecords Rain(params double?[][] steps)
    {
        var ids =
            steps[0].Length == 4
                ? ["A", "B", "C", "D"]
                : Enumerable
                    .Range(0, steps[0].Length)
                    .Select(i => FormattableString.Invariant($"G{i:00}"))
                    .ToImmutableArray();
        var flat = steps.SelectMany(step => step).ToArray();
        return bench.Study.Take(
            new RainRecords(
                ids,
                new Timeline(TimeStep.Days("24:00"), new NodaTime.LocalDateTime(2024, 1, 1, 0, 0), steps.Length),
                [.. flat.Select(depth => depth ?? 0)],
                [.. flat.Select(depth => depth is null ? RecordStatus.Missing : RecordStatus.Observed)],
                "records of a test"
            )
        );
    }
}

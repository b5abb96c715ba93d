using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Answers;
using RecipeRunner.Steps.Series;
using RecipeRunner.Steps.Tests.Support;
using RecipeRunner.Steps.Weighting;

namespace RecipeRunner.Steps.Tests.Answers;

/// <summary>Worked by hand: basins of one gauge each, so that a basin's rain is its gauge's.</summary>
public sealed class AnswerTests : IDisposable
{
    private static readonly LocalDateTime First = new(2023, 12, 29, 0, 0);
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Steps_at_which_storms_cannot_be_seen_are_counted()
    {
        OneBasin(". . 0 0 0 5 0 0 0 .").Storms(dryFor: 2, atLeast: 1);

        bench.Study.Findings.Single(finding => finding.Code == "RR0553").What.ShouldStartWith("3 steps of 10 ");
    }

    [Fact]
    public void A_duration_that_no_run_of_values_reaches_has_no_maximum_and_is_told()
    {
        // Six steps in all; the year asks for none, so only the run of seven is not to be had.
        var maxima = OneBasin("1 2 3 4 5 6").AnnualMaxima([1, 7], Every.WaterYear(firstMonth: 10), AtLeast.Percent(0));

        Numbers(maxima.ToTable(), "depth_mm").ShouldBe([6, null]);
        Numbers(maxima.ToTable(), "weight_least")[1].ShouldBeNull();
        var finding = bench.Study.Findings.Single();
        finding.Code.ShouldBe("RR0552");
        finding.What.ShouldContain("2024 (7 steps)");
    }

    [Fact]
    public void Storms_are_parted_by_dry_steps()
    {
        var areal = OneBasin("0 0 5 0 6 0 0 9 1 0 0 0 2 0 0");

        Spans(areal.Storms(dryFor: 2, atLeast: 0)).ShouldBe([(2, 4, 11), (7, 8, 10), (12, 12, 2)]);
        Spans(areal.Storms(dryFor: 1, atLeast: 3)).ShouldBe([(2, 2, 5), (4, 4, 6), (7, 8, 10)]);
        Spans(areal.Storms(dryFor: 2, atLeast: 3, wetFrom: 6)).ShouldBe([(4, 4, 6), (7, 7, 9)]);
        areal.Storms(2, 3).Storms.ShouldAllBe(storm => !storm.TouchesGap);
        bench.Study.Findings.ShouldBeEmpty();
        var joined = areal.Storms(dryFor: 3, atLeast: 3);
        Spans(joined).ShouldBe([(2, 8, 21)]);
        joined.Storms[0].TouchesGap.ShouldBeTrue("three dry steps before it are not in the record");
    }

    [Fact]
    public void Steps_without_a_value_are_neither_wet_nor_dry()
    {
        var storms = OneBasin("0 0 5 . 6 0 0 0 9 0 . 0 0 0 7").Storms(dryFor: 2, atLeast: 1);

        Spans(storms).ShouldBe([(2, 4, 11), (8, 8, 9), (14, 14, 7)]);
        storms.Storms.Select(storm => storm.TouchesGap).ShouldBe([true, true, true]);
        storms.Storms[0].Depths[0].ShouldBe(new StormDepth(11, 6, 4, 1, 0, 0));
        bench.Study.Findings.Single(finding => finding.Code == "RR0542").What.ShouldContain("1 (2023-12-31)");
    }

    [Fact]
    public void Storms_are_found_in_all_basins_together_or_in_one()
    {
        // The basins have 100 and 300 km² times a factor: the mean of 8 and 0 mm by area is 2 mm.
        var areal = TwoBasins("0 8 0 0", "0 0 0 4");

        Spans(areal.Storms(dryFor: 1, atLeast: 1)).ShouldBe([(1, 1, 2), (3, 3, 3)]);
        Spans(areal.Storms(dryFor: 1, atLeast: 1, basin: "west")).ShouldBe([(1, 1, 8)]);
        areal.Storms(dryFor: 1, atLeast: 1).Storms[0].Depths.Select(depth => depth.DepthMillimetres).ShouldBe([8, 0]);
        Bench.Refused(() => areal.Storms(1, 1, basin: "wst"))[0].Code.ShouldBe("RR0541");
        Bench.Refused(() => areal.Storms(0, 1))[0].Code.ShouldBe("RR0540");
    }

    [Fact]
    public void Depth_and_area_of_a_storm_run_from_the_wettest_basin_to_all()
    {
        var storms = TwoBasins("0 8 2 0", "0 4 2 0").Storms(dryFor: 1, atLeast: 1);

        var table = storms.DepthArea(storm: 1).ToTable();

        Texts(table, "basin").ShouldBe(["west", "east"]);
        Numbers(table, "depth_mm").ShouldBe([10, 6]);
        Numbers(table, "area_together_km2").ShouldBe([0.01, 0.04]);
        Numbers(table, "depth_together_mm").Select(depth => Math.Round(depth!.Value, 12)).ShouldBe([10, 7]);
        Texts(storms.DepthArea(1, ["east"]).ToTable(), "basin").ShouldBe(["east"]);
        Bench.Refused(() => storms.DepthArea(2))[0].Code.ShouldBe("RR0546");
        Bench.Refused(() => storms.DepthArea(1, ["est"]))[0].Code.ShouldBe("RR0541");
    }

    [Fact]
    public void Basins_within_others_are_pointed_out_when_areas_are_added_up()
    {
        var basins = bench.Basins(("outer", Bench.Box(0, 0, 300, 300)), ("inner", Bench.Box(100, 100, 200, 200)));
        var areal = basins
            .WeighBy(bench.Network(("A", 50, 50)).ThiessenCells())
            .MeanRain(bench.Records(Rainfall.Daily, First, ("A", "0 3 0")), GapPolicy.Redraw);

        areal.Storms(1, 1).DepthArea(1);

        bench.Study.Findings.Single(finding => finding.Code == "RR0548").What.ShouldContain("inner in outer");
    }

    [Fact]
    public void The_gauges_behind_a_storm_are_listed_with_their_depths()
    {
        var rain = bench.Records(Rainfall.Daily, First, ("A", "0 8 e2 0"), ("B", "0 4 . 0"), ("C", "0 . . 0"));
        var areal = bench
            .Basins(("box", Bench.Box(0, 0, 100, 100)))
            .WeighBy(bench.Network(("A", 10, 10), ("B", 90, 10), ("C", 90, 90)).ThiessenCells())
            .MeanRain(rain, GapPolicy.Redraw);

        var table = areal.Storms(1, 1).Gauges(rain).ToTable();

        Texts(table, "gauge").ShouldBe(["A", "B", "C"]);
        Numbers(table, "depth_mm").ShouldBe([10, 4, null]);
        Numbers(table, "steps_reporting").ShouldBe([2, 1, 0]);
        Numbers(table, "steps_estimated").ShouldBe([1, 0, 0]);
        var other = bench.Records(Rainfall.Daily, First, ("A", "0 8"));
        Bench.Refused(() => areal.Storms(1, 1).Gauges(other))[0].Code.ShouldBe("RR0549");
    }

    [Fact]
    public void Annual_maxima_count_for_the_year_that_holds_their_last_step()
    {
        // 29 December 2023 to 3 January 2024: 1 2 7 | 6 0 5.
        var maxima = OneBasin("1 2 7 6 0 5").AnnualMaxima([1, 2], complete: AtLeast.Steps(3));

        maxima
            .Maxima.Select(row => (row.DurationSteps, row.Year, row.DepthMillimetres, row.FirstStep))
            .ShouldBe([(1, "2023", 7, 2), (1, "2024", 6, 3), (2, "2023", 9, 1), (2, "2024", 13, 2)]);
    }

    [Fact]
    public void A_year_with_too_few_steps_gives_no_maximum_but_says_what_was_found()
    {
        var areal = OneBasin("1 . 7 6 0 5");
        var maxima = areal.AnnualMaxima([1, 2], complete: AtLeast.Steps(3));

        var first = maxima.Maxima[0];
        (first.DepthMillimetres, first.LargestMillimetres, first.StepsWithValue, first.StepsExpected).ShouldBe(
            (null, 7, 2, 365)
        );
        maxima.Maxima[2].LargestMillimetres.ShouldBe(null);
        bench.Study.Statements.ShouldContain(("complete years", "1 to 1 of 2 a basin"));
        bench.Study.Findings.ShouldContain(finding => finding.Code == "RR0545");
        Numbers(maxima.Completeness().ToTable(), "years_complete").ShouldBe([1, 1]);
        Numbers(maxima.Completeness().ToTable(), "largest_mm").ShouldBe([6, 13]);
        Bench.Refused(() => areal.AnnualMaxima([1], Every.Month))[0].Code.ShouldBe("RR0543");
        Bench.Refused(() => areal.AnnualMaxima([1, 1]))[0].Code.ShouldBe("RR0544");
        Bench.Refused(() => areal.AnnualMaxima([]))[0].Code.ShouldBe("RR0544");
    }

    [Fact]
    public void Equal_maxima_are_dated_by_the_earliest() =>
        OneBasin("0 7 0 0 0 0").AnnualMaxima([2], complete: AtLeast.Steps(1)).Maxima[0].FirstStep.ShouldBe(0);

    private ArealRainfall OneBasin(string steps) =>
        bench
            .Basins(("box", Bench.Box(0, 0, 100, 100)))
            .WeighBy(bench.Network(("A", 50, 50)).ThiessenCells())
            .MeanRain(bench.Records(Rainfall.Daily, First, ("A", steps)), GapPolicy.Redraw);

    /// <summary>A basin of 1 ha in the west and one of 3 ha in the east, each nearest to its own gauge.</summary>
    private ArealRainfall TwoBasins(string west, string east) =>
        bench
            .Basins(("west", Bench.Box(0, 0, 100, 100)), ("east", Bench.Box(100, 0, 400, 100)))
            .WeighBy(bench.Network(("W", 90, 50), ("E", 110, 50)).ThiessenCells())
            .MeanRain(bench.Records(Rainfall.Daily, First, ("E", east), ("W", west)), GapPolicy.Redraw);

    private static (int First, int Last, double Depth)[] Spans(StormList storms) =>
        [.. storms.Storms.Select(storm => (storm.FirstStep, storm.LastStep, storm.MeanDepthMillimetres))];

    private static Column Named(Table table, string name) => table.Columns.Single(column => column.Name == name);

    private static double?[] Numbers(Table table, string name) => [.. Named(table, name).Numbers];

    private static string[] Texts(Table table, string name) => [.. Named(table, name).Texts];
}

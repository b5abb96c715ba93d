using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Records;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Records;

public sealed class JoinAndSpreadTests : IDisposable
{
    private static readonly LocalDateTime First = new(2024, 1, 1, 0, 0);
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Theory]
    [InlineData(". a a=12 4")] // another depth of the same two days
    [InlineData("a a a=10 4")] // the same depth, of three days
    public void Two_totals_of_the_same_steps_are_refused(string steps)
    {
        var one = bench.Records(Rainfall.Daily, First, ("A", ". a a=10 4"));
        var other = bench.Records(Rainfall.Daily, First, ("A", steps));

        var problem = Bench.Refused(() => one.And(other)).Single();
        (problem.Code, problem.Where.Item).ShouldBe(("RR0533", "gauge A"));
        problem.What.ShouldContain("10 mm from 2024-01-02 to 2024-01-03");
    }

    [Fact]
    public void The_same_total_in_both_counts_once() =>
        bench
            .Records(Rainfall.Daily, First, ("A", "a a=10"))
            .And(bench.Records(Rainfall.Daily, First, ("A", "a a=10")))
            .Accumulations.ShouldBe([new Accumulation(0, 0, 1, 10)]);

    [Fact]
    public void A_value_after_rain_that_accumulated_to_the_records_end_is_pointed_out()
    {
        // B's total is whole, C has no value after it: only A's 20 mm may be those of three days.
        var early = bench.Records(Rainfall.Daily, First, ("A", "1 a a"), ("B", "1 a a=3"), ("C", "1 1 a"));
        var late = bench.Records(Rainfall.Daily, First.PlusDays(3), ("A", "20 0"), ("B", "9 0"), ("C", ". 0"));

        late.And(early);

        var finding = bench.Study.Findings.Single();
        finding.Code.ShouldBe("RR0551");
        finding.What.ShouldContain("2024-01-04");
        finding.What.ShouldEndWith("count for one: A 20 mm.");
    }

    [Fact]
    public void Records_of_other_gauges_and_other_times_stand_side_by_side()
    {
        var early = bench.Records(Rainfall.Daily, First, ("A", "1 2 a a=9"), ("C", "5 . x7 T"));
        var late = bench.Records(Rainfall.Daily, First.PlusDays(3), ("B", "8 8"), ("C", "T 6"));

        var all = early.And(late);

        all.GaugeIds.ShouldBe(["A", "B", "C"]);
        all.Times.Count.ShouldBe(5);
        all.DepthsAt(0).ToArray().ShouldBe([1, 0, 5]);
        all.StatusesAt(2).ToArray().ShouldBe([RecordStatus.Accumulated, RecordStatus.Missing, RecordStatus.Failed]);
        all.DepthsAt(4).ToArray().ShouldBe([0, 8, 6]);
        all.Accumulations.ShouldBe([new Accumulation(0, 2, 3, 9)]);
        bench.Study.Findings.Single().Code.ShouldBe("RR0531");
    }

    [Fact]
    public void Contradicting_values_are_refused_by_gauge_and_day()
    {
        var one = bench.Records(Rainfall.Daily, First, ("A", "1 2"));
        var other = bench.Records(Rainfall.Daily, First, ("A", "1 3"));

        var problem = Bench.Refused(() => one.And(other)).Single();
        (problem.Code, problem.Where.Item).ShouldBe(("RR0533", "gauge A"));
        problem.What.ShouldContain("2024-01-02");
    }

    [Theory]
    [InlineData("24:00", null)]
    [InlineData("09:00", "+01:00")]
    public void Other_observation_days_are_not_mixed(string endingAt, string? offset)
    {
        var one = bench.Records(Rainfall.Daily, First, ("A", "1 2"));
        var other = bench.Records(TimeStep.Days(endingAt, offset), First, ("B", "1 3"));

        var problem = Bench.Refused(() => one.And(other)).Single();
        problem.Code.ShouldBe("RR0532");
        problem.What.ShouldContain("A of");
        problem.What.ShouldContain("B of");
        problem.What.ShouldContain("days ending 09:00");
        problem.What.ShouldContain(other.Times.Step.ToSettingText());
    }

    [Fact]
    public void A_total_is_shared_out_as_the_neighbours_fell_and_kept_whole()
    {
        // By hand: A's neighbours B at 1 km and C at 2 km have weights 1 and 1/4 by the inverse square of distance. Over the three
        // days B has 2, 0, 6 and C 4, 4, 0, so the pattern is 3 : 1 : 6 and a total of 20 mm falls as 6, 2, 12.
        var rain = bench.Records(
            Rainfall.Daily,
            First,
            ("A", "a a a=20"),
            ("B", "2 0 6"),
            ("C", "4 4 0"),
            ("D", "9 . 9")
        );
        var network = bench.Network(("A", 0, 0), ("B", 1000, 0), ("C", 0, 2000), ("D", 10, 0));

        var spread = rain.SpreadAccumulations(network, neighbours: 2);

        double[] shares = [.. Enumerable.Range(0, 3).Select(t => spread.DepthsAt(t)[0])];
        shares.Zip([6.0, 2.0, 12.0]).ShouldAllBe(pair => Math.Abs(pair.First - pair.Second) < 1e-12);
        spread.CopyStatuses().Count(status => status == RecordStatus.Estimated).ShouldBe(3);
        spread.Accumulations.ShouldBeEmpty();
        bench.Study.Statements.ShouldContain(("spread", "1 of 1 totals"));
        double[] nearest = [.. Enumerable.Range(0, 3).Select(t => rain.SpreadAccumulations(network, 1).DepthsAt(t)[0])];
        nearest.ShouldBe([5, 0, 15]);
    }

    [Fact]
    public void Totals_that_no_neighbour_explains_stay_without_a_value()
    {
        var rain = bench.Records(Rainfall.Daily, First, ("A", "a a=20 a a=0"), ("B", "0 0 1 1"));
        var network = bench.Network(("A", 0, 0), ("B", 1000, 0));

        var spread = rain.SpreadAccumulations(network);

        spread.Accumulations.ShouldBe([new Accumulation(0, 0, 1, 20)]);
        spread.StatusesAt(0)[0].ShouldBe(RecordStatus.Accumulated);
        spread.StatusesAt(3)[0].ShouldBe(RecordStatus.Estimated);
        bench.Study.Findings.Single().Code.ShouldBe("RR0536");
    }

    [Fact]
    public void Distances_are_measured_only_in_a_working_grid()
    {
        var rain = bench.Records(Rainfall.Daily, First, ("A", "a a=20"));
        bench.Write("gauges.csv", "id,x,y\nA,10,50\n");
        var degrees = bench.Verbs.ReadGauges("gauges.csv", "id", "x", "y", crs: ReferenceSystems.Find("EPSG:4326"));

        Bench.Refused(() => rain.SpreadAccumulations(degrees)).Single().Code.ShouldBe("RR0534");
        Bench.Refused(() => rain.SpreadAccumulations(bench.Network(("A", 0, 0)), 0)).Single().Code.ShouldBe("RR0535");
    }

    [Fact]
    public void A_total_over_the_edge_of_a_span_is_lost_and_told()
    {
        var rain = bench.Records(Rainfall.Daily, First, ("A", "1 a a a=20 1 a a=4"));

        var later = rain.Between("2024-01-03", "2024-01-07");

        later.Accumulations.ShouldBe([new Accumulation(0, 3, 4, 4)]);
        later.StatusesAt(0)[0].ShouldBe(RecordStatus.Accumulated);
        bench.Study.Findings.Single().Code.ShouldBe("RR0522");
    }

    [Fact]
    public void Records_of_some_gauges_are_left_out()
    {
        var rain = bench.Records(Rainfall.Daily, First, ("A", "1 2"), ("B", "3 ."), ("C", "a a=9"));

        var left = rain.Without("A");

        left.GaugeIds.ShouldBe(["B", "C"]);
        left.DepthsAt(0).ToArray().ShouldBe([3, 0]);
        left.StatusesAt(1).ToArray().ShouldBe([RecordStatus.Missing, RecordStatus.Accumulated]);
        left.Accumulations.ShouldBe([new Accumulation(1, 0, 1, 9)]);
        bench.Study.Findings.Single().Code.ShouldBe("RR0537");
        Bench.Refused(() => rain.Without("D")).Single().Code.ShouldBe("RR0528");
        Bench.Refused(() => rain.Without("A", "B", "C")).Single().Code.ShouldBe("RR0529");
    }
}

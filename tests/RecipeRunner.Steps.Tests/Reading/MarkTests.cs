using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>Missing, trace, accumulated and estimated are different things, and a recipe says which mark is which.</summary>
public sealed class MarkTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void An_intensity_is_no_total_of_several_steps()
    {
        bench.Write("rain.csv", "date,A\n2024-01-01,A\n2024-01-02,6\n");

        Bench
            .Refused(() =>
                bench.Verbs.ReadRecords(
                    "rain.csv",
                    RainUnit.MillimetresPerHour,
                    TimeStep.Days("09:00"),
                    accumulating: ["A"]
                )
            )
            .Single()
            .Code.ShouldBe("RR0289");
    }

    [Fact]
    public void Totals_beyond_any_ever_measured_are_doubted()
    {
        // source: 2,493 mm fell in 48 hours at Cherrapunji in 1995, the most ever (WMO; from memory).
        Read("A", "2490", "A", "2500");

        var finding = bench.Study.Findings.Single(finding => finding.Code == "RR0260");
        finding.What.ShouldStartWith("2500 mm on 2024-01-04 ");
        finding.What.ShouldEndWith("(2493 mm). 1 value is.");
    }

    [Fact]
    public void Each_mark_has_its_own_meaning()
    {
        var records = Read("1", "M", "-9999", "T", "-1", "2.5E", "3 E", "", "0");

        Statuses(records).ShouldBe("OMMTTEEMO");
        records.DepthsAt(5)[0].ShouldBe(2.5);
        records.DepthsAt(6)[0].ShouldBe(3);
        records.DepthsAt(3)[0].ShouldBe(0);
    }

    [Fact]
    public void Numbers_that_are_marks_are_marks_however_they_are_written()
    {
        var records = Read("1", "999.9", "999.90", "-9999.000", "998");

        Statuses(records).ShouldBe("OMMMO");
    }

    [Fact]
    public void A_mark_that_is_zero_or_more_is_taken_before_the_depth_it_could_be()
    {
        bench.Write("rain.csv", "date,A\n2024-01-01,999\n2024-01-02,0\n2024-01-03,1\n");
        var records = bench.Verbs.ReadRecords(
            "rain.csv",
            RainUnit.Millimetres,
            TimeStep.Days("09:00"),
            missing: ["999"],
            trace: ["0.0"]
        );

        Statuses(records).ShouldBe("MTO");
    }

    [Fact]
    public void Rain_that_is_in_the_next_value_is_an_accumulation()
    {
        var records = Read("1", "A", "A", "6", "0", "A", "T", "2");

        Statuses(records).ShouldBe("OAAAOAAO");
        records.Accumulations.ShouldBe([new Accumulation(0, 1, 3, 6), new Accumulation(0, 5, 6, 0)]);
        records.DepthsAt(3)[0].ShouldBe(0);
        var notice = bench.Study.Findings.Single(finding => finding.Code == "RR0272");
        notice.What.ShouldContain("2 values");
        notice.What.ShouldContain("A 2024-01-02 to 2024-01-04 (3)");
    }

    [Theory]
    [InlineData("OAAM", "1", "A", "A", "")]
    [InlineData("OAA", "1", "A", "A")]
    [InlineData("AMO", "A", "M", "2")]
    public void Rain_after_which_no_value_comes_is_accumulated_without_a_total(string statuses, params string[] cells)
    {
        var records = Read(cells);

        Statuses(records).ShouldBe(statuses);
        records.Accumulations.ShouldBeEmpty();
        bench.Study.Findings.Select(finding => finding.Code).ShouldContain("RR0273");
    }

    [Fact]
    public void A_run_that_the_gauges_beside_it_do_not_share_is_its_own()
    {
        bench.Write("rain.csv", "date,A,B\n2024-01-01,A,1\n2024-01-02,A,A\n2024-01-03,5,7\n");
        bench
            .Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Days("09:00"), accumulating: ["A"])
            .Accumulations.ShouldBe([new Accumulation(0, 0, 2, 5), new Accumulation(1, 1, 2, 7)]);
    }

    [Theory]
    [InlineData("M", "M")]
    [InlineData("-9999", "-9999.0")]
    public void A_mark_cannot_mean_two_things(string missing, string trace)
    {
        bench.Write("rain.csv", "date,A\n2024-01-01,1\n");

        Bench
            .Refused(() =>
                bench.Verbs.ReadRecords(
                    "rain.csv",
                    RainUnit.Millimetres,
                    TimeStep.Days("09:00"),
                    missing: [missing],
                    trace: [trace]
                )
            )[0]
            .Code.ShouldBe("RR0263");
    }

    [Theory]
    [InlineData("T", "trace: [\"T\"]")]
    [InlineData("2.5E", "estimated: [\"E\"]")]
    [InlineData("NA", "missing: [\"NA\"]")]
    [InlineData("E", "missing: [\"E\"]")]
    public void An_undeclared_mark_is_refused_with_its_declaration(string cell, string mend)
    {
        bench.Write("rain.csv", $"date,A\n2024-01-01,{cell}\n");

        Bench
            .Refused(() => bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Days("09:00")))[0]
            .Mend.ShouldContain(mend);
    }

    private static string Statuses(RainRecords records) =>
        string.Concat(Enumerable.Range(0, records.Times.Count).Select(t => records.StatusesAt(t)[0].ToString()[0]));

    private RainRecords Read(params string[] cells)
    {
        var rows = cells.Select((cell, day) => FormattableString.Invariant($"2024-01-{day + 1:00},{cell}\n"));
        bench.Write("rain.csv", "date,A\n" + string.Concat(rows));
        return bench.Verbs.ReadRecords(
            "rain.csv",
            RainUnit.Millimetres,
            TimeStep.Days("09:00"),
            missing: ["M", "-9999", "999.9"],
            trace: ["T", "-1"],
            accumulating: ["A"],
            estimated: ["E"]
        );
    }
}

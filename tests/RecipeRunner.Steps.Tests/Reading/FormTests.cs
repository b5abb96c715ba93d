using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>Columns in any order, with a header or without, as a recipe declares them.</summary>
public sealed class FormTests : IDisposable
{
    private static readonly TimeStep Daily = TimeStep.Days(endingAt: "09:00");
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void A_file_without_header_whose_columns_are_named_is_to_be_read_by_number()
    {
        var problem = Bench.Refused(() => Read("2024-01-01,1\n", RecordForm.OneGauge(time: "date", value: "mm")))[0];

        (problem.Code, problem.Where.Line).ShouldBe(("RR0264", 1));
        problem.Mend.ShouldContain("RecordForm.OneGauge(time: 1, value: 2)");
    }

    public static TheoryData<string, RecordForm?> SameRecords =>
        new()
        {
            { "date,B,A\n2024-01-01,2,1\n2024-01-02,4,3\n", null },
            {
                "A,note,date,B\n1,x,2024-01-01,2\n3,y,2024-01-02,4\n",
                RecordForm.Wide(time: "date", gauges: ["A", "B"])
            },
            { "2024-01-01,2,1\n2024-01-02,4,3\n", RecordForm.Wide(time: 1, gauges: ["B", "A"]) },
            { "2,20240101,1\n4,20240102,3\n", RecordForm.Wide(time: 2, gauges: ["B", "A"]) },
            { "day,B,A\n2024-01-01,2,1\n2024-01-02,4,3\n", RecordForm.Wide(time: 1) },
            {
                "mm,q,station,when\n1,,A,2024-01-01\n2,,B,2024-01-01\n3,,A,2024-01-02\n4,,B,2024-01-02\n",
                RecordForm.Long(gauge: "station", time: "when", value: "mm")
            },
            {
                "1;A;2024-01-01\n2;B;2024-01-01\n3;A;2024-01-02\n4;B;2024-01-02\n",
                RecordForm.Long(gauge: 2, time: 3, value: 1)
            },
            { "y,m,d,A,B\n2024,1,1,1,2\n2024,01,02,3,4\n", RecordForm.Wide(time: ["y", "m", "d"]) },
            { "date,time,A,B\n2024-01-01,9:00,1,2\n2024-01-02,09:00,3,4\n", RecordForm.Wide(time: ["date", "time"]) },
        };

    [Theory]
    [MemberData(nameof(SameRecords))]
    public void However_the_columns_lie_the_records_are_the_same(string text, RecordForm? form)
    {
        var records = Read(text, form);

        records.GaugeIds.ShouldBe(["A", "B"]);
        records.Times.ToString().ShouldBe("2024-01-01 to 2024-01-02");
        records.DepthsAt(0).ToArray().ShouldBe([1, 2]);
        records.DepthsAt(1).ToArray().ShouldBe([3, 4]);
        records.SilentCount.ShouldBe(0);
    }

    [Fact]
    public void A_first_row_that_ends_blank_has_its_last_column_all_the_same()
    {
        Read("2024-01-01,1,\n2024-01-02,2,3\n", RecordForm.Wide(time: 1, gauges: ["A", "B"])).SilentCount.ShouldBe(1);
        Read("2024-01-01,\n2024-01-02,2\n", RecordForm.OneGauge(time: 1, value: 2)).SilentCount.ShouldBe(1);
    }

    [Fact]
    public void A_file_of_one_gauge_is_named_after_it()
    {
        bench.Write("Q-03.csv", "mm,date\n1,2024-01-01\n");
        var records = bench.Verbs.ReadRecords(
            "Q-03.csv",
            RainUnit.Millimetres,
            Daily,
            form: RecordForm.OneGauge(time: "date", value: "mm")
        );

        records.GaugeIds.ShouldBe(["Q-03"]);
        records.DepthsAt(0)[0].ShouldBe(1);
    }

    [Fact]
    public void A_value_over_several_steps_is_an_accumulation()
    {
        var records = Read(
            "g,date,mm,days\nA,2024-01-01,1,1\nA,2024-01-04,9,3\nA,2024-01-05,2,\n",
            RecordForm.Long(gauge: "g", time: "date", value: "mm", over: "days")
        );

        records.Accumulations.ShouldBe([new Accumulation(0, 1, 3, 9)]);
        Statuses(records).ShouldBe("OAAAO");
        bench.Study.Findings.Select(finding => finding.Code).ShouldContain("RR0272");
    }

    [Theory]
    [InlineData("A,2024-01-01,9,3\n", "A")] // begins before the record
    [InlineData("A,2024-01-01,1,1\nA,2024-01-02,9,2\n", "OA")] // a value of its own within
    [InlineData("A,2024-01-01,1,\nA,2024-01-03,9,2\nA,2024-01-04,9,3\n", "OAAA")] // two that overlap
    public void Totals_that_cannot_be_used_leave_their_steps_without_a_value(string rows, string statuses)
    {
        var records = Read(
            "g,date,mm,days\n" + rows,
            RecordForm.Long(gauge: "g", time: "date", value: "mm", over: "days")
        );

        Statuses(records).ShouldBe(statuses);
        records.Accumulations.Length.ShouldBe(statuses.Length / 4);
        bench.Study.Findings.Select(finding => finding.Code).ShouldContain("RR0273");
    }

    [Fact]
    public void Flags_say_what_values_are_worth()
    {
        var records = Read(
            "g,date,mm,flag\nA,2024-01-01,1,G\nA,2024-01-02,2,X\nA,2024-01-03,3,E\nA,2024-01-04,0,T\nA,2024-01-05,5,M\n"
                + "A,2024-01-06,,C\nA,2024-01-07,7,\nA,2024-01-08,,X\n",
            RecordForm.Long(
                gauge: "g",
                time: "date",
                value: "mm",
                flag: "flag",
                flags:
                [
                    Flag.Good("G"),
                    Flag.Failed("X", "Q"),
                    Flag.Estimated("E"),
                    Flag.Trace("T"),
                    Flag.Missing("M"),
                    Flag.Accumulating("C"),
                ]
            )
        );

        Statuses(records).ShouldBe("OFETMAAM");
        records.DepthsAt(1)[0].ShouldBe(2, "a failed value keeps its depth");
        records.DepthsAt(4)[0].ShouldBe(0, "a value marked as missing is none");
        records.Accumulations.ShouldBe([new Accumulation(0, 5, 6, 7)]);
        var found = bench.Study.Findings.ToDictionary(finding => finding.Code, finding => finding.What);
        found["RR0271"].ShouldContain("A (1)");
        found.Keys.ShouldBe(["RR0270", "RR0271", "RR0272", "RR0274"], ignoreOrder: true);
        bench.Study.Statements.ShouldContain(
            ("values", "1 observed, 1 trace, 1 estimated, 2 accumulated, 1 failed quality, 2 missing")
        );
    }

    public static TheoryData<string, RecordForm?, string, int, int> Refusals =>
        new()
        {
            { "2024-01-01,1\n2024-01-02,2\n", null, "RR0264", 1, 1 },
            { "A,2024-01-01,1\n", null, "RR0264", 1, 2 },
            { "date,A\n2024-01-01,1\n", RecordForm.Wide(time: "day"), "RR0206", 0, 0 },
            { "date,A\n2024-01-01,1\n", RecordForm.Wide(time: 3), "RR0265", 0, 0 },
            { "date,A\n2024-01-01,1\n", RecordForm.Wide(time: "date", gauges: ["B"]), "RR0206", 0, 0 },
            { "date,A\n2024-01-01,1\n", RecordForm.Wide(time: "date", gauges: ["A", "A"]), "RR0265", 0, 0 },
            { "2024-01-01,1,2\n", RecordForm.Wide(time: 1, gauges: ["A"]), "RR0265", 0, 0 },
            { "2024-01-01,1\n", RecordForm.Wide(time: 1), "RR0265", 0, 0 },
            { "date,A,A\n2024-01-01,1,2\n", RecordForm.Wide(time: "date", gauges: ["A"]), "RR0202", 1, 2 },
            { "g,t,v,n\nA,2024-01-01,1,0\n", RecordForm.Long("g", "t", "v", over: "n"), "RR0275", 2, 4 },
            { "g,t,v,n\nA,2024-01-01,1,x\n", RecordForm.Long("g", "t", "v", over: "n"), "RR0275", 2, 4 },
            {
                "g,t,v,f\nA,2024-01-01,1,K\n",
                RecordForm.Long("g", "t", "v", flag: "f", flags: [Flag.Good("G")]),
                "RR0269",
                2,
                4
            },
            {
                "g,t,v,f\nA,2024-01-01,1,T\n",
                RecordForm.Long("g", "t", "v", flag: "f", flags: [Flag.Trace("T")]),
                "RR0284",
                2,
                4
            },
            {
                "g,t,v,f\nA,2024-01-01,1,T\n",
                RecordForm.Long("g", "t", "v", flag: "f", flags: [Flag.Trace("T"), Flag.Good("T")]),
                "RR0263",
                0,
                0
            },
            { "2024-01-01,1\n2024-01-02,2,3\n", RecordForm.OneGauge(time: 1, value: 2), "RR0241", 2, 0 },
            { "g,t,v\nA,2024-01-01,1\n ,2024-01-01,1\n", RecordForm.Long("g", "t", "v"), "RR0244", 3, 1 },
        };

    [Theory]
    [MemberData(nameof(Refusals))]
    public void A_form_that_does_not_fit_is_refused(string text, RecordForm? form, string code, int line, int column)
    {
        var problem = Bench.Refused(() => Read(text, form))[0];

        (problem.Code, problem.Where.Line, problem.Where.Column).ShouldBe((code, line, column));
        problem.Mend.ShouldNotBeEmpty();
    }

    [Fact]
    public void Flags_need_both_column_and_meaning()
    {
        Bench.Refused(() => RecordForm.OneGauge(1, 2, flag: 3))[0].Code.ShouldBe("RR0265");
        Bench.Refused(() => RecordForm.OneGauge(1, 2, flags: [Flag.Good("G")]))[0].Code.ShouldBe("RR0265");
    }

    [Fact]
    public void A_value_that_stands_twice_names_both_lines()
    {
        var problem = Bench.Refused(() =>
            Read("gauge,date,mm\nA,2024-01-01,1\nB,2024-01-01,1\nA,2024-01-01,2\n", null)
        )[0];

        (problem.Code, problem.Where.Line, problem.Where.Item).ShouldBe(("RR0255", 4, "gauge A"));
        problem.What.ShouldContain("line 2");
    }

    [Fact]
    public void The_journal_says_form_unit_and_what_the_values_are()
    {
        Read("date,A\n2024-01-01,1\n2024-01-02,\n", null);

        bench.Study.Statements.ShouldBe([
            ("form", "wide: time, then a column a gauge"),
            ("unit", "mm"),
            ("values", "1 observed, 1 missing"),
        ]);
        RecordForm
            .Long("g", ["y", "m"], "v", over: "n", flag: "f", flags: [Flag.Failed("X", "Q")])
            .ToSettingText()
            .ShouldBe("long: time y m; gauge g; value v; over n; flag f; flags X/Q = failed quality");
    }

    private static string Statuses(RainRecords records) =>
        string.Concat(Enumerable.Range(0, records.Times.Count).Select(t => records.StatusesAt(t)[0].ToString()[0]));

    private RainRecords Read(string text, RecordForm? form)
    {
        bench.Write("rain.csv", text);
        return bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, Daily, form: form);
    }
}

using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

public sealed class RecordTests : IDisposable
{
    private static readonly TimeStep Daily = TimeStep.Days(endingAt: "09:00");
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Years_beside_depths_that_look_like_years_need_a_form()
    {
        // 1010 mm in the year 2001, or gauge 2001 with 2010 mm in the year 1010: only the recipe can tell.
        const string Text = "year,A,B\n2001,1010,2010\n";

        Bench.Refused(() => Read(Text, TimeStep.WaterYears(10))).Single().Code.ShouldBe("RR0254");
        Read("year,A,B\n2001,990,2010\n", TimeStep.WaterYears(10)).GaugeIds.ShouldBe(["A", "B"]);
    }

    [Fact]
    public void Fillings_for_missing_values_are_no_depths()
    {
        // source: 9.96921E+36 is the default filling of NetCDF (netcdf.h, NC_FILL_FLOAT; from memory).
        var problem = Bench.Refused(() => Read("date,A\n2024-01-01,9.96921E+36\n")).Single();

        (problem.Code, problem.Where.Line).ShouldBe(("RR0250", 2));
        problem.Mend.ShouldContain("missing: [\"9.96921E+36\"]");
    }

    [Fact]
    public void Silences_of_hours_are_told_from_a_week_on()
    {
        // 168 hours are a week: 167 silent hours are not told, 168 are.
        ReadHours(silent: 167);
        bench.Study.Findings.ShouldBeEmpty();

        ReadHours(silent: 168);
        bench.Study.Findings.Single().What.ShouldStartWith("Gauges are silent for 168 steps or more once; ");
    }

    private void ReadHours(int silent)
    {
        var start = new LocalDateTime(2024, 1, 1, 1, 0);
        var rows = Enumerable
            .Range(0, 200)
            .Select(hour =>
                FormattableString.Invariant(
                    $"{start.PlusHours(hour):uuuu-MM-ddTHH:mm},{(hour >= 1 && hour <= silent ? "" : "1")}\n"
                )
            );
        Read("time,A\n" + string.Concat(rows), TimeStep.Hours());
    }

    [Theory]
    [InlineData("date,B,A\n2024-01-01,1.5,\n2024-01-02,0,2.5\n")]
    [InlineData("gauge,date,mm\nA,2024-01-02,2.5\nB,2024-01-01,1.5\nB,2024-01-02,0\nA,2024-01-01,\n")]
    [InlineData("date;B;A\n2024-01-01T09:00;1.5;\n2024-01-02 09:00:00;0;2.5\n")]
    public void Wide_and_long_files_give_the_same_records(string text)
    {
        var records = Read(text);

        records.GaugeIds.ShouldBe(["A", "B"]);
        records.Times.ShouldBe(new Timeline(Daily, new LocalDateTime(2024, 1, 1, 0, 0), 2));
        records.DepthsAt(0).ToArray().ShouldBe([0, 1.5]);
        records.StatusesAt(0).ToArray().ShouldBe([RecordStatus.Missing, RecordStatus.Observed]);
        records.DepthsAt(1).ToArray().ShouldBe([2.5, 0]);
        records.StatusesAt(1).ToArray().ShouldBe([RecordStatus.Observed, RecordStatus.Observed]);
    }

    [Theory]
    [InlineData("date,A\n2024-01-01,1\n2024-01-02,2\n\n\n")]
    [InlineData("date,A,,\n2024-01-01,1,,\n\n2024-01-02,2,,\n")]
    public void Empty_lines_and_empty_columns_at_the_end_say_nothing(string text) => Read(text).Times.Count.ShouldBe(2);

    [Fact]
    public void Midnight_is_refused_where_it_may_mean_either_end_of_a_step()
    {
        const string Text = "date,A\n2024-01-01 00:00:00,1\n";

        Bench.Refused(() => Read(Text, TimeStep.Days("24:00")))[0].Code.ShouldBe("RR0253");
        Bench.Refused(() => Read(Text, TimeStep.Months))[0].Code.ShouldBe("RR0253");
        Read(Text, TimeStep.Days("00:00")).Times.First.ShouldBe(new LocalDateTime(2024, 1, 1, 0, 0));
    }

    [Fact]
    public void Units_are_exact_where_the_definition_is()
    {
        // source: 1 inch = 25.4 mm exactly, international yard and pound agreement of 1959.
        Depth(RainUnit.Inches, "1").ShouldBe(25.4);
        Depth(RainUnit.HundredthsOfInch, "100").ShouldBe(25.4);
        Depth(RainUnit.TenthsOfMillimetre, "3").ShouldBe(0.3);
        Depth(RainUnit.Centimetres, "1.25").ShouldBe(12.5);
    }

    [Theory]
    [InlineData("NA")]
    [InlineData("-9999")]
    [InlineData("-9999.0")]
    public void Markers_of_missing_values_are_honoured_once_declared(string marker)
    {
        var text = $"date,A,B\n2024-01-01,{marker},1\n";

        Read(text, missing: [marker]).SilentCount.ShouldBe(1);
        var problem = Bench.Refused(() => Read(text))[0];
        problem.Code.ShouldBeOneOf("RR0250", "RR0251");
        (problem.Where.Line, problem.Where.Column, problem.Where.Item).ShouldBe((2, 2, "gauge A"));
        problem.Mend.ShouldContain($"missing: [\"{marker}\"]");
    }

    [Theory]
    [InlineData("date,A\n2024-01-01,\"1,5\"\n", "RR0250", 2, 2)]
    [InlineData("date,A\n2024-01-01,-0.5\n", "RR0251", 2, 2)]
    [InlineData("date,A\n2024-01-01,1\n31.01.2024,1\n", "RR0252", 3, 1)]
    [InlineData("date,A\n2024-01-01,1\n2024-02-30,1\n", "RR0252", 3, 1)]
    [InlineData("date,A\n2024-01-01T07:00,1\n", "RR0253", 2, 1)]
    [InlineData("date,A\nyesterday,1\n", "RR0254", 2, 0)]
    [InlineData("date,A\n2024-01-01,1\n2024-01-01,1\n", "RR0255", 3, 1)]
    [InlineData("gauge,date,mm\nA,2024-01-01,1\nA,2024-01-01,2\n", "RR0255", 3, 2)]
    [InlineData("date,A\n", "RR0256", 0, 0)]
    [InlineData("date,A,B\n2024-01-01,1\n", "RR0241", 2, 0)]
    [InlineData("date,A,A\n2024-01-01,1,2\n", "RR0202", 1, 3)]
    [InlineData("date,A,,B\n2024-01-01,1,2,3\n", "RR0244", 1, 3)]
    [InlineData("date,A,\n2024-01-01,1,2\n", "RR0241", 2, 0)]
    [InlineData("\uFEFF", "RR0201", 0, 0)]
    [InlineData("date,A\n2024-01-01,1\n9024-01-01,1\n", "RR0259", 3, 0)]
    public void What_cannot_be_used_is_refused_at_its_place(string text, string code, int line, int column)
    {
        var problem = Bench.Refused(() => Read(text))[0];

        (problem.Code, problem.Where.File, problem.Where.Line, problem.Where.Column).ShouldBe(
            (code, "rain.csv", line, column)
        );
        problem.Mend.ShouldNotBeEmpty();
    }

    [Fact]
    public void Many_problems_are_told_at_once_and_the_rest_counted()
    {
        var rows = Enumerable.Range(1, 28).Select(day => FormattableString.Invariant($"2024-01-{day:00},x{day}"));
        var problems = Bench.Refused(() => Read("date,A\n" + string.Join('\n', rows) + "\n"));

        problems.Count.ShouldBe(13);
        problems[^1].What.ShouldStartWith("16 further problems");
    }

    [Fact]
    public void Rows_out_of_order_and_dates_without_a_row_are_found()
    {
        var records = Read("date,A\n2024-01-05,5\n2024-01-01,1\n2024-01-02,2\n");

        records.Times.Count.ShouldBe(5);
        records.SilentCount.ShouldBe(2);
        records.DepthsAt(4)[0].ShouldBe(5);
        bench.Study.Findings.Select(finding => finding.Code).ShouldBe(["RR0257", "RR0258"]);
        bench.Study.Findings[1].What.ShouldContain("2024-01-03");
    }

    [Fact]
    public void Depths_beyond_any_measured_silent_gauges_and_long_silences_are_found()
    {
        var rows = Enumerable
            .Range(1, 20)
            .Select(day =>
                FormattableString.Invariant(
                    $"2024-01-{day:00},{(day is > 5 and < 15 ? "" : "1")},,{(day == 3 ? "2500" : "0")}"
                )
            );
        Read("date,A,B,C\n" + string.Join('\n', rows) + "\n");

        bench.Study.Findings.Select(finding => finding.Code).ShouldBe(["RR0260", "RR0261", "RR0262"]);
        bench.Study.Findings[1].What.ShouldContain("B");
        bench.Study.Findings[2].What.ShouldContain("A 2024-01-06 to 2024-01-14 (9)");
    }

    [Fact]
    public void Months_are_read_by_their_label()
    {
        var records = Read("month,A\n2024-01,30\n2024-02,20\n", step: TimeStep.Months);

        records
            .Times.IntervalAt(1)
            .ShouldBe(new RainInterval(new LocalDateTime(2024, 2, 1, 0, 0), new LocalDateTime(2024, 3, 1, 0, 0)));
    }

    [Fact]
    public void An_observation_day_ends_at_its_hour_on_its_date()
    {
        Daily
            .IntervalOf(new LocalDateTime(2024, 3, 1, 0, 0))
            .ShouldBe(new RainInterval(new LocalDateTime(2024, 2, 29, 9, 0), new LocalDateTime(2024, 3, 1, 9, 0)));
        TimeStep
            .Days("24:00")
            .IntervalOf(new LocalDateTime(2024, 3, 1, 0, 0))
            .ShouldBe(new RainInterval(new LocalDateTime(2024, 3, 1, 0, 0), new LocalDateTime(2024, 3, 2, 0, 0)));
        TimeStep
            .Days("00:00")
            .IntervalOf(new LocalDateTime(2024, 3, 1, 0, 0))
            .End.ShouldBe(new LocalDateTime(2024, 3, 1, 0, 0));
        Bench.Refused(() => TimeStep.Days("9 am"))[0].Code.ShouldBe("RR0501");
    }

    private double Depth(RainUnit unit, string cell)
    {
        bench.Write("rain.csv", $"date,A\n2024-01-01,{cell}\n");
        return bench.Verbs.ReadRecords("rain.csv", unit, Daily).DepthsAt(0)[0];
    }

    private RainRecords Read(string text, TimeStep? step = null, string[]? missing = null)
    {
        bench.Write("rain.csv", text);
        return bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, step ?? Daily, missing);
    }
}

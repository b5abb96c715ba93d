using RecipeRunner.Steps.Peeking;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>A look at a file says what is in it and how a recipe reads it, and tells what a reader would refuse.</summary>
public sealed class PeekTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void A_record_is_told_by_gauges_span_gaps_and_doubts()
    {
        var lines = At(
            "rain.csv",
            "date,A,B\n2023-12-30,1,-9999\n2023-12-31,2,-9999\n2024-01-01,T,-9999\n2024-01-02,3000,5\n2024-01-03,-0.5,x\n2024-01-03,7,7\n2024-01-04,,1\nlast,,\n"
        );

        lines["records"].ShouldBe(["wide: time, then a column a gauge"]);
        lines["gauges"].ShouldBe(["2: A, B"]);
        lines["span"].ShouldBe(["2023-12-30 to 2024-01-04, 6 steps, as days ending 24:00"]);
        lines["missing"].ShouldBe(["50.0 % of all values"]);
        lines["by year"].ShouldBe(["2023 50.0 %, 2024 50.0 %"]);
        lines["silences"]
            .ShouldBe(["longest in steps: B 2023-12-30 to 2024-01-01 (3); A 2024-01-03 to 2024-01-04 (2)"]);
        lines["largest"].ShouldBe(["3000 at A on 2024-01-02, in the file's unit"]);
        lines["markers"].Single().ShouldStartWith("-9999 (3), T (1)");
        lines["read with"]
            .ShouldBe([
                "ReadRecords(\"rain.csv\", RainUnit.…, TimeStep.Days(endingAt: \"…\"), missing: [\"-9999\"], trace: [\"T\"])",
            ]);
        lines["caution"]
            .ShouldBe([
                "1 value is, if in millimetres, more than was ever measured in so long a time (1825 mm), the first 3000 at A, 2024-01-02.",
                "1 row has no time that can be read, the first in line 9.",
                "2 values stand twice, the first A at 2024-01-03 in lines 6 and 7.",
                "1 value is below zero, the first -0.5 at A, 2024-01-03.",
                "Not numbers: x (1).",
            ]);
    }

    [Theory]
    [InlineData("2024-01-01\n2024-01-02\n2024-01-05", "TimeStep.Days(endingAt: \"…\")")]
    [InlineData("2024-01-01T07:00\n2024-01-02T07:00", "TimeStep.Days(endingAt: \"07:00\")")]
    [InlineData("2024-01\n2024-02\n2024-03", "TimeStep.Months")]
    [InlineData("2024-01-01\n2024-02-01\n2024-03-01", "TimeStep.Months")]
    [InlineData("2024-01-01T01:00\n2024-01-01T02:00\n2024-01-01T05:00", "TimeStep.Hours(1)")]
    [InlineData("2024-01-01T06:00\n2024-01-01T12:00\n2024-01-01T18:00", "TimeStep.Hours(6)")]
    [InlineData("2024-01-01T00:15\n2024-01-01T00:30\n2024-01-01T00:45", "TimeStep.Minutes(15)")]
    [InlineData("2024-01-01T00:10\n2024-01-01T00:20\n2024-01-01T00:25", "TimeStep.Minutes(5)")]
    public void The_step_is_found_from_the_times(string times, string step) =>
        At("rain.csv", "time,A\n" + times.Replace("\n", ",1\n", StringComparison.Ordinal) + ",1\n")["read with"]
            .Single()
            .ShouldContain(step);

    [Theory]
    [InlineData("2024-01-01,1,2\n2024-01-02,3,4\n", "form: RecordForm.Wide(time: 1, gauges: [\"…\"])")]
    [InlineData("A,2024-01-01,1\nA,2024-01-02,3\n", "form: RecordForm.Long(gauge: 1, time: 2, value: 3)")]
    [InlineData(
        "A,B,day\n1,2,2024-01-01\n3,4,2024-01-02\n",
        "form: RecordForm.Wide(time: \"day\", gauges: [\"A\", \"B\"])"
    )]
    [InlineData(
        "q,mm,site,when\n,1,P,2024-01-01\n,2,P,2024-01-02\n,3,R,2024-01-02\n",
        "form: RecordForm.Long(gauge: \"site\", time: \"when\", value: \"mm\")"
    )]
    public void The_form_is_found_where_a_recipe_must_say_it(string text, string form) =>
        At("rain.csv", text)["read with"].Single().ShouldContain(form);

    [Fact]
    public void What_the_look_advises_can_be_read()
    {
        At("rain.csv", "gauge,date,mm\n1001,2024-01-01,1\n1001,2024-01-02,NA\n")["read with"]
            .ShouldBe(["ReadRecords(\"rain.csv\", RainUnit.…, TimeStep.Days(endingAt: \"…\"), missing: [\"NA\"])"]);
        bench
            .Verbs.ReadRecords(
                "rain.csv",
                Model.Rain.RainUnit.Millimetres,
                Model.Time.TimeStep.Days(endingAt: "07:00"),
                missing: ["NA"]
            )
            .GaugeIds.ShouldBe(["1001"]);
    }

    [Fact]
    public void A_gauge_list_with_dates_is_no_record() =>
        At("gauges.csv", "id,lon,lat,opened\nA,13,50,1990-01-01\nB,14,51,1991-01-01\n")
            .Contains("column")
            .ShouldBeTrue();

    [Fact]
    public void Packed_files_and_both_forms_of_the_daily_network_are_looked_into()
    {
        bench.Write("rain.csv.gz", Gzip.Pack("date,A\n2024-01-01,1\n"));
        Lines("rain.csv.gz")["gauges"].ShouldBe(["1: A"]);
        bench.Write("2024.csv.gz", Gzip.Pack("USC00026481,20240101,PRCP,12,,,7,\n"));
        Lines("2024.csv.gz")["largest"].ShouldBe(["1.2 at USC00026481 on 2024-01-01, in millimetres"]);
        bench.Write("a.dly", "USC00026481202401PRCP   12  7" + string.Concat(Enumerable.Repeat("-9999   ", 30)) + "\n");
        var fixedForm = Lines("a.dly");
        fixedForm["largest"].ShouldBe(["1.2 at USC00026481 on 2024-01-01, in millimetres"]);
        fixedForm["read with"].ShouldBe(["ReadGhcnDaily(\"a.dly\", TimeStep.Days(endingAt: \"…\"))"]);
    }

    private ILookup<string, string> At(string name, string text)
    {
        bench.Write(name, text);
        return Lines(name);
    }

    private ILookup<string, string> Lines(string name) =>
        Peek.At(Path.Combine(bench.Folder, name), CancellationToken.None)
            .ToLookup(line => line.Name, line => line.Text);
}

using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>Several files read as one record.</summary>
public sealed class SeveralFilesTests : IDisposable
{
    private static readonly TimeStep Daily = TimeStep.Days(endingAt: "09:00");
    private readonly Bench bench = new();

    public SeveralFilesTests() => Directory.CreateDirectory(Path.Combine(bench.Folder, "rain"));

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Files_of_one_gauge_each_become_one_record()
    {
        bench.Write("rain/B.csv", "date,mm\n2024-01-02,5\n");
        bench.Write("rain/A.csv", "date,mm\n2024-01-01,1\n2024-01-03,3\n");
        bench.Write("rain/C.txt", "not asked for");
        var records = Read(RecordForm.OneGauge(time: "date", value: "mm"));

        records.GaugeIds.ShouldBe(["A", "B"]);
        records.Source.ShouldBe("rain/*.csv");
        Row(records, 0).ShouldBe("1 -");
        Row(records, 1).ShouldBe("- 5");
        Row(records, 2).ShouldBe("3 -");
    }

    [Fact]
    public void Files_of_different_spans_and_gauges_become_one_record()
    {
        bench.Write("rain/2023.csv", "date,A,B\n2023-12-30,1,2\n2023-12-31,3,\n");
        bench.Write("rain/2024.csv", "date,C,B\n2024-01-02,7,8\n");
        var records = Read(null);

        records.GaugeIds.ShouldBe(["A", "B", "C"]);
        Row(records, 0).ShouldBe("1 2 -");
        Row(records, 1).ShouldBe("3 - -");
        Row(records, 2).ShouldBe("- - -");
        Row(records, 3).ShouldBe("- 8 7");
        bench.Study.Findings.Single(finding => finding.Code == "RR0258").What.ShouldContain("2024-01-01");
    }

    [Fact]
    public void Values_that_stand_in_two_files_and_agree_are_one_finding()
    {
        bench.Write("rain/a.csv", "date,A\n2024-01-01,1\n2024-01-02,2\n");
        bench.Write("rain/b.csv", "date,A\n2024-01-02,2\n2024-01-03,3\n");
        Read(null).Times.Count.ShouldBe(3);

        bench.Study.Findings.Single().Code.ShouldBe("RR0268");
    }

    [Fact]
    public void Values_that_contradict_each_other_are_refused_naming_both_places()
    {
        bench.Write("rain/a.csv", "date,A\n2024-01-01,1\n2024-01-02,2\n");
        bench.Write("rain/b.csv", "gauge,date,mm\nB,2024-01-01,1\nA,2024-01-02,2.5\n");
        var problem = Bench.Refused(() => Read(null))[0];

        (problem.Code, problem.Where.File, problem.Where.Line).ShouldBe(("RR0267", "rain/b.csv", 3));
        problem.Where.Item.ShouldBe("gauge A");
        problem.What.ShouldContain("rain/a.csv line 3");
    }

    [Fact]
    public void Rain_accumulates_from_one_file_into_the_next()
    {
        bench.Write("rain/a.csv", "date,A\n2023-12-30,1\n2023-12-31,C\n");
        bench.Write("rain/b.csv", "date,A\n2024-01-01,C\n2024-01-02,6\n");
        bench
            .Verbs.ReadRecords("rain/*.csv", RainUnit.Millimetres, Daily, accumulating: ["C"])
            .Accumulations.ShouldBe([new Accumulation(0, 1, 3, 6)]);
    }

    [Fact]
    public void Totals_reach_back_into_the_file_before()
    {
        bench.Write("rain/a.csv", "g,date,mm,n\nB,2023-12-30,1,1\nB,2023-12-31,1,1\n");
        bench.Write("rain/b.csv", "g,date,mm,n\nA,2024-01-01,9,3\n");
        Read(RecordForm.Long("g", "date", "mm", over: "n")).Accumulations.ShouldBe([new Accumulation(0, 0, 2, 9)]);
    }

    [Fact]
    public void Totals_that_contradict_each_other_are_refused()
    {
        bench.Write("rain/a.csv", "g,date,mm,n\nA,2023-12-30,1,1\nA,2024-01-01,8,2\n");
        bench.Write("rain/b.csv", "g,date,mm,n\nA,2024-01-01,9,2\n");
        var problem = Bench.Refused(() => Read(RecordForm.Long("g", "date", "mm", over: "n")))[0];

        (problem.Code, problem.Where.File, problem.Where.Line).ShouldBe(("RR0267", "rain/b.csv", 2));
        problem.What.ShouldContain("rain/a.csv line 3");
    }

    private static string Row(RainRecords records, int step) =>
        string.Join(
            " ",
            Enumerable
                .Range(0, records.GaugeIds.Length)
                .Select(gauge =>
                    records.StatusesAt(step)[gauge] == RecordStatus.Missing
                        ? "-"
                        : records.DepthsAt(step)[gauge].ToString(System.Globalization.CultureInfo.InvariantCulture)
                )
        );

    private RainRecords Read(RecordForm? form) =>
        bench.Verbs.ReadRecords("rain/*.csv", RainUnit.Millimetres, Daily, form: form);
}

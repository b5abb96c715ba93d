using System.Globalization;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading.Ghcn;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>
/// GHCN-Daily. Rows are made by hand from the tables of columns, elements and flags; source: NOAA GHCN-Daily readme.txt,
/// section III (.dly) and readme-by_year.txt (a value a row).
/// </summary>
public sealed class GhcnTests : IDisposable
{
    private const string Station = DlyRow.Station;
    private static readonly TimeStep Morning = TimeStep.Days(endingAt: "07:00");
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void A_row_of_the_fixed_form_is_as_wide_as_the_table_of_columns_says() =>
        // source: readme.txt, section III: SFLAG31 stands in column 269.
        (DlyRow.Of(2024, 1, "PRCP").Length, DlyFile.RowLength).ShouldBe((269, 269));

    [Fact]
    public void Values_and_flags_mean_what_the_readme_says()
    {
        // source: readme.txt, section III: PRCP in tenths of mm, -9999 missing, MFLAG T trace, MFLAG P missing presumed zero,
        // any QFLAG a failed check, MFLAG B and D totals of parts of the day, 31 April does not exist.
        var records = ReadDly(
            DlyRow.Of(2024, 4, "TMAX", (1, "  215  S")),
            DlyRow.Of(
                2024,
                4,
                "PRCP",
                (1, "  254  7"),
                (2, "    0T 7"),
                (3, "    0P 7"),
                (4, " 1234 G7"),
                (5, "   12B 7"),
                (6, "    0  7")
            )
        );

        records.GaugeIds.ShouldBe([Station]);
        records.Times.ToString().ShouldBe("2024-04-01 to 2024-04-30");
        Statuses(records)[..8].ShouldBe("OTEFOOMM");
        Depths(records)[..6].ShouldBe([25.4, 0, 0, 123.4, 1.2, 0]);
        Codes().ShouldBe(["RR0262", "RR0270", "RR0271", "RR0274", "RR0281"], ignoreOrder: true);
    }

    [Fact]
    public void The_last_day_of_a_row_ends_in_its_last_column()
    {
        var records = ReadDly(DlyRow.Of(2024, 1, "PRCP", (31, "    5  7")));

        records.Times.TextAt(30).ShouldBe("2024-01-31");
        Depths(records)[30].ShouldBe(0.5);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void A_total_of_several_days_is_an_accumulation(bool countFirst)
    {
        // source: readme.txt, section III: MDPR multiday total, use with DAPR, the number of days included.
        string[] rows = [DlyRow.Of(2024, 1, "MDPR", (4, "  123  7")), DlyRow.Of(2024, 1, "DAPR", (4, "    3  7"))];
        var records = ReadDly([
            DlyRow.Of(2024, 1, "PRCP", (1, "   10  7"), (5, "   20  7")),
            .. countFirst ? rows.Reverse() : rows,
        ]);

        Statuses(records)[..5].ShouldBe("OAAAO");
        records.Accumulations.ShouldBe([new Accumulation(0, 1, 3, 12.3)]);
    }

    [Fact]
    public void A_total_reaches_back_over_the_end_of_a_month()
    {
        var records = ReadDly(
            DlyRow.Of(2023, 12, "PRCP", (30, "   10  7")),
            DlyRow.Of(2024, 1, "PRCP", (3, "   10  7")),
            DlyRow.Of(2024, 1, "MDPR", (2, "   50  7")),
            DlyRow.Of(2024, 1, "DAPR", (2, "    3  7"))
        );

        records.Accumulations.ShouldBe([new Accumulation(0, 30, 32, 5)]);
    }

    [Fact]
    public void A_day_that_has_only_a_total_has_a_row()
    {
        bench.Write(
            "2024.csv",
            $"{Station},20240101,PRCP,1,,,7,\n{Station},20240103,MDPR,9,,,7,\n{Station},20240103,DAPR,2,,,7,\n{Station},20240104,PRCP,1,,,7,\n"
        );
        bench.Verbs.ReadGhcnDaily("2024.csv", Morning).Accumulations.ShouldBe([new Accumulation(0, 1, 2, 0.9)]);

        bench.Study.Findings.Single(finding => finding.Code == "RR0258").What.ShouldStartWith("1 step has no row");
    }

    [Theory]
    [InlineData("  123  7", "-9999   ")] // no number of days
    [InlineData("  123 X7", "    3  7")] // the total failed
    [InlineData("  123  7", "    3 L7")] // the number of days failed
    public void A_total_that_cannot_be_used_leaves_its_days_without_a_value(string total, string days)
    {
        var records = ReadDly(
            DlyRow.Of(2024, 1, "PRCP", (1, "   10  7")),
            DlyRow.Of(2024, 1, "MDPR", (4, total)),
            DlyRow.Of(2024, 1, "DAPR", (4, days))
        );

        records.Accumulations.ShouldBeEmpty();
        records.StatusesAt(3)[0].ShouldBe(RecordStatus.Accumulated);
        Codes().ShouldContain("RR0273");
    }

    [Fact]
    public void A_trace_with_a_depth_is_not_used()
    {
        Statuses(ReadDly(DlyRow.Of(2024, 1, "PRCP", (1, "   10T 7"))))[0].ShouldBe('F');
        Codes().ShouldContain("RR0288");
    }

    [Fact]
    public void Both_forms_give_the_same_records()
    {
        var fixedForm = ReadDly(
            DlyRow.Of(
                2024,
                1,
                "PRCP",
                [
                    .. Enumerable
                        .Range(1, 31)
                        .Select(day =>
                            (
                                day,
                                day == 2 ? "    0T 7"
                                : day == 9 ? "  990 I7"
                                : "   10  7"
                            )
                        ),
                ]
            )
        );
        var rows = Enumerable
            .Range(1, 31)
            .Select(day =>
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"{Station},202401{day:00},PRCP,{(day == 2 ? "0,T,,7" : day == 9 ? "990,,I,7" : "10,,,7")},\n"
                )
            );
        bench.Write("2024.csv", $"{Station},20240101,TMAX,100,,,7,0700\n" + string.Concat(rows));
        var byYear = bench.Verbs.ReadGhcnDaily("2024.csv", Morning);

        byYear.Digest.ShouldBe(fixedForm.Digest);
        bench
            .Study.Statements.Where(fact => fact.Name == "form")
            .Select(fact => fact.Value)
            .ShouldBe(["GHCN-Daily, .dly", "GHCN-Daily, a value a row"]);
    }

    [Fact]
    public void The_readme_of_the_rows_of_values_gives_this_date_and_time()
    {
        // source: readme-by_year.txt: 19860529 is May 29, 1986; 0700 is 7:00 am.
        bench.Write("1986.csv", $"{Station},19860529,PRCP,25,,,0,0700\n");

        bench.Verbs.ReadGhcnDaily("1986.csv", Morning).Times.TextAt(0).ShouldBe("1986-05-29");
        Codes().ShouldNotContain("RR0280");
    }

    [Fact]
    public void Gauges_read_at_another_time_than_declared_are_named_with_their_times()
    {
        bench.Write(
            "2024.csv",
            $"{Station},20240101,PRCP,1,,,7,0700\nUSC00000002,20240101,PRCP,1,,,7,1700\nUSC00000002,20240102,PRCP,1,,,7,1800\nUSC00000002,20240103,PRCP,1,,,7,1700\nUSC00000003,20240101,PRCP,1,,,7,\n"
        );
        bench.Verbs.ReadGhcnDaily("2024.csv", Morning);

        var caution = bench.Study.Findings.Single(finding => finding.Code == "RR0280");
        caution.What.ShouldContain("USC00000002 1700/1800");
        caution.What.ShouldContain("Of 2 gauges");
        caution.What.ShouldNotContain(Station);
    }

    [Fact]
    public void Midnight_is_2400_there()
    {
        bench.Write("2024.csv", $"{Station},20240101,PRCP,1,,,X,2400\n");
        bench.Verbs.ReadGhcnDaily("2024.csv", TimeStep.Days("24:00"));

        Codes().ShouldNotContain("RR0280");
    }

    [Fact]
    public void Only_the_gauges_of_a_network_are_taken()
    {
        bench.Write("2024.csv", $"{Station},20240101,PRCP,1,,,7,\nUSC00000002,20240101,PRCP,oops,,,7,\n");
        var network = bench.Network((Station, 0, 0));

        bench.Verbs.ReadGhcnDaily("2024.csv", Morning, network).GaugeIds.ShouldBe([Station]);
        Bench
            .Refused(() => bench.Verbs.ReadGhcnDaily("2024.csv", Morning, bench.Network(("Q-01", 0, 0))))[0]
            .Code.ShouldBe("RR0287");
    }

    [Fact]
    public void Years_in_packed_files_are_read_as_one()
    {
        bench.Write("2023.csv.gz", Gzip.Pack($"{Station},20231231,PRCP,10,,,7,\n"));
        bench.Write("2024.csv.gz", Gzip.Pack($"{Station},20240101,PRCP,20,,,7,\nUSC00000002,20240101,SNOW,20,,,7,\n"));

        Depths(bench.Verbs.ReadGhcnDaily("20??.csv.gz", Morning)).ShouldBe([1, 2]);
    }

    private static string Statuses(RainRecords records) =>
        string.Concat(Enumerable.Range(0, records.Times.Count).Select(t => records.StatusesAt(t)[0].ToString()[0]));

    private static double[] Depths(RainRecords records) =>
        [.. Enumerable.Range(0, records.Times.Count).Select(t => records.DepthsAt(t)[0])];

    private IEnumerable<string> Codes() => bench.Study.Findings.Select(finding => finding.Code);

    private RainRecords ReadDly(params string[] rows)
    {
        bench.Write($"{Station}.dly", string.Join('\n', rows) + "\n");
        return bench.Verbs.ReadGhcnDaily($"{Station}.dly", Morning);
    }
}

using System.Globalization;
using System.IO.Compression;
using System.Text;
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
    private const string Station = "USC00026481"; // the readme's own example of an id: Phoenix airport, section I
    private static readonly TimeStep Morning = TimeStep.Days(endingAt: "07:00");
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void A_row_of_the_fixed_form_is_as_wide_as_the_table_of_columns_says() =>
        // source: readme.txt, section III: SFLAG31 stands in column 269.
        (Row(2024, 1, "PRCP").Length, DlyFile.RowLength).ShouldBe((269, 269));

    [Fact]
    public void Values_and_flags_mean_what_the_readme_says()
    {
        // source: readme.txt, section III: PRCP in tenths of mm, -9999 missing, MFLAG T trace, MFLAG P missing presumed zero,
        // any QFLAG a failed check, MFLAG B and D totals of parts of the day, 31 April does not exist.
        var records = ReadDly(
            Row(2024, 4, "TMAX", (1, "  215  S")),
            Row(
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
        var records = ReadDly(Row(2024, 1, "PRCP", (31, "    5  7")));

        records.Times.TextAt(30).ShouldBe("2024-01-31");
        Depths(records)[30].ShouldBe(0.5);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void A_total_of_several_days_is_an_accumulation(bool countFirst)
    {
        // source: readme.txt, section III: MDPR multiday total, use with DAPR, the number of days included.
        string[] rows = [Row(2024, 1, "MDPR", (4, "  123  7")), Row(2024, 1, "DAPR", (4, "    3  7"))];
        var records = ReadDly([
            Row(2024, 1, "PRCP", (1, "   10  7"), (5, "   20  7")),
            .. countFirst ? rows.Reverse() : rows,
        ]);

        Statuses(records)[..5].ShouldBe("OAAAO");
        records.Accumulations.ShouldBe([new Accumulation(0, 1, 3, 12.3)]);
    }

    [Fact]
    public void A_total_reaches_back_over_the_end_of_a_month()
    {
        var records = ReadDly(
            Row(2023, 12, "PRCP", (30, "   10  7")),
            Row(2024, 1, "PRCP", (3, "   10  7")),
            Row(2024, 1, "MDPR", (2, "   50  7")),
            Row(2024, 1, "DAPR", (2, "    3  7"))
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

        bench.Study.Findings.Single(finding => finding.Code == "RR0258").What.ShouldStartWith("1 steps");
    }

    [Theory]
    [InlineData("  123  7", "-9999   ")] // no number of days
    [InlineData("  123 X7", "    3  7")] // the total failed
    [InlineData("  123  7", "    3 L7")] // the number of days failed
    public void A_total_that_cannot_be_used_leaves_its_days_without_a_value(string total, string days)
    {
        var records = ReadDly(
            Row(2024, 1, "PRCP", (1, "   10  7")),
            Row(2024, 1, "MDPR", (4, total)),
            Row(2024, 1, "DAPR", (4, days))
        );

        records.Accumulations.ShouldBeEmpty();
        records.StatusesAt(3)[0].ShouldBe(RecordStatus.Accumulated);
        Codes().ShouldContain("RR0273");
    }

    [Fact]
    public void A_trace_with_a_depth_is_not_used()
    {
        Statuses(ReadDly(Row(2024, 1, "PRCP", (1, "   10T 7"))))[0].ShouldBe('F');
        Codes().ShouldContain("RR0288");
    }

    [Fact]
    public void Both_forms_give_the_same_records()
    {
        var fixedForm = ReadDly(
            Row(
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
        bench.Write("2023.csv.gz", Pack($"{Station},20231231,PRCP,10,,,7,\n"));
        bench.Write("2024.csv.gz", Pack($"{Station},20240101,PRCP,20,,,7,\nUSC00000002,20240101,SNOW,20,,,7,\n"));

        Depths(bench.Verbs.ReadGhcnDaily("20??.csv.gz", Morning)).ShouldBe([1, 2]);
    }

    [Theory]
    [InlineData("RR0278", 2, 0, "cut")]
    [InlineData("RR0279", 2, 22, "value")]
    [InlineData("RR0279", 2, 12, "year")]
    [InlineData("RR0279", 2, 12, "month")]
    [InlineData("RR0279", 2, 254, "30 February")]
    [InlineData("RR0279", 2, 22, "less than zero")]
    [InlineData("RR0255", 2, 22, "twice")]
    public void Damage_in_a_fixed_row_is_refused_at_its_place(string code, int line, int column, string damage)
    {
        var first = Row(2023, 2, "PRCP", (1, "   10  7"));
        var row = damage switch
        {
            "cut" => Row(2024, 2, "PRCP")[..^1],
            "value" => Row(2024, 2, "PRCP", (1, "  1O0  7")),
            "year" => Row(2024, 2, "PRCP").Replace("202402", "20x402", StringComparison.Ordinal),
            "month" => Row(2024, 13, "PRCP"),
            "30 February" => Row(2024, 2, "PRCP", (30, "    1  7")),
            "less than zero" => Row(2024, 2, "PRCP", (1, "   -1  7")),
            _ => first,
        };
        bench.Write("a.dly", first + "\n" + row + "\n");
        var problem = Bench.Refused(() => bench.Verbs.ReadGhcnDaily("a.dly", Morning))[0];

        (problem.Code, problem.Where.Line, problem.Where.Column).ShouldBe((code, line, column));
        problem.Mend.ShouldNotBeEmpty();
    }

    [Theory]
    [InlineData("USC00026481,20240101,PRCP,1,,,7\n", "RR0278", 0)]
    [InlineData("USC00026481,20240230,PRCP,1,,,7,\n", "RR0279", 2)]
    [InlineData("USC00026481,2024-01-01,PRCP,1,,,7,\n", "RR0279", 2)]
    [InlineData("USC00026481,20240101,PRCP,1.5,,,7,\n", "RR0279", 4)]
    [InlineData("USC00026481,20240101,PRCP,-1,,,7,\n", "RR0279", 4)]
    [InlineData("USC00026481,20240101,PRCP,1,TT,,7,\n", "RR0279", 5)]
    [InlineData("USC26481,20240101,PRCP,1,,,7,\n", "RR0279", 1)]
    [InlineData("USC00026481,20240102,PRCP,1,,,7,\n", "RR0255", 4)]
    [InlineData("USC00026481,20240103,MDPR,1,,,7,\nUSC00026481,20240103,MDPR,2,,,7,\n", "RR0255", 4)]
    public void Damage_in_a_row_of_one_value_is_refused_at_its_place(string rows, string code, int column)
    {
        bench.Write("2024.csv", "USC00026481,20240102,PRCP,3,,,7,\n" + rows);
        var problem = Bench.Refused(() => bench.Verbs.ReadGhcnDaily("2024.csv", Morning))[0];

        (problem.Code, problem.Where.Column).ShouldBe((code, column));
        problem.Where.Line.ShouldBeGreaterThan(1);
    }

    [Theory]
    [InlineData("date,A\n2024-01-01,1\n", "RR0285")]
    [InlineData("", "RR0201")]
    [InlineData("USC00026481,20240101,TMAX,1,,,7,\n", "RR0287")]
    public void Other_files_are_refused(string text, string code)
    {
        bench.Write("a.csv", text);

        Bench.Refused(() => bench.Verbs.ReadGhcnDaily("a.csv", Morning))[0].Code.ShouldBe(code);
    }

    [Fact]
    public void Only_days_can_be_read()
    {
        bench.Write("2024.csv", $"{Station},20240101,PRCP,1,,,7,\n");

        Bench.Refused(() => bench.Verbs.ReadGhcnDaily("2024.csv", TimeStep.Hours()))[0].Code.ShouldBe("RR0286");
        Bench.Refused(() => bench.Verbs.ReadGhcnDaily("2024.csv", TimeStep.Months))[0].Code.ShouldBe("RR0286");
    }

    [Fact]
    public void Bytes_changed_at_random_are_refused_or_read_and_nothing_else()
    {
        var rows = new[] { "PRCP", "MDPR", "DAPR" }.Select(element => Row(2024, 1, element, (3, "    2  7"))).ToArray();
        var random = new Random(20240109);
        var good = Encoding.ASCII.GetBytes(string.Join('\n', rows) + "\n");
        var refused = 0;
        for (var round = 0; round < 400; round++)
        {
            var bytes = good.ToArray();
            bytes[random.Next(bytes.Length)] = (byte)random.Next(256);
            bench.Write("a.dly", bytes);
            try
            {
                bench.Verbs.ReadGhcnDaily("a.dly", Morning).DepthsAt(0)[0].ShouldBeInRange(0, 10_000);
            }
            catch (Model.Steps.RefusedException refusal)
            {
                refused++;
                refusal.Problems[0].Where.File.ShouldBe("a.dly");
            }
        }

        refused.ShouldBeGreaterThan(100);
    }

    /// <summary>A row by the table of columns: id 1-11, year 12-15, month 16-17, element 18-21, value 22-26, flags 27, 28, 29, and so on.</summary>
    private static string Row(int year, int month, string element, params (int Day, string Value)[] values)
    {
        var row = new StringBuilder(
            string.Create(CultureInfo.InvariantCulture, $"{Station}{year:0000}{month:00}{element}")
        );
        for (var day = 1; day <= 31; day++)
        {
            row.Append(values.FirstOrDefault(value => value.Day == day).Value ?? "-9999   ");
        }

        return row.ToString();
    }

    private static byte[] Pack(string text)
    {
        using var packed = new MemoryStream();
        using (var packer = new GZipStream(packed, CompressionLevel.Optimal, leaveOpen: true))
        {
            packer.Write(Encoding.UTF8.GetBytes(text));
        }

        return packed.ToArray();
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

using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>Times as agencies write them. Forms: source: ISO 8601-1:2019, basic and extended, from memory.</summary>
public sealed class LabelTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    public static TheoryData<TimeStep, string, string> Labels =>
        new()
        {
            { TimeStep.Days("09:00"), "2024-01-31", "2024-01-31" },
            { TimeStep.Days("09:00"), "20240131", "2024-01-31" },
            { TimeStep.Days("09:00"), "2024-01-31T09:00", "2024-01-31" },
            { TimeStep.Days("09:00", "+01:00"), "2024-01-31T09:00:00+01:00", "2024-01-31" },
            { TimeStep.Days("24:00"), "2024-01-31 24:00", "2024-01-31" },
            { TimeStep.Days("00:00"), "2024-01-31 24:00", "2024-02-01" },
            { TimeStep.Days("00:00"), "2024-01-31T00:00", "2024-01-31" },
            { TimeStep.Months, "2024-01", "2024-01" },
            { TimeStep.Months, "2024-01-31", "2024-01" },
            { TimeStep.WaterYears(10), "2024", "2024" },
            { TimeStep.WaterYears(1), "2024", "2024" },
            { TimeStep.Hours(), "2024-01-31T13:00", "2024-01-31T13:00" },
            { TimeStep.Hours(), "20240131 13:00:00.000", "2024-01-31T13:00" },
            { TimeStep.Hours(utcOffset: "+00:00"), "2024-01-31T13:00Z", "2024-01-31T13:00" },
            { TimeStep.Hours(utcOffset: "-05:30"), "2024-01-31T13:00-0530", "2024-01-31T13:00" },
            { TimeStep.Hours(utcOffset: "+01:00"), "2024-01-31T13:00+01", "2024-01-31T13:00" },
            { TimeStep.Hours(), "2024-12-31T24:00", "2025-01-01T00:00" },
            { TimeStep.Minutes(15), "2024-01-31 13:45:00", "2024-01-31T13:45" },
        };

    [Theory]
    [MemberData(nameof(Labels))]
    public void Times_are_read(TimeStep step, string text, string label) =>
        Read(step, text).Times.TextAt(0).ShouldBe(label);

    public static TheoryData<TimeStep, string, string> Refusals =>
        new()
        {
            { TimeStep.Days("09:00"), "2024-02-30", "RR0252" },
            { TimeStep.Days("09:00"), "2023-02-29", "RR0252" },
            { TimeStep.Days("09:00"), "2024-13-01", "RR0252" },
            { TimeStep.Days("09:00"), "0000-01-01", "RR0252" },
            { TimeStep.Days("09:00"), "31.01.2024", "RR0252" },
            { TimeStep.Days("09:00"), "2024-01", "RR0252" },
            { TimeStep.Days("09:00"), "2024", "RR0252" },
            { TimeStep.Days("09:00"), "2024-01-31T9:00", "RR0252" },
            { TimeStep.Days("09:00"), "2024-01-31T24:01", "RR0252" },
            { TimeStep.Days("09:00"), "2024-01-31T25:00", "RR0252" },
            { TimeStep.Days("09:00"), "2024-01-31T09:00:00.5", "RR0252" },
            { TimeStep.Days("09:00"), "2024-01-31T09:00+1", "RR0252" },
            { TimeStep.Days("09:00"), "2024-01-31T07:00", "RR0253" },
            { TimeStep.Days("24:00"), "2024-01-31T00:00", "RR0253" },
            { TimeStep.Days("09:00"), "2024-01-31T09:00Z", "RR0276" },
            { TimeStep.Hours(utcOffset: "+01:00"), "2024-01-31T13:00+02:00", "RR0276" },
            { TimeStep.Hours(), "2024-01-31", "RR0252" },
            { TimeStep.Hours(), "2024-01-31T13:05", "RR0253" },
            { TimeStep.Minutes(5), "2024-01-31T13:05:01", "RR0253" },
            { TimeStep.Months, "2024-01-31T09:00", "RR0253" },
        };

    [Theory]
    [MemberData(nameof(Refusals))]
    public void What_is_no_label_of_the_step_is_refused(TimeStep step, string text, string code)
    {
        var problem = Bench.Refused(() => Read(step, text, "2024-06-01"))[0];

        (problem.Code, problem.Where.Line, problem.Where.Column).ShouldBe((code, 2, 1));
        problem.What.ShouldContain(text);
        problem.Mend.ShouldNotBeEmpty();
    }

    [Fact]
    public void Two_clocks_are_both_named()
    {
        var problem = Bench.Refused(() => Read(TimeStep.Hours(utcOffset: "+01:00"), "2024-07-01T13:00+02:00"))[0];

        problem.What.ShouldContain("UTC+02:00");
        problem.What.ShouldContain("UTC+01:00");
        Bench
            .Refused(() => Read(TimeStep.Hours(), "2024-07-01T13:00+02:00"))[0]
            .Mend.ShouldContain("utcOffset: \"+02:00\"");
    }

    [Fact]
    public void An_hour_twice_in_autumn_is_told_as_the_work_of_a_clock()
    {
        // source: Directive 2000/84/EC: summer time ends on the last Sunday of October, 27 October 2024; from memory.
        var problem = Bench.Refused(() =>
            Read(TimeStep.Hours(), "2024-10-27T01:00", "2024-10-27T02:00", "2024-10-27T02:00", "2024-10-27T03:00")
        )[0];

        (problem.Code, problem.Where.Line).ShouldBe(("RR0255", 4));
        problem.What.ShouldContain("line 3");
        problem.Mend.ShouldContain("summer time");
        Bench
            .Refused(() => Read(TimeStep.Hours(), "2024-10-28T02:00", "2024-10-28T02:00"))[0]
            .Mend.ShouldNotContain("summer time");
    }

    [Fact]
    public void An_hour_that_is_not_there_in_spring_is_told_as_the_work_of_a_clock()
    {
        // source: Directive 2000/84/EC: summer time begins on the last Sunday of March, 31 March 2024; from memory.
        Read(TimeStep.Hours(), "2024-03-31T01:00", "2024-03-31T02:00", "2024-03-31T04:00");

        var clock = bench.Study.Findings.Single(finding => finding.Code == "RR0277");
        clock.What.ShouldContain("2024-03-31");
    }

    [Theory]
    [InlineData("2024-03-31T01:00", "2024-03-31T06:00")]
    [InlineData("2024-04-01T01:00", "2024-04-01T03:00")]
    public void Other_holes_are_not(string before, string after)
    {
        Read(TimeStep.Hours(), before, after);

        bench.Study.Findings.ShouldNotContain(finding => finding.Code == "RR0277");
    }

    [Fact]
    public void Newest_first_is_put_in_order()
    {
        var texts = Enumerable
            .Range(1, 28)
            .Select(day => FormattableString.Invariant($"2024-02-{29 - day:00}"))
            .ToArray();
        var records = Read(TimeStep.Days("09:00"), texts);

        records.Times.ToString().ShouldBe("2024-02-01 to 2024-02-28");
        Enumerable
            .Range(0, 28)
            .Select(t => records.DepthsAt(t)[0])
            .ShouldBe(Enumerable.Range(1, 28).Reverse().Select(d => (double)d));
    }

    [Fact]
    public void Rows_in_any_order_with_holes_land_at_their_steps()
    {
        // Common practice, no source: the day of the year that a row names is where its value must stand.
        var random = new Random(5);
        var days = Enumerable.Range(0, 2000).Where(_ => random.Next(3) > 0).ToArray();
        random.Shuffle(days);
        var first = new NodaTime.LocalDate(2019, 1, 1);
        bench.Write(
            "rain.csv",
            "date,A\n"
                + string.Concat(
                    days.Select(day =>
                        $"{NodaTime.Text.LocalDatePattern.Iso.Format(first.PlusDays(day))},{day.ToString(System.Globalization.CultureInfo.InvariantCulture)}\n"
                    )
                )
        );
        var records = bench.Verbs.ReadRecords("rain.csv", RainUnit.HundredthsOfInch, TimeStep.Days("09:00"));

        records.Times.Count.ShouldBe(days.Max() - days.Min() + 1);
        for (var t = 0; t < records.Times.Count; t++)
        {
            var day = t + days.Min();
            var isThere = days.Contains(day);
            records.StatusesAt(t)[0].ShouldBe(isThere ? RecordStatus.Observed : RecordStatus.Missing);
            records.DepthsAt(t)[0].ShouldBe(isThere ? day * 25.4 / 100 : 0);
        }
    }

    [Fact]
    public void A_span_that_no_record_has_is_refused_naming_both_lines()
    {
        // 300 years of minutes for eight gauges are more than a thousand million values.
        bench.Write(
            "rain.csv",
            "time,A,B,C,D,E,F,G,H\n2024-01-01T00:01,1,1,1,1,1,1,1,1\n2324-01-01T00:01,1,1,1,1,1,1,1,1\n"
        );
        var problem = Bench.Refused(() =>
            bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Minutes(1))
        )[0];

        (problem.Code, problem.Where.Line).ShouldBe(("RR0266", 3));
        problem.What.ShouldContain("2024-01-01T00:01 (line 2)");
        problem.What.ShouldContain("2324-01-01T00:01 (line 3)");
    }

    [Fact]
    public void Intensities_become_depths_by_the_length_of_the_step()
    {
        bench.Write("rain.csv", "time,A\n2024-01-01T00:15,12\n");

        bench
            .Verbs.ReadRecords("rain.csv", RainUnit.MillimetresPerHour, TimeStep.Minutes(15))
            .DepthsAt(0)[0]
            .ShouldBe(3);
    }

    [Theory]
    [InlineData(15, 197, false)]
    [InlineData(15, 199, true)]
    [InlineData(60, 304, false)]
    [InlineData(60, 306, true)]
    [InlineData(720, 1143, false)]
    [InlineData(720, 1145, true)]
    public void No_step_holds_more_than_was_ever_measured_in_its_length(int minutes, int depth, bool isFound)
    {
        // source: WMO World Weather & Climate Extremes Archive, rainfall: 15 min 198 mm, 1 h 305 mm, 12 h 1144 mm; from memory.
        bench.Write("rain.csv", FormattableString.Invariant($"time,A\n2024-01-01T12:00,{depth}\n"));
        bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Minutes(minutes));

        bench.Study.Findings.Any(finding => finding.Code == "RR0260").ShouldBe(isFound);
    }

    private RainRecords Read(TimeStep step, params string[] labels)
    {
        var rows = labels.Select((label, i) => FormattableString.Invariant($"{label},{i + 1}\n"));
        bench.Write("rain.csv", "time,A\n" + string.Concat(rows));
        return bench.Verbs.ReadRecords(
            "rain.csv",
            RainUnit.Millimetres,
            step,
            form: Steps.Reading.RecordForm.Wide(time: "time")
        );
    }
}

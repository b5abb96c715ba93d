using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Records;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Records;

/// <summary>Sums of plain numbers, worked in the head; statuses by the definitions in <see cref="RecordStatus"/>.</summary>
public sealed class LongerStepsTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Hours_are_put_into_observation_days_by_their_intervals()
    {
        // Hour h of two days has depth h where h counts from 1; the day ending 09:00 holds hours 1 to 9, then 10 to 33.
        var hourly = Hours(48, h => h + 1);

        var daily = hourly.ToDays(endingAt: "09:00", complete: AtLeast.Steps(1));

        daily.Times.ToString().ShouldBe("2024-01-01 to 2024-01-03");
        Depths(daily).ShouldBe([45, Sum(10, 33), Sum(34, 48)]);
        Statuses(daily).ShouldBe([RecordStatus.Estimated, RecordStatus.Observed, RecordStatus.Estimated]);
        bench.Study.Findings.Single().Code.ShouldBe("RR0530");
        Statuses(hourly.ToDays("09:00")).ShouldBe([RecordStatus.Missing, RecordStatus.Observed, RecordStatus.Missing]);
        Depths(hourly.ToDays("24:00")).ShouldBe([Sum(1, 24), Sum(25, 48)]);
        Depths(hourly.ToDays("00:00")).ShouldBe([Sum(1, 24), Sum(25, 48)]);
        hourly.ToDays("00:00").Times.ToString().ShouldBe("2024-01-02 to 2024-01-03");
    }

    [Fact]
    public void Hours_dated_by_their_start_fall_into_the_same_days()
    {
        var byEnd = Hours(48, h => h + 1).ToDays("24:00");
        var byStart = bench
            .Records(
                TimeStep.Hours(datedByStart: true),
                new LocalDateTime(2024, 1, 1, 0, 0),
                ("A", string.Join(' ', Enumerable.Range(1, 48)))
            )
            .ToDays("24:00");

        Depths(byStart).ShouldBe(Depths(byEnd));
        byStart.Times.ShouldBe(byEnd.Times);
    }

    [Fact]
    public void Clocks_are_told_apart_by_their_offset()
    {
        // 09:00 at UTC+01:00 is 08:00 UTC: the day holds one hour less of the hours that end after 08:00 UTC.
        var utc = Hours(48, h => h + 1, TimeStep.Hours(utcOffset: "+00:00"));

        Depths(utc.ToDays("09:00", utcOffset: "+01:00"))[1].ShouldBe(Sum(9, 32));
        Depths(utc.ToDays("09:00"))[1].ShouldBe(Sum(10, 33));
        var unsaid = Hours(48, h => h + 1);
        Bench.Refused(() => unsaid.ToDays("09:00", utcOffset: "+01:00"))[0].Code.ShouldBe("RR0525");
        Bench.Refused(() => TimeStep.Hours(utcOffset: "1 h"))[0].Code.ShouldBe("RR0520");
    }

    [Theory]
    [InlineData("09:00", "RR0526")]
    [InlineData("06:30", "RR0526")]
    public void Steps_that_straddle_the_longer_one_are_refused(string endingAt, string code)
    {
        var six = Hours(8, _ => 1, TimeStep.Hours(6));

        Bench.Refused(() => six.ToDays(endingAt))[0].Code.ShouldBe(code);
        six.ToDays("06:00").Times.Count.ShouldBe(3);
        Bench.Refused(() => six.ToHours(8))[0].Code.ShouldBe("RR0526");
    }

    [Fact]
    public void Days_are_neither_shifted_nor_cut()
    {
        var daily = bench.Records(Rainfall.Daily, new LocalDateTime(2024, 1, 1, 0, 0), ("A", "1 2 3"));

        Bench.Refused(() => daily.ToDays("24:00"))[0].Code.ShouldBe("RR0527");
        Bench.Refused(() => daily.ToHours(6))[0].Code.ShouldBe("RR0527");
        Bench.Refused(() => daily.ToMonths().ToMonths())[0].Code.ShouldBe("RR0527");
        Bench.Refused(() => TimeStep.Minutes(7))[0].Code.ShouldBe("RR0521");
        Bench.Refused(() => TimeStep.Hours(24))[0].Code.ShouldBe("RR0521");
    }

    [Fact]
    public void Months_and_water_years_ask_for_enough_steps()
    {
        var days = Enumerable.Repeat("1", 366).Select((one, day) => day is >= 10 and < 13 ? "." : one);
        var daily = bench.Records(Rainfall.Daily, new LocalDateTime(2023, 10, 1, 0, 0), ("A", string.Join(' ', days)));

        Depths(daily.ToMonths(AtLeast.Steps(28))).ShouldBe([28, 30, 31, 31, 29, 31, 30, 31, 30, 31, 31, 30]);
        Statuses(daily.ToMonths(AtLeast.Steps(29)))[0].ShouldBe(RecordStatus.Missing);
        var year = daily.ToWaterYears(firstMonth: 10, complete: AtLeast.Percent(99));
        (year.Times.ToString(), Depths(year)[0]).ShouldBe(("2024 to 2024", 363));
        Depths(daily.ToMonths(AtLeast.Steps(28)).ToWaterYears(10)).ShouldBe([363]);
    }

    [Fact]
    public void Statuses_survive()
    {
        var hourly = bench.Records(
            TimeStep.Hours(12),
            new LocalDateTime(2024, 1, 1, 12, 0),
            ("A", "0 T 1 e2 . 1 x9 1 a a=8 1 a"),
            ("B", "1 2 3 4 5 6 7 8 9 10 11 12")
        );

        var daily = hourly.ToDays("24:00");

        Enumerable
            .Range(0, 6)
            .Select(t => daily.StatusesAt(t)[0])
            .ShouldBe([
                RecordStatus.Trace,
                RecordStatus.Estimated,
                RecordStatus.Missing,
                RecordStatus.Failed,
                RecordStatus.Observed,
                RecordStatus.Accumulated,
            ]);
        daily.DepthsAt(4)[0].ShouldBe(8);
        daily.DepthsAt(1)[0].ShouldBe(3);
        bench.Study.Statements.ShouldContain(
            ("values", "7 observed, 1 trace, 1 estimated, 1 accumulated, 1 failed quality, 1 missing")
        );
    }

    private RainRecords Hours(int count, Func<int, double> depth, TimeStep? step = null) =>
        bench.Records(
            step ?? TimeStep.Hours(),
            new LocalDateTime(2024, 1, 1, 0, 0).PlusHours(step == TimeStep.Hours(6) ? 6 : 1),
            ("A", string.Join(' ', Enumerable.Range(0, count).Select(h => FormattableString.Invariant($"{depth(h)}"))))
        );

    private static double Sum(int first, int last) => Enumerable.Range(first, last - first + 1).Sum();

    private static double[] Depths(RainRecords records) =>
        [.. Enumerable.Range(0, records.Times.Count).Select(t => records.DepthsAt(t)[0])];

    private static RecordStatus[] Statuses(RainRecords records) =>
        [.. Enumerable.Range(0, records.Times.Count).Select(t => records.StatusesAt(t)[0])];
}

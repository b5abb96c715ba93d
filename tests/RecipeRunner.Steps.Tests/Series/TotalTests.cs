using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Numerics.Statistics;
using RecipeRunner.Steps.Records;
using RecipeRunner.Steps.Series;
using RecipeRunner.Steps.Tests.Support;
using RecipeRunner.Steps.Weighting;

namespace RecipeRunner.Steps.Tests.Series;

public sealed class TotalTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Months_that_a_span_cuts_are_pointed_out()
    {
        // June has the date 1 June, which is not from 15 June on; July is taken with all of its days.
        var rain = bench.Records(TimeStep.Months, new LocalDateTime(2024, 5, 1, 0, 0), ("A", "5 6 7 8"));

        rain.Between("2024-06-15", "2024-07-20").DepthsAt(0).ToArray().ShouldBe([7]);

        var finding = bench.Study.Findings.Single();
        finding.Code.ShouldBe("RR0550");
        finding.What.ShouldContain("2024-06-15 lies within 2024-06, which is left out");
        finding.What.ShouldContain("2024-07-20 lies within 2024-07, which is taken whole");
        bench.Study.Findings.Clear();
        rain.Between("2024-06-01", "2024-07-31").Times.Count.ShouldBe(2);
        bench.Study.Findings.ShouldBeEmpty();
    }

    [Fact]
    public void Months_are_summed_by_the_date_of_their_steps()
    {
        var totals = Areal(new LocalDate(2024, 1, 1), 60, _ => 1).Total(Every.Month);

        totals.Starts.Select(totals.Period.NameOf).ShouldBe(["2024-01", "2024-02"]);
        totals.At(0, 0).ShouldBe(new ArealTotal(31, 31, 31, 1, 1));
        totals.At(1, 0).ShouldBe(new ArealTotal(29, 29, 29, 1, 1));
    }

    [Fact]
    public void A_water_year_is_named_by_the_year_in_which_it_ends()
    {
        var totals = Areal(new LocalDate(2022, 10, 1), 731, _ => 2).Total(Every.WaterYear(firstMonth: 10));

        totals.Starts.ShouldBe([new LocalDate(2022, 10, 1), new LocalDate(2023, 10, 1)]);
        totals.Starts.Select(totals.Period.NameOf).ShouldBe(["2023", "2024"]);
        totals.At(0, 0).ShouldBe(new ArealTotal(730, 365, 365, 1, 1));
        totals.At(1, 0).ShouldBe(new ArealTotal(732, 366, 366, 1, 1));
    }

    [Fact]
    public void Periods_with_too_few_values_are_withheld_and_short_sums_are_pointed_out()
    {
        var areal = Areal(new LocalDate(2024, 1, 1), 60, day => day == 10 ? null : 1);

        areal.Total(Every.Month).At(0, 0).ShouldBe(new ArealTotal(null, 30, 31, 1, 1));
        areal.Total(Every.Month, AtLeast.Percent(90)).At(0, 0).ShouldBe(new ArealTotal(30, 30, 31, 1, 1));
        bench.Study.Findings.Single(finding => finding.Code == "RR0505").What.ShouldContain("box 2024-01 (30 of 31)");
        bench.Study.Findings.First(finding => finding.Code == "RR0506").What.ShouldContain("box 2024-01 (30 of 31)");
        areal.Total(Every.Month).Completeness().ToTable().Columns[2].Numbers.ShouldBe([30, 29]);
    }

    [Fact]
    public void A_period_cut_by_the_records_end_counts_the_steps_that_are_not_there()
    {
        Areal(new LocalDate(2024, 1, 1), 40, _ => 1)
            .Total(Every.Month)
            .At(1, 0)
            .ShouldBe(new ArealTotal(null, 9, 29, 1, 1));
        Areal(new LocalDate(2024, 1, 1), 40, _ => 1).Total().At(0, 0).ShouldBe(new ArealTotal(40, 40, 40, 1, 1));
        Areal(new LocalDate(2024, 1, 1), 40, _ => 1).Total(Every.CalendarYear).At(0, 0).StepsExpected.ShouldBe(366);
    }

    [Fact]
    public void Seasons_run_over_the_turn_of_the_year()
    {
        var totals = Areal(new LocalDate(2023, 12, 1), 183, _ => 1).Total(Every.Season);

        totals.Starts.Select(totals.Period.NameOf).ShouldBe(["2024-DJF", "2024-MAM"]);
        Enumerable.Range(0, 2).Select(p => totals.At(p, 0).DepthMillimetres).ShouldBe([91, 92]);
    }

    [Fact]
    public void Hours_belong_to_the_month_in_which_they_began()
    {
        var hours = bench.Records(TimeStep.Hours(12), new LocalDateTime(2024, 1, 30, 12, 0), ("A", "1 2 4 8 16 32"));
        var totals = bench
            .Basins(("box", Bench.Box(0, 0, 100, 100)))
            .WeighBy(bench.Network(("A", 50, 50)).ThiessenCells())
            .MeanRain(hours, GapPolicy.Redraw)
            .Total(Every.Month, AtLeast.Percent(0));

        totals.At(0, 0).ShouldBe(new ArealTotal(15, 4, 62, 1, 1));
        totals.At(1, 0).ShouldBe(new ArealTotal(48, 2, 58, 1, 1));
        Bench
            .Refused(() =>
                bench
                    .Basins(("box", Bench.Box(0, 0, 100, 100)))
                    .WeighBy(bench.Network(("A", 50, 50)).ThiessenCells())
                    .MeanRain(hours.ToMonths(AtLeast.Steps(1)).ToWaterYears(10, AtLeast.Steps(1)), GapPolicy.Redraw)
                    .Total(Every.CalendarYear)
            )[0]
            .Code.ShouldBe("RR0523");
    }

    [Fact]
    public void A_total_says_what_reported_behind_it()
    {
        // By hand: two gauges of equal weight; both report on the first day, one on the second, none on the third.
        var rain = bench.Records(Rainfall.Daily, new LocalDateTime(2024, 1, 1, 0, 0), ("A", "1 2 ."), ("B", "3 . ."));
        var total = bench
            .Basins(("box", Bench.Box(0, 0, 100, 100)))
            .WeighBy(bench.Network(("A", 0, 50), ("B", 100, 50)).ThiessenCells())
            .MeanRain(rain, GapPolicy.Redraw)
            .Total(complete: AtLeast.Steps(2));

        total.At(0, 0).ShouldBe(new ArealTotal(4, 2, 3, 1, 0.75));
    }

    [Fact]
    public void Sums_keep_the_digits_that_plain_addition_drops()
    {
        // source: Neumaier 1974, doi:10.1002/zamm.19740540106; in exact arithmetic the sum is 2, plain addition of doubles gives 0.
        var sum = new CompensatedSum();
        foreach (var value in (double[])[1, 1e100, 1, -1e100])
        {
            sum.Add(value);
        }

        sum.Value.ShouldBe(2);
    }

    [Fact]
    public void Totals_stand_beside_their_basins_as_columns()
    {
        var areal = Areal(new LocalDate(2024, 1, 1), 31, _ => 1);
        var layer = areal.Basins.With(areal.Total()).With(areal.Total(Every.Month));

        layer.Columns.Select(column => column.Name).ShouldBe(["rain_mm", "mm_2024_01"]);
        layer.Columns[1].Numbers[0].ShouldBe(31);
        bench.Study.Findings.ShouldNotContain(finding => finding.Code == "RR0508");
        layer.With(areal.Total());
        bench.Study.Findings.ShouldContain(finding => finding.Code == "RR0508");
    }

    [Fact]
    public void Dates_are_taken_from_one_to_another_and_a_short_reach_is_pointed_out()
    {
        var rain = Rain(new LocalDate(2024, 1, 1), 31, day => day);

        rain.Between("2024-01-10", "2024-01-12").Times.ToString().ShouldBe("2024-01-10 to 2024-01-12");
        bench.Study.Findings.ShouldBeEmpty();
        rain.Between("2024-01-30", "2024-02-02").Times.Count.ShouldBe(2);
        bench.Study.Findings.Single().Code.ShouldBe("RR0516");
        Bench.Refused(() => rain.Between("2025-01-01", "2025-01-02"))[0].Code.ShouldBe("RR0515");
        Bench.Refused(() => rain.Between("1.1.2024", "2024-01-02"))[0].Code.ShouldBe("RR0517");
    }

    [Fact]
    public void Gauges_that_always_reported_are_taken()
    {
        bench.Write("rain.csv", "date,A,B\n2024-01-01,1,\n2024-01-02,2,3\n");
        var rain = bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Days("09:00"));
        var network = bench.Network(("A", 0, 0), ("B", 10, 0), ("C", 20, 0));

        network.Reporting(rain).Gauges.Select(gauge => gauge.Id).ShouldBe(["A"]);
        network
            .Reporting(rain.Between("2024-01-02", "2024-01-02"))
            .Gauges.Select(gauge => gauge.Id)
            .ShouldBe(["A", "B"]);
        Bench.Refused(() => network.Without("A").Reporting(rain))[0].Code.ShouldBe("RR0518");
    }

    private RainRecords Rain(LocalDate first, int days, Func<int, double?> depth)
    {
        var rows = Enumerable
            .Range(0, days)
            .Select(day =>
                FormattableString.Invariant(
                    $"{NodaTime.Text.LocalDatePattern.Iso.Format(first.PlusDays(day))},{depth(day)}\n"
                )
            );
        bench.Write("rain.csv", "date,A\n" + string.Concat(rows));
        return bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Days("09:00"));
    }

    private ArealRainfall Areal(LocalDate first, int days, Func<int, double?> depth) =>
        bench
            .Basins(("box", Bench.Box(0, 0, 100, 100)))
            .WeighBy(bench.Network(("A", 50, 50)).ThiessenCells())
            .MeanRain(Rain(first, days, depth), GapPolicy.Redraw);
}

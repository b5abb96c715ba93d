using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading;
using RecipeRunner.Steps.Records;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Records;

/// <summary>Where values come from, told by the steps that gave them; lines and columns counted by hand.</summary>
public sealed class OriginTests : IDisposable
{
    private static readonly LocalDateTime First = new(2024, 1, 1, 0, 0);
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void A_wide_files_value_comes_from_its_row_and_column()
    {
        bench.Write("rain.csv", "date,B,A\n\n2024-01-02,3,4\n2024-01-01,1, 2\n");

        Cells("rain.csv", null, gauge: 0, step: 0).ShouldBe([("rain.csv", 4, 3, " 2")]);
        Cells("rain.csv", null, gauge: 1, step: 1).ShouldBe([("rain.csv", 3, 2, "3")]);
    }

    [Fact]
    public void A_long_files_value_comes_from_its_row_in_the_file_that_holds_it()
    {
        bench.Write("rain-1.csv", "mm,day,id\n1,2024-01-01,A\n2,2024-01-02,A\n");
        bench.Write("rain-2.csv", "mm,day,id\n7,2024-01-03,A\n");
        var form = RecordForm.Long(gauge: "id", time: "day", value: "mm");

        Cells("rain-*.csv", form, gauge: 0, step: 1).ShouldBe([("rain-1.csv", 3, 1, "2")]);
        Cells("rain-*.csv", form, gauge: 0, step: 2).ShouldBe([("rain-2.csv", 2, 1, "7")]);
    }

    [Fact]
    public void A_file_without_a_header_begins_on_line_one()
    {
        bench.Write("rain.csv", "2024-01-01,1\n2024-01-02,2\n");
        var form = RecordForm.Wide(time: 1, gauges: ["A"]);

        Cells("rain.csv", form, gauge: 0, step: 0).ShouldBe([("rain.csv", 1, 2, "1")]);
        Cells("rain.csv", form, gauge: 0, step: 1).ShouldBe([("rain.csv", 2, 2, "2")]);
        bench.Write("rain.csv", "2024-01-01,x\n2024-01-02,2\n");
        Bench.Refused(() => Cells("rain.csv", form, 0, 0))[0].Where.Line.ShouldBe(1);
    }

    [Fact]
    public void A_climate_record_names_its_line_and_the_day_in_it()
    {
        // source: NOAA GHCN-Daily readme.txt, section III: values of five characters with three flags from column 22 on.
        var days = string.Concat(Enumerable.Range(1, 31).Select(day => FormattableString.Invariant($"{day, 5}  7")));
        bench.Write("USC00026481.dly", "USC00026481202401PRCP" + days + "\n");
        var step = new ReadGhcnDailyStep("USC00026481.dly", Rainfall.Daily, null);

        Told(step.OriginsOf(bench.Study.Run(step), 0, 2, bench.Study.Context))
            .ShouldBe([("USC00026481.dly", 1, 38, "    3  7")]);

        bench.Write("2024.csv", "USC00026481,20240101,PRCP,5,,,7,0700\nUSC00026481,20240102,PRCP,6,,,7,0700\n");
        step = step with { File = "2024.csv" };
        Told(step.OriginsOf(bench.Study.Run(step), 0, 1, bench.Study.Context)).ShouldBe([("2024.csv", 2, 4, "6")]);
    }

    [Fact]
    public void Steps_that_pass_values_on_name_the_value_before()
    {
        var rain = bench.Records(Rainfall.Daily, First, ("A", "1 2 3"), ("B", "a a=9 4"));

        Earlier(new BetweenStep(rain, "2024-01-02", "2024-01-03"), 0, 0).ShouldBe([(rain, 0, 1)]);
        Earlier(new WithoutRecordsStep(rain, ["A"]), 0, 2).ShouldBe([(rain, 1, 2)]);
        var more = bench.Records(Rainfall.Daily, First.PlusDays(3), ("B", "5 6"));
        Earlier(new JoinRecordsStep(rain, more), 1, 4).ShouldBe([(more, 0, 1)]);
        Earlier(new JoinRecordsStep(rain, more), 1, 2).ShouldBe([(rain, 1, 2)]);
        Earlier(new SpreadAccumulationsStep(rain, bench.Network(("A", 0, 0), ("B", 1, 1)), 4), 1, 0)
            .ShouldBe([(rain, 1, 1)]);
        Earlier(new ToLongerStepsStep(rain, TimeStep.Months, AtLeast.Steps(1)), 0, 0)
            .ShouldBe([(rain, 0, 0), (rain, 0, 1), (rain, 0, 2)]);
    }

    private (string, int, int, string)[] Cells(string file, RecordForm? form, int gauge, int step)
    {
        var reading = new ReadRecordsStep(file, RainUnit.Millimetres, Rainfall.Daily, [], [], [], [], form);
        return Told(reading.OriginsOf(bench.Study.Run(reading), gauge, step, bench.Study.Context));
    }

    private (RainRecords, int, int)[] Earlier<T>(T step, int gauge, int index)
        where T : Step<RainRecords>, IRecordStep =>
        [
            .. step.OriginsOf(bench.Study.Run(step), gauge, index, bench.Study.Context)
                .Cast<EarlierValue>()
                .Select(value => (value.Records, value.Gauge, value.Step)),
        ];

    private static (string, int, int, string)[] Told(IEnumerable<ValueOrigin> origins) =>
        [.. origins.Cast<FileValue>().Select(cell => (cell.Where.File, cell.Where.Line, cell.Where.Column, cell.Text))];
}

using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Answers;
using RecipeRunner.Steps.Tests.Support;
using RecipeRunner.Steps.Weighting;

namespace RecipeRunner.Steps.Tests.Answers;

public sealed class ComparePoliciesTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Without_a_step_to_compare_there_is_no_sum()
    {
        var weights = bench
            .Basins(("strip", Bench.Box(0, 0, 100, 10)))
            .WeighBy(bench.Network(("A", 10, 5), ("B", 90, 5)).ThiessenCells());
        var rain = bench.Records(Rainfall.Daily, new LocalDateTime(2024, 1, 1, 0, 0), ("A", ". ."), ("B", ". ."));

        var table = weights.ComparePolicies(rain).ToTable();

        string[] sums = ["redraw_mm", "rescale_mm", "difference_mm", "largest_mm", "withhold_mm"];
        sums.ShouldAllBe(name => Numbers(table, name).Single() == null);
    }

    /// <summary>
    /// By hand: a strip of 100 with gauges at 10, 50 and 90, walls at 30 and 70, weights 0.3, 0.4, 0.3. Without the last the wall
    /// stands at 30 still and the middle gauge has 0.7: Redraw gives 0.3·0 + 0.7·10 = 7 mm, Rescale (0.3·0 + 0.4·10) / 0.7 = 40/7.
    /// </summary>
    [Fact]
    public void A_strip_of_three_gauges_shows_where_the_policies_part()
    {
        var weights = bench
            .Basins(("strip", Bench.Box(0, 0, 100, 10)))
            .WeighBy(bench.Network(("A", 10, 5), ("B", 50, 5), ("C", 90, 5)).ThiessenCells());
        var rain = bench.Records(
            Rainfall.Daily,
            new LocalDateTime(2024, 2, 28, 0, 0),
            ("A", "0 0 0 . 5"),
            ("B", "10 10 10 . 5"),
            ("C", ". 10 . . 5")
        );

        var table = weights.ComparePolicies(rain).ToTable();

        // 28 and 29 February fall into DJF, 1 to 3 March into MAM.
        Texts(table, "season").ShouldBe(["MAM", "DJF"]);
        Numbers(table, "steps").ShouldBe([3, 2]);
        Numbers(table, "steps_redraw").ShouldBe([2, 2]);
        Numbers(table, "steps_rescale").ShouldBe([2, 2]);
        Numbers(table, "steps_withhold").ShouldBe([1, 1]);
        Near(table, "redraw_mm", 12, 14);
        Near(table, "rescale_mm", 5 + (40.0 / 7), 7 + (40.0 / 7));
        Near(table, "difference_mm", (40.0 / 7) - 7, (40.0 / 7) - 7);
        Near(table, "withhold_mm", 5, 7);
        Near(table, "left_out_percent", 100 * 7.0 / 12, 50);
        Texts(table, "largest_end").ShouldBe(["2024-03-01T09:00", "2024-02-28T09:00"]);
    }

    [Fact]
    public void Thresholds_hold_under_every_policy()
    {
        var weights = bench
            .Basins(("strip", Bench.Box(0, 0, 100, 10)))
            .WeighBy(bench.Network(("A", 10, 5), ("B", 50, 5), ("C", 90, 5)).ThiessenCells());
        var rain = bench.Records(
            Rainfall.Daily,
            new LocalDateTime(2024, 1, 1, 0, 0),
            ("A", "0"),
            ("B", "9"),
            ("C", ".")
        );

        double? Redrawn(ReportingRule rule) =>
            Named(weights.ComparePolicies(rain, rule, Every.Month).ToTable(), "steps_redraw").Numbers[0];

        Redrawn(AtLeast.Percent(70)).ShouldBe(1);
        Redrawn(AtLeast.Percent(71)).ShouldBe(0);
        Redrawn(AtLeast.Gauges(2)).ShouldBe(1);
        Redrawn(AtLeast.Gauges(3)).ShouldBe(0);
        Redrawn(Within.Kilometres(0)).ShouldBe(1);
        Redrawn(AtLeast.Percent(70) & AtLeast.Gauges(3)).ShouldBe(0);
        (AtLeast.Percent(60) & AtLeast.Gauges(2) & Within.Kilometres(30))
            .ToSettingText()
            .ShouldBe("at least 60 % and at least 2 gauges and a gauge within 30 km");
    }

    private static void Near(Table table, string name, params double[] expected) =>
        Numbers(table, name).Zip(expected).ShouldAllBe(pair => Math.Abs(pair.First!.Value - pair.Second) < 1e-9);

    private static Column Named(Table table, string name) => table.Columns.Single(column => column.Name == name);

    private static double?[] Numbers(Table table, string name) => [.. Named(table, name).Numbers];

    private static string[] Texts(Table table, string name) => [.. Named(table, name).Texts];
}

using CsCheck;
using RecipeRunner.Numerics.Gaps;
using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Numerics.Tests.Gaps;

/// <summary>What is promised whatever the record: same bits, and refusals instead of wrong numbers. <i>common practice, no source</i></summary>
public sealed class GapPromiseTests
{
    [Fact]
    public void Bits_depend_on_nothing_but_the_record() =>
        Gen.Select(Network.Any, Gen.Int[0, int.MaxValue])
            .Sample(
                (network, seed) =>
                {
                    var block = Block.Of(network, seed, 14);
                    double[] plain = block.Means(ReportingWeights.DefaultBudgetBytes, 1);
                    block.Means(ReportingWeights.DefaultBudgetBytes, 2).ShouldBe(plain);
                    block.Means(ReportingWeights.DefaultBudgetBytes, 3).ShouldBe(plain);
                    block.Means(ReportingWeights.DefaultBudgetBytes, int.MaxValue).ShouldBe(plain);
                    block.Means(0, 2).ShouldBe(plain);
                    block.Means(10_000, 1).ShouldBe(plain);
                    block.Renumber(seed).Means(ReportingWeights.DefaultBudgetBytes, 1).ShouldBe(plain);
                    (Block shuffled, int[] before) = block.Shuffle(seed);
                    double[] found = shuffled.Means(ReportingWeights.DefaultBudgetBytes, 1);
                    int count = block.Basins.Count;
                    for (int step = 0; step < before.Length; step++)
                    {
                        found[(step * count)..((step + 1) * count)]
                            .ShouldBe(plain[(before[step] * count)..((before[step] + 1) * count)]);
                    }
                },
                iter: 10
            );

    [Fact]
    public void What_is_known_is_not_computed_again_within_the_budget_and_is_without_one()
    {
        Network network = Network.Of("uniform", 80, 100_000, 0, 3);
        var block = Block.Of(network, 5, 28);
        ReportingWeights roomy = ReportingWeights.Of(network.X, network.Y, block.Basins, 1);
        block.Means(roomy, 1);
        long computed = roomy.StatesComputed;
        computed.ShouldBeGreaterThan(100);
        block.Means(roomy, 2);
        roomy.StatesComputed.ShouldBe(computed);
        roomy.BytesHeld.ShouldBeGreaterThan(100 * computed);

        ReportingWeights tight = ReportingWeights.Of(network.X, network.Y, block.Basins, 1, 0);
        block.Means(tight, 1);
        tight.StatesComputed.ShouldBeGreaterThan(computed);
        tight.BytesHeld.ShouldBeLessThan(roomy.BytesHeld / 4);
    }

    /// <summary>More heirs than bits in a word: a ring of 200 sites around one, which falls silent with many of them.</summary>
    [Fact]
    public void A_gauge_may_leave_its_part_to_any_number_of_others()
    {
        Network network = Network.Of([(0, 0), .. Enumerable.Range(0, 200).Select(i => OnCircle(1e6, i / 200.0))]);
        network.Cells().Neighbours(0).Length.ShouldBe(200);
        PolygonBatch basin = Shapes.Batch([Shapes.Box(-3e5, -2e5, 4e5, 3e5)]);
        ReportingWeights weights = ReportingWeights.Of(network.X, network.Y, basin, 1);
        foreach (int kept in (int[])[1, 2, 3, 7, 100])
        {
            bool[] reports = [.. Enumerable.Range(0, network.Count).Select(site => site > 0 && site % kept == 0)];
            (int[] sites, double[] shares) = weights.Of(0, reports);
            double[] expected = DrawnAnew.Weights(network, reports, basin)[0];
            double[] found = DrawnAnew.Spread(network.Count, sites, shares);
            found.Zip(expected, (a, b) => Math.Abs(a - b)).Max().ShouldBeLessThanOrEqualTo(1e-12);
        }
    }

    /// <summary>
    /// Three gauges around a point; a triangle hangs down from a little above it. The upper gauge owns the tip between the
    /// two bisectors at 50° and the two sides at 30° from the vertical: a kite of t² / (cot 50° + cot 30°) = 0.389 t², t its
    /// height, of a triangle of h² tan 30° = 0.577 h², here 8e-16. Either half is too small to be told from rounding.
    /// </summary>
    [Fact]
    public void A_part_too_small_to_be_divided_is_left_to_somebody()
    {
        Network network = Network.Of(OnCircle(1e6, 90 / 360.0), OnCircle(1e6, 190 / 360.0), OnCircle(1e6, -10 / 360.0));
        double half = (1e6 + 0.0345) * Math.Tan(Math.PI / 6);
        PolygonBatch basin = Shapes.Batch([
            [(0, 0.0345), (-half, -1e6), (half, -1e6)],
        ]);
        ReportingWeights weights = ReportingWeights.Of(network.X, network.Y, basin, 1);
        weights.Of(0, [true, true, true]).Weights[0].ShouldBe(8e-16, 2e-16);
        (int[] sites, double[] shares) = weights.Of(0, [false, true, true]);
        sites.ShouldBe([1, 2]);
        shares.Sum().ShouldBe(1, 3e-16);
    }

    private static (double X, double Y) OnCircle(double radius, double turns) =>
        (radius * Math.Cos(2 * Math.PI * turns), radius * Math.Sin(2 * Math.PI * turns));

    [Fact]
    public void A_step_at_which_nobody_reports_is_refused()
    {
        PolygonBatch basin = Shapes.Batch([Shapes.Box(0, 0, 4, 4)]);
        ReportingWeights weights = ReportingWeights.Of([0, 4], [2, 2], basin, 1);
        Should.Throw<ArgumentException>(() => weights.Of(0, [false, false])).ParamName.ShouldBe("reports");
        var means = new double[2];
        Should
            .Throw<ArgumentException>(() =>
                weights.Means(2, new double[4], [true, true, false, false], [true, true], means, 1)
            )
            .Message.ShouldContain("step 1");
        weights.Means(2, [3, 5, 0, 0], [true, true, false, false], [true, false], means, 1);
        means.ShouldBe([4, 0]);
    }

    [Fact]
    public void Arguments_that_do_not_fit_are_refused()
    {
        PolygonBatch basin = Shapes.Batch([Shapes.Box(0, 0, 4, 4)]);
        ReportingWeights weights = ReportingWeights.Of([0, 4], [2, 2], basin, 1);
        Should.Throw<ArgumentOutOfRangeException>(() => weights.Of(1, [true, true])).ParamName.ShouldBe("polygon");
        Should.Throw<ArgumentOutOfRangeException>(() => weights.Of(-1, [true, true])).ParamName.ShouldBe("polygon");
        Should.Throw<ArgumentException>(() => weights.Of(0, [true])).ParamName.ShouldBe("reports");
        Should
            .Throw<ArgumentOutOfRangeException>(() => weights.Means(-1, [], [], [], [], 1))
            .ParamName.ShouldBe("steps");
        Should
            .Throw<ArgumentOutOfRangeException>(() => weights.Means(0, [], [], [], [], 0))
            .ParamName.ShouldBe("threads");
        Should
            .Throw<ArgumentException>(() => weights.Means(1, [1], [true, true], [true], [0], 1))
            .ParamName.ShouldBe("depths");
        Should
            .Throw<ArgumentException>(() => weights.Means(1, [1, 1], [true], [true], [0], 1))
            .ParamName.ShouldBe("reports");
        Should
            .Throw<ArgumentException>(() => weights.Means(1, [1, 1], [true, true], [], [0], 1))
            .ParamName.ShouldBe("wanted");
        Should
            .Throw<ArgumentException>(() => weights.Means(1, [1, 1], [true, true], [true], [], 1))
            .ParamName.ShouldBe("means");
        Should
            .Throw<ArgumentOutOfRangeException>(() => ReportingWeights.Of([0, 4], [2, 2], basin, 1, -1))
            .ParamName.ShouldBe("budgetBytes");
    }

    [Fact]
    public void Sites_and_polygons_are_refused_as_elsewhere()
    {
        PolygonBatch basin = Shapes.Batch([Shapes.Box(0, 0, 4, 4)]);
        Should.Throw<CoincidentSitesException>(() => ReportingWeights.Of([1, 1], [2, 2], basin, 1));
        PolygonBatch clockwise = Shapes.Batch([
            [.. Shapes.Box(0, 0, 4, 4).Reverse()],
        ]);
        Should
            .Throw<PolygonsRefusedException>(() => ReportingWeights.Of([0, 4], [2, 2], clockwise, 1))
            .Refusals.Select(refusal => refusal.Polygon)
            .ShouldBe([0]);
        ReportingWeights.Of([0, 4], [2, 2], new PolygonBatch([], [], [0], [0]), 1).StatesComputed.ShouldBe(0);
    }
}

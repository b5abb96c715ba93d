using CsCheck;
using RecipeRunner.Numerics.Gaps;
using RecipeRunner.Numerics.Tests.Support;

namespace RecipeRunner.Numerics.Tests.Gaps;

/// <summary>
/// Weights of reporting sites are those of cells drawn anew from these sites alone: the definition, computed by the plain
/// way, which OracleTests and HardBasinTests hold against clipping and outside goldens.
/// </summary>
public sealed class AgainstDrawnAnewTests
{
    [Fact]
    public void Any_basin_with_any_sites_silent_is_weighed_as_by_cells_drawn_anew() =>
        Gen.Select(Network.Any, Basin.Any, Gen.Int[0, Silence.Kinds.Length - 1], Gen.Int[0, int.MaxValue])
            .Sample(
                (network, how, kind, seed) =>
                {
                    if (Basin.For(network, how.Kind, how.Size, how.Seed) is { IsTooThin: false } basin)
                    {
                        bool[] reports = Silence.For(network, Silence.Kinds[kind], seed);
                        double rounding = 1e-16 * basin.ReachIn(network) * basin.Perimeter / basin.Area;
                        Difference(network, basin, reports)
                            .ShouldBeLessThanOrEqualTo(1e-12 + rounding, $"{basin}, {Silence.Kinds[kind]}");
                    }
                },
                iter: 2000
            );

    /// <summary>What the tolerance above leaves to basins that are thin or far away is not needed by ordinary ones.</summary>
    [Fact]
    public void Ordinary_basins_agree_to_fourteen_digits()
    {
        Network network = Network.Of("uniform", 200, 200_000, 5_000_000, 8);
        double worst = 0;
        foreach (string kind in (string[])["star", "star with a hole", "hole and island", "cell", "comb"])
        {
            foreach (string silence in Silence.Kinds)
            {
                Basin basin = Basin.For(network, kind, 0.2, 11).ShouldNotBeNull();
                worst = Math.Max(worst, Difference(network, basin, Silence.For(network, silence, 5)));
            }
        }

        TestContext.Current.TestOutputHelper?.WriteLine($"largest difference of a weight: {worst:E2}");
        worst.ShouldBeLessThanOrEqualTo(1e-14);
    }

    [Fact]
    public void Means_are_the_sums_of_weight_times_depth_where_wanted() =>
        Gen.Select(Network.Any, Gen.Int[0, int.MaxValue])
            .Sample(
                (network, seed) =>
                {
                    var block = Block.Of(network, seed, 12);
                    double[] means = block.Means(ReportingWeights.DefaultBudgetBytes, 2);
                    for (int step = 0; step < block.Steps; step++)
                    {
                        double[][] weights = DrawnAnew.Weights(network, block.ReportsAt(step), block.Basins);
                        for (int basin = 0; basin < block.Basins.Count; basin++)
                        {
                            double expected = weights[basin]
                                .Zip(block.DepthsAt(step), (w, d) => w > 0 ? w * d : 0)
                                .Sum();
                            double tolerance = Block.LargestDepth * 1e-11;
                            means[(step * block.Basins.Count) + basin]
                                .ShouldBe(block.IsWanted(step, basin) ? expected : Block.Untouched, tolerance);
                        }
                    }
                },
                iter: 30
            );

    private static double Difference(Network network, Basin basin, bool[] reports)
    {
        ReportingWeights weights = ReportingWeights.Of(network.X, network.Y, basin.Batch, 1);
        (int[] sites, double[] shares) = weights.Of(0, reports);
        sites.ShouldBe(sites.Order());
        sites.ShouldAllBe(site => reports[site]);
        shares.ShouldAllBe(share => share > 0);
        shares.Sum().ShouldBe(1, 1e-12);
        double[] found = DrawnAnew.Spread(network.Count, sites, shares);
        double[] expected = DrawnAnew.Weights(network, reports, basin.Batch)[0];
        return found.Zip(expected, (a, b) => Math.Abs(a - b)).Max();
    }
}

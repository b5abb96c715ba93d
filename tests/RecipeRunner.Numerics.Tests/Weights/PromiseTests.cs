using CsCheck;
using NetTopologySuite.Geometries;
using NetTopologySuite.Operation.OverlayNG;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;
using RecipeRunner.Testing.Oracles;

namespace RecipeRunner.Numerics.Tests.Weights;

/// <summary>What AreaWeights promises besides being right: the same bits always, pieces that tile, refusals.</summary>
public sealed class PromiseTests
{
    [Fact]
    public void The_order_of_gauges_and_the_number_of_threads_change_no_bit() =>
        Gen.Select(Network.Any, Gen.Int[0, int.MaxValue])
            .Sample(
                (network, seed) =>
                {
                    PolygonBatch batch = Many(network, seed);
                    AreaWeights plain = AreaWeights.Of(network.Cells(), batch, 1);
                    (double[] x, double[] y, int[] before) = network.Shuffled(seed);
                    var cells = ThiessenCells.Of(DelaunayTriangulation.Of(x, y));
                    ShouldBeSame(AreaWeights.Of(network.Cells(), batch, 3), plain, site => site);
                    ShouldBeSame(AreaWeights.Of(cells, batch, 2), plain, site => before[site]);
                },
                iter: 100
            );

    /// <summary>
    /// Outlines of cells weighed as basins, run along walls and through corners. Rounding there once looked like rings that
    /// cross, or that have no inside.
    /// </summary>
    [Theory]
    [InlineData("4Q1JNHhOSxU2")]
    [InlineData("70z_j1EhkHv2")]
    public void Rounding_along_walls_refuses_no_basin(string seed) =>
        Gen.Select(Network.Any, Gen.Int[0, int.MaxValue])
            .Sample(
                (network, pick) =>
                {
                    PolygonBatch basins = Many(network, pick);
                    AreaWeights.Of(network.Cells(), basins, 1).Count.ShouldBe(basins.Count);
                },
                seed: seed,
                iter: 200
            );

    [Fact]
    public void Basins_that_tile_a_region_have_pieces_that_tile_it() =>
        Gen.Select(Network.Any, Gen.Int[2, 12], Gen.Int[0, int.MaxValue])
            .Sample(
                (network, strips, seed) =>
                {
                    (double X, double Y)[] region = Shapes.Box(
                        network.X.Min() - 3,
                        network.Y.Min() - 2,
                        network.X.Max() + 3,
                        network.Y.Max() + 2
                    );
                    (double X, double Y)[][] tiles = Strips(region, strips, new Random(seed));
                    PolygonBatch batch = Shapes.Batch([
                        [region],
                        .. tiles.Select(tile => new[] { tile }),
                    ]);
                    AreaWeights weights = AreaWeights.Of(network.Cells(), batch, 1);
                    WeightsOracle.CheckSums(weights);
                    for (int row = 0; row < weights.Sites(0).Length; row++)
                    {
                        double sum = Enumerable
                            .Range(1, strips)
                            .Sum(tile => AreaOf(weights, tile, weights.Sites(0)[row]));
                        sum.ShouldBe(weights.Areas(0)[row], 1e-12 * weights.PolygonArea(0));
                    }
                },
                iter: 500
            );

    [Fact]
    public void A_cell_weighed_as_a_basin_has_its_own_gauge_alone() =>
        Gen.Select(Network.Any, Gen.Int[0, 1000])
            .Sample(
                (network, pick) =>
                {
                    int site = new Random(pick).Next(network.Count);
                    if (Basin.For(network, "cell", 1, pick) is { IsTooThin: false } basin)
                    {
                        AreaWeights weights = AreaWeights.Of(network.Cells(), basin.Batch, 1);
                        // The outline's points are rounded to doubles, which around 5,000,000 is a nanometre.
                        double rounding =
                            1e-15 * network.X.Concat(network.Y).Max(Math.Abs) * basin.Perimeter / basin.Area;
                        double own = AreaOf(weights, 0, site) / basin.Area;
                        own.ShouldBe(1, 1e-12 + rounding);
                    }
                },
                iter: 3000
            );

    /// <summary>Cells of a square grid meet exactly along basin boundaries: nothing may leak over them.</summary>
    [Theory]
    [InlineData(0)]
    [InlineData(5_000_000)]
    public void Basins_of_whole_cells_have_no_other_gauges(double offset)
    {
        Network grid = Network.Of("grid", 64, 16 * 1024, offset, 0);
        double half = 512;
        (double X, double Y)[] two = Shapes.Box(
            grid.X[9] - half,
            grid.Y[9] - half,
            grid.X[10] + half,
            grid.Y[10] + half
        );
        for (int start = 0; start < 4; start++)
        {
            (double X, double Y)[] ring = [.. two[start..], .. two[..start]];
            AreaWeights weights = AreaWeights.Of(grid.Cells(), Shapes.Batch([ring]), 1);
            weights.Sites(0).ToArray().ShouldBe([9, 10]);
            weights.Weights(0).ToArray().ShouldBe([0.5, 0.5]);
            weights.PolygonArea(0).ShouldBe(2 * 1024 * 1024);
        }
    }

    /// <summary><i>source:</i> NetTopologySuite 2.6.0, OverlayNG of the basin and each outline.</summary>
    [Fact]
    public void Weights_are_those_of_overlaying_the_outlines()
    {
        Network network = Network.Of("uniform", 300, 100_000, 5_000_000, 3);
        ThiessenCells cells = network.Cells();
        var frame = new Frame(4_000_000, 4_000_000, 6_000_000, 6_000_000);
        foreach (string kind in (string[])["star", "star with a hole", "hole and island", "cell", "comb"])
        {
            Basin basin = Basin.For(network, kind, 0.3, 5).ShouldNotBeNull();
            AreaWeights weights = AreaWeights.Of(cells, basin.Batch, 1);
            Geometry polygon = ToGeometry(basin.Rings);
            double sum = 0;
            for (int site = 0; site < network.Count; site++)
            {
                CellOutline outline = cells.Outline(site, frame);
                Geometry cell = ToGeometry([
                    [.. outline.X.Zip(outline.Y)],
                ]);
                double overlaid = OverlayNG
                    .Overlay(polygon, cell, NetTopologySuite.Operation.Overlay.SpatialFunction.Intersection)
                    .Area;
                AreaOf(weights, 0, site).ShouldBe(overlaid, 1e-11 * basin.Area);
                sum += overlaid;
            }

            sum.ShouldBe(basin.Area, 1e-9 * basin.Area);
        }
    }

    [Fact]
    public void Every_polygon_that_cannot_be_weighed_is_named()
    {
        (double, double)[] good = Shapes.Box(0, 0, 4, 4);
        (double, double)[] clockwise = [.. good.Reverse()];
        (double, double)[] flat = [(0, 0), (4, 0), (8, 0)];

        ThiessenCells cells = Shapes.Cells((0, 2), (8, 2));
        var refused = Should.Throw<PolygonsRefusedException>(() =>
            AreaWeights.Of(cells, Shapes.Batch([good], [clockwise], [flat], [good, Hole(5, 1, 7, 2)]), 2)
        );
        refused.Refusals.Select(refusal => refusal.Polygon).ShouldBe([1, 2, 3]);
        refused.Refusals[0].Reason.ShouldContain("no area");
        refused.Refusals[2].Reason.ShouldContain("cross, overlap or run the wrong way");
        refused.Message.ShouldContain("polygon 1 has no area");
    }

    [Fact]
    public void Batches_that_do_not_fit_together_are_refused()
    {
        double[] x = [0, 1, 1];
        double[] y = [0, 0, 1];
        new PolygonBatch(x, y, [0, 3], [0, 1]).Count.ShouldBe(1);
        Should.Throw<ArgumentException>(() => new PolygonBatch(x, [0, 0], [0, 3], [0, 1])).ParamName.ShouldBe("y");
        Should
            .Throw<ArgumentException>(() => new PolygonBatch(x, y, [0, 2, 3], [0, 2]))
            .ParamName.ShouldBe("ringStarts");
        Should
            .Throw<ArgumentException>(() => new PolygonBatch(x, y, [0, 3], [0, 0, 1]))
            .ParamName.ShouldBe("polygonStarts");
        Should.Throw<ArgumentException>(() => new PolygonBatch(x, y, [0, 3], [])).ParamName.ShouldBe("polygonStarts");
        Should
            .Throw<ArgumentException>(() => new PolygonBatch([0, 1, double.NaN], y, [0, 3], [0, 1]))
            .ParamName.ShouldBe("x");
        Should.Throw<ArgumentOutOfRangeException>(() =>
            AreaWeights.Of(Shapes.Cells((0, 0)), new PolygonBatch(x, y, [0, 3], [0, 1]), 0)
        );
    }

    [Fact]
    public void An_empty_batch_has_no_rows() =>
        AreaWeights.Of(Shapes.Cells((0, 0)), new PolygonBatch([], [], [0], [0]), 1).Count.ShouldBe(0);

    private static (double, double)[] Hole(double minX, double minY, double maxX, double maxY) =>
        [.. Shapes.Box(minX, minY, maxX, maxY).Reverse()];

    private static PolygonBatch Many(Network network, int seed)
    {
        IEnumerable<Basin?> basins = Enumerable
            .Range(0, 200)
            .Select(i => Basin.For(network, Basin.Kinds[i % Basin.Kinds.Length], Math.Pow(10, (i % 5) - 3), seed ^ i));
        return Shapes.Batch([
            .. basins.OfType<Basin>().Where(basin => !basin.IsTooThin).Select(basin => basin.Rings.ToArray()),
        ]);
    }

    private static void ShouldBeSame(AreaWeights found, AreaWeights expected, Func<int, int> toExpected)
    {
        found.Count.ShouldBe(expected.Count);
        for (int polygon = 0; polygon < found.Count; polygon++)
        {
            int[] sites = [.. found.Sites(polygon).ToArray().Select(toExpected)];
            double[] areas = found.Areas(polygon).ToArray();
            double[] weights = found.Weights(polygon).ToArray();
            int[] order = [.. Enumerable.Range(0, sites.Length).OrderBy(i => sites[i])];
            order.Select(i => sites[i]).ShouldBe(expected.Sites(polygon).ToArray());
            order.Select(i => areas[i]).ShouldBe(expected.Areas(polygon).ToArray());
            order.Select(i => weights[i]).ShouldBe(expected.Weights(polygon).ToArray());
            found.PolygonArea(polygon).ShouldBe(expected.PolygonArea(polygon));
        }
    }

    private static double AreaOf(AreaWeights weights, int polygon, int site)
    {
        int row = weights.Sites(polygon).IndexOf(site);
        return row < 0 ? 0 : weights.Areas(polygon)[row];
    }

    /// <summary>Cuts a box into strips by jagged lines from its lower to its upper side.</summary>
    private static (double X, double Y)[][] Strips((double X, double Y)[] box, int count, Random random)
    {
        (double left, double low) = box[0];
        (double right, double top) = box[2];
        (double X, double Y)[][] cuts =
        [
            .. Enumerable
                .Range(0, count + 1)
                .Select(cut =>
                    Enumerable
                        .Range(0, 9)
                        .Select(i =>
                        {
                            bool isEnd = cut == 0 || cut == count;
                            double share = (cut + (isEnd ? 0 : 0.4 * (random.NextDouble() - 0.5))) / count;
                            double x = cut == count ? right : left + (share * (right - left));
                            double y = i == 8 ? top : low + (i / 8.0 * (top - low));
                            return (x, y);
                        })
                        .ToArray()
                ),
        ];
        return [.. Enumerable.Range(0, count).Select(i => cuts[i + 1].Concat(cuts[i].Reverse()).ToArray())];
    }

    private static Geometry ToGeometry(IReadOnlyList<(double X, double Y)[]> rings)
    {
        var factory = new GeometryFactory();
        LinearRing[] linear =
        [
            .. rings.Select(ring =>
                factory.CreateLinearRing([.. ring.Append(ring[0]).Select(p => new Coordinate(p.X, p.Y))])
            ),
        ];
        Polygon first = factory.CreatePolygon(linear[0], [.. linear.Skip(1).Take(1)]);
        return linear.Length < 3 ? first : factory.CreateMultiPolygon([first, factory.CreatePolygon(linear[2])]);
    }
}

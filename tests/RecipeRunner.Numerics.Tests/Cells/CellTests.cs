using CsCheck;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Predicates;
using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Testing.Oracles;

namespace RecipeRunner.Numerics.Tests.Cells;

/// <summary>What must hold for the cells of every network: <i>source:</i> the definition, Thiessen 1911.</summary>
public sealed class CellTests
{
    [Fact]
    public void Outlines_of_any_network_fill_any_frame() =>
        Gen.Select(Network.Any, Gen.Double[-3, 2], Gen.Double[-0.5, 1.5], Gen.Double[-0.5, 1.5], Gen.Bool)
            .Sample(
                (network, exponent, left, low, isOnSite) =>
                {
                    double size = network.Extent * Math.Pow(10, exponent);
                    double minX = isOnSite ? network.X[0] : network.X.Min() + (left * network.Extent);
                    double minY = isOnSite ? network.Y[0] : network.Y.Min() + (low * network.Extent);
                    var frame = new Frame(minX, minY, minX + size, minY + (0.7 * size));
                    CellsOracle.Check(network.X, network.Y, network.Cells(), frame);
                },
                iter: 5000
            );

    [Fact]
    public void On_a_grid_cells_that_meet_in_a_point_are_no_neighbours()
    {
        ThiessenCells cells = Network.Of("grid", 25, 8, 0, 0).Cells();
        cells.Neighbours(12).ToArray().ShouldBe([7, 11, 13, 17], ignoreOrder: true);
        cells.Neighbours(0).ToArray().ShouldBe([1, 5], ignoreOrder: true);
    }

    [Fact]
    public void Neighbours_and_outlines_do_not_depend_on_the_order_of_sites() =>
        Network.Any.Sample(
            network =>
            {
                ThiessenCells plain = network.Cells();
                (double[] x, double[] y, int[] before) = network.Shuffled(3);
                ThiessenCells shuffled = ThiessenCells.Of(Numerics.Triangulation.DelaunayTriangulation.Of(x, y));
                var frame = new Frame(x.Min() - 1, y.Min() - 1, x.Max() + 1, y.Max() + 1);
                for (int site = 0; site < x.Length; site++)
                {
                    shuffled
                        .Neighbours(site)
                        .ToArray()
                        .Select(n => before[n])
                        .ShouldBe(plain.Neighbours(before[site]).ToArray());
                    shuffled.Outline(site, frame).X.ShouldBe(plain.Outline(before[site], frame).X);
                    shuffled.Outline(site, frame).Y.ShouldBe(plain.Outline(before[site], frame).Y);
                }
            },
            iter: 500
        );

    [Fact]
    public void A_square_of_four_gauges_has_four_square_cells()
    {
        ThiessenCells cells = Shapes.Cells((0, 0), (2, 0), (0, 2), (2, 2));
        CellOutline outline = cells.Outline(3, new Frame(-1, -1, 3, 3));
        outline.X.Zip(outline.Y).ShouldBe([(1, 1), (3, 1), (3, 3), (1, 3)], ignoreOrder: true);
        outline.Area.ShouldBe(4);
        cells.Outline(3, new Frame(-1, -1, 0.5, 0.5)).IsEmpty.ShouldBeTrue();
    }

    [Fact]
    public void One_gauge_has_the_whole_frame() =>
        Shapes.Cells((5, 7)).Outline(0, new Frame(100, 100, 103, 104)).Area.ShouldBe(12);

    [Fact]
    public void A_cell_of_ten_thousand_walls_is_drawn_and_weighed()
    {
        Network ring = Network.Of("ring and centre", 3000, 1105, 0, 5);
        var frame = new Frame(-2000, -2000, 2000, 2000);
        ThiessenCells cells = ring.Cells();
        cells.Neighbours(0).Length.ShouldBe(ring.Count - 1);
        cells.Outline(0, frame).X.Length.ShouldBe(ring.Count - 1);
        CellsOracle.Check(ring.X, ring.Y, cells, frame);
    }

    [Fact]
    public void The_nearest_is_the_first_by_x_then_y_of_the_nearest() =>
        Gen.Select(Network.Any, Gen.Double[-0.5, 1.5], Gen.Double[-0.5, 1.5], Gen.Int[0, 1000])
            .Sample(
                (network, right, up, pick) =>
                {
                    // Half the places are midway between two gauges, where both are as near.
                    (int a, int b) = (pick % network.Count, pick / 7 % network.Count);
                    bool isMidway = pick % 2 == 0;
                    double x = isMidway ? (network.X[a] + network.X[b]) / 2 : network.X[0] + (right * network.Extent);
                    double y = isMidway ? (network.Y[a] + network.Y[b]) / 2 : network.Y[0] + (up * network.Extent);
                    network.Cells().Nearest(x, y).ShouldBe(NearestByTrying(network, Lattice.Snap(x), Lattice.Snap(y)));
                },
                iter: 3000
            );

    [Fact]
    public void Frames_without_a_size_and_sites_that_are_not_there_are_refused()
    {
        Should.Throw<ArgumentException>(() => new Frame(0, 0, 0, 1));
        Should.Throw<ArgumentException>(() => new Frame(0, double.NaN, 1, 1));
        Should.Throw<ArgumentOutOfRangeException>(() => Shapes.Cells((0, 0)).Outline(1, new Frame(0, 0, 1, 1)));
        Should.Throw<ArgumentOutOfRangeException>(() => Shapes.Cells((0, 0)).Neighbours(-1).Length);
    }

    private static int NearestByTrying(Network network, double x, double y) =>
        Enumerable
            .Range(0, network.Count)
            .OrderBy(site => Square(network.X[site] - x) + Square(network.Y[site] - y))
            .ThenBy(site => network.X[site])
            .ThenBy(site => network.Y[site])
            .First();

    private static Int128 Square(double metres)
    {
        long steps = (long)(metres / Lattice.StepMetres);
        return (Int128)steps * steps;
    }
}

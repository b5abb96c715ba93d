using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Weights;
using RecipeRunner.Testing.Oracles;

namespace RecipeRunner.Numerics.Tests.Weights;

/// <summary>An oracle that cannot say no is worth nothing: each is shown something that is wrong.</summary>
public sealed class OracleTests
{
    private readonly Network right = Network.Of("uniform", 40, 1000, 0, 1);
    private readonly Network moved = Network.Of("uniform", 40, 1000, 0, 2);

    [Fact]
    public void A_triangulation_of_other_places_is_noticed() =>
        Should.Throw<OracleException>(() => TriangulationOracle.Check(moved.X, moved.Y, right.Triangulate()));

    [Fact]
    public void A_line_that_is_none_is_noticed() =>
        Should
            .Throw<OracleException>(() =>
                TriangulationOracle.Check([0, 1, 2], [0, 1, 0], Network.Of((0, 0), (1, 1), (2, 2)).Triangulate())
            )
            .Message.ShouldContain("out of line");

    [Fact]
    public void A_site_moved_into_a_circle_is_noticed()
    {
        double[] x = [0, 4, 4, 0];
        Should
            .Throw<OracleException>(() =>
                TriangulationOracle.Check(x, [0, 0, 4, 3], Network.Of((0, 0), (4, 0), (4, 4), (0, 5)).Triangulate())
            )
            .Message.ShouldContain("inside the circle");
    }

    [Fact]
    public void Cells_of_other_places_are_noticed() =>
        Should
            .Throw<OracleException>(() =>
                CellsOracle.Check(moved.X, moved.Y, right.Cells(), new Frame(0, 0, 1000, 1000))
            )
            .Message.ShouldContain("nearer to site");

    [Fact]
    public void Weights_of_other_places_are_noticed()
    {
        (double X, double Y)[] box = Shapes.Box(100, 100, 900, 900);
        AreaWeights weights = AreaWeights.Of(right.Cells(), Shapes.Batch([box]), 1);
        WeightsOracle.CheckAgainstClipping(right.X, right.Y, [box], weights, 0, 1e-12);
        Should
            .Throw<OracleException>(() =>
                WeightsOracle.CheckAgainstClipping(moved.X, moved.Y, [box], weights, 0, 1e-12)
            )
            .Message.ShouldContain("by clipping");
    }
}

using CsCheck;
using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Testing.Oracles;

namespace RecipeRunner.Numerics.Tests.Triangulation;

/// <summary>
/// What must hold for every network: <i>source:</i> B. Delaunay, "Sur la sphère vide", 1934; the count of triangles from
/// L. Euler's formula. Checked by the oracle in whole numbers, apart from the code under test.
/// </summary>
public sealed class HardNetworkTests
{
    [Fact]
    public void Any_network_is_triangulated_exactly() =>
        Network.Any.Sample(
            network => TriangulationOracle.Check(network.X, network.Y, network.Triangulate()),
            iter: 3000
        );

    [Fact]
    public void The_order_of_sites_does_not_matter() =>
        Network.Any.Sample(
            network =>
            {
                DelaunayTriangulation plain = network.Triangulate();
                (double[] x, double[] y, int[] before) = network.Shuffled(network.Count);
                var shuffled = DelaunayTriangulation.Of(x, y);
                shuffled.Corners.ToArray().Select(site => before[site]).ShouldBe(plain.Corners.ToArray());
                shuffled.Twins.ToArray().ShouldBe(plain.Twins.ToArray());
                shuffled.Hull.ToArray().Select(site => before[site]).ShouldBe(plain.Hull.ToArray());
            },
            iter: 1000
        );

    [Theory]
    [InlineData("uniform", 20_000, 1_000_000.0)]
    [InlineData("grid", 20_000, 1 << 20)]
    [InlineData("grid", 20_000, 1_000_000.0)]
    [InlineData("grid", 20_000, 50_000_000.0)]
    [InlineData("jittered grid", 20_000, 1_000_000.0)]
    [InlineData("clusters", 20_000, 1_000_000.0)]
    [InlineData("nearly a line", 5_000, 10_000_000.0)]
    [InlineData("parabola", 5_000, 10_000_000.0)]
    [InlineData("line", 5_000, 1 << 20)]
    public void Large_networks_are_triangulated_exactly(string kind, int count, double extent)
    {
        Network network = Network.Of(kind, count, extent, 5_000_000, 1);
        TriangulationOracle.Check(network.X, network.Y, network.Triangulate());
    }

    [Fact]
    public void Many_gauges_on_one_circle_have_one_triangulation()
    {
        Network network = Network.Of("circle", 3000, 1105, 5_000_000, 1);
        network.Count.ShouldBe(108);
        TriangulationOracle.Check(network.X, network.Y, network.Triangulate());
        network.Triangulate().Hull.Length.ShouldBe(108);
    }
}

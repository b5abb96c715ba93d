using NetTopologySuite.Geometries;
using NetTopologySuite.Triangulate;
using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Testing.Oracles;

namespace RecipeRunner.Numerics.Tests.Triangulation;

/// <summary>Named hard cases; all pass the oracle besides what is said here.</summary>
public sealed class DegenerateTests
{
    [Fact]
    public void One_gauge_is_a_line_of_one() => Line(1, (3, 4)).ShouldBe([0]);

    [Fact]
    public void Two_gauges_are_a_line_from_west_to_east() => Line(2, (3, 4), (1, 9)).ShouldBe([1, 0]);

    [Fact]
    public void Gauges_above_each_other_are_a_line_from_south_to_north() =>
        Line(3, (5, 9), (5, 1), (5, 4)).ShouldBe([1, 2, 0]);

    [Fact]
    public void Three_gauges_are_one_triangle_whichever_way_they_are_given()
    {
        foreach (
            (double, double)[] places in ((double, double)[][])
                [
                    [(0, 0), (4, 0), (0, 3)],
                    [(0, 0), (0, 3), (4, 0)],
                ]
        )
        {
            DelaunayTriangulation triangulation = Checked(Network.Of(places));
            triangulation.Corners.Length.ShouldBe(3);
            triangulation.Twins.ToArray().ShouldBe([-1, -1, -1]);
        }
    }

    [Fact]
    public void One_gauge_off_a_line_of_many_is_joined_to_each()
    {
        (double, double)[] line = [.. Enumerable.Range(0, 50).Select(i => ((double)i * i, 0.0))];
        DelaunayTriangulation triangulation = Checked(Network.Of([.. line, (700, 1.0 / 65536)]));
        (triangulation.Corners.Length / 3).ShouldBe(49);
        triangulation.Hull.Length.ShouldBe(51);
    }

    [Fact]
    public void A_million_gauges_are_triangulated_exactly()
    {
        Network network = Network.Of("uniform", 1_000_000, 1_000_000, 5_000_000, 7);
        Checked(network).SiteCount.ShouldBe(network.Count);
    }

    [Fact]
    public void Coincident_gauges_are_refused_all_of_them_named()
    {
        double[] x = [1, 7, 1, 0, 7, 1];
        double[] y = [2, 7, 2, 0, 7, 2];
        var refused = Should.Throw<CoincidentSitesException>(() => DelaunayTriangulation.Of(x, y));
        refused.First.ShouldBe(0);
        refused.Second.ShouldBe(2);
        refused.Groups.Count.ShouldBe(2);
        refused.Groups[0].ShouldBe([0, 2, 5]);
        refused.Groups[1].ShouldBe([1, 4]);
        refused.Message.ShouldContain("Sites 0 and 2");
    }

    [Fact]
    public void Zero_and_negative_zero_are_one_place() =>
        Should.Throw<CoincidentSitesException>(() => DelaunayTriangulation.Of([0.0, -0.0, 1], [0.0, 0.0, 1]));

    [Fact]
    public void Sites_off_the_lattice_are_refused() =>
        Should
            .Throw<ArgumentException>(() => DelaunayTriangulation.Of([0.0, 0.1], [0.0, 0.0]))
            .Message.ShouldContain("Site 1");

    [Fact]
    public void No_sites_or_half_sites_are_refused()
    {
        Should.Throw<ArgumentException>(() => DelaunayTriangulation.Of([], []));
        Should.Throw<ArgumentException>(() => DelaunayTriangulation.Of([1.0], []));
    }

    /// <summary><i>source:</i> NetTopologySuite 2.6.0, DelaunayTriangulationBuilder; no ties among random places.</summary>
    [Fact]
    public void The_triangles_are_those_of_a_general_purpose_library()
    {
        Network network = Network.Of("uniform", 3000, 100_000, 0, 11);
        DelaunayTriangulation triangulation = Checked(network);
        var index = Enumerable.Range(0, network.Count).ToDictionary(i => (network.X[i], network.Y[i]));
        var builder = new DelaunayTriangulationBuilder();
        builder.SetSites(index.Keys.Select(p => new Coordinate(p.Item1, p.Item2)).ToArray());
        IEnumerable<string> expected = builder
            .GetTriangles(new GeometryFactory())
            .Geometries.Select(triangle => Named(triangle.Coordinates.Take(3).Select(c => index[(c.X, c.Y)])));
        Named(triangulation).ShouldBe(expected.Order(StringComparer.Ordinal));
    }

    private static IEnumerable<string> Named(DelaunayTriangulation triangulation) =>
        triangulation.Corners.ToArray().Chunk(3).Select(Named).Order(StringComparer.Ordinal);

    private static string Named(IEnumerable<int> triangle) => string.Join(' ', triangle.Order());

    private static int[] Line(int count, params (double, double)[] places)
    {
        DelaunayTriangulation triangulation = Checked(Network.Of(places));
        triangulation.SiteCount.ShouldBe(count);
        triangulation.IsCollinear.ShouldBeTrue();
        return triangulation.Hull.ToArray();
    }

    private static DelaunayTriangulation Checked(Network network)
    {
        DelaunayTriangulation triangulation = network.Triangulate();
        TriangulationOracle.Check(network.X, network.Y, triangulation);
        return triangulation;
    }
}

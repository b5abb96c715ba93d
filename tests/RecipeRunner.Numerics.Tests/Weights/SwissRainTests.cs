using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;
using RecipeRunner.Testing;

namespace RecipeRunner.Numerics.Tests.Weights;

/// <summary>
/// 467 Swiss gauges and 24 boxes: <i>source:</i> sic97 of R gstat 2.1.0; weights by SciPy 1.10.1 (Qhull) with Shapely
/// 1.8.5 (GEOS 3.11.1), and again by R deldir 1.0-6 with sf; see tests/reference/README.md.
/// </summary>
public sealed class SwissRainTests
{
    private readonly List<Dictionary<string, string>> stations = ReferenceTable.Rows("sic97/stations.csv");

    private DelaunayTriangulation Triangulation =>
        DelaunayTriangulation.Of(
            [.. stations.Select(row => row.Number("x_m"))],
            [.. stations.Select(row => row.Number("y_m"))]
        );

    [Theory]
    [InlineData("sic97/thiessen_weights.csv")]
    [InlineData("sic97/thiessen_deldir.csv")]
    public void Weights_agree_with_two_independent_tessellations(string golden)
    {
        (string[] names, AreaWeights weights) = WeighZones();
        GoldenWeights.ShouldAgree(
            ReferenceTable
                .Rows(golden)
                .Select(row => (row["zone"], row["id"], row.Number("area_m2"), row.Number("weight"))),
            names,
            [.. stations.Select(row => row["id"])],
            weights,
            1e-14
        );
    }

    [Fact]
    public void Areal_means_agree()
    {
        (string[] names, AreaWeights weights) = WeighZones();
        double[] rain = [.. stations.Select(row => row.Number("rain_mm"))];
        foreach (Dictionary<string, string> row in ReferenceTable.Rows("sic97/areal_means.csv"))
        {
            int zone = Array.IndexOf(names, row["zone"]);
            double mean = 0;
            for (int i = 0; i < weights.Sites(zone).Length; i++)
            {
                mean += weights.Weights(zone)[i] * rain[weights.Sites(zone)[i]];
            }

            mean.ShouldBe(row.Number("thiessen_mean_mm"), 1e-6);
            weights.PolygonArea(zone).ShouldBe(row.Number("area_m2"), 1e-9 * row.Number("area_m2"));
        }
    }

    private (string[] Names, AreaWeights Weights) WeighZones()
    {
        List<Dictionary<string, string>> boxes = ReferenceTable.Rows("sic97/boxes.csv");
        (double X, double Y)[] hull =
        [
            .. ReferenceTable.Rows("sic97/hull.csv").Select(row => (row.Number("x_m"), row.Number("y_m"))),
        ];
        (double X, double Y)[][][] zones =
        [
            .. boxes.Select<Dictionary<string, string>, (double, double)[][]>(row =>
                [Shapes.Box(row.Number("xmin"), row.Number("ymin"), row.Number("xmax"), row.Number("ymax"))]
            ),
            [hull],
        ];
        return (
            [.. boxes.Select(row => row["box"]), "HULL"],
            AreaWeights.Of(ThiessenCells.Of(Triangulation), Shapes.Batch(zones), 2)
        );
    }

    [Fact]
    public void Triangles_and_hull_are_as_many_as_Qhull_found()
    {
        Dictionary<string, double> golden = ReferenceTable
            .Rows("sic97/delaunay.csv")
            .ToDictionary(row => row["quantity"], row => row.Number("value"), StringComparer.Ordinal);
        DelaunayTriangulation triangulation = Triangulation;
        triangulation.SiteCount.ShouldBe((int)golden["stations"]);
        (triangulation.Corners.Length / 3).ShouldBe((int)golden["delaunay_triangles"]);
        int onHull = triangulation.Twins.ToArray().Count(twin => twin < 0);
        ((triangulation.Corners.Length + onHull) / 2).ShouldBe((int)golden["delaunay_edges"]);
        onHull.ShouldBe((int)golden["hull_vertices"]);
        string[] hull = [.. triangulation.Hull.ToArray().Select(site => stations[site]["id"])];
        string[] expected = [.. ReferenceTable.Rows("sic97/hull.csv").Select(row => row["id"])];
        int turn = Array.IndexOf(expected, hull[0]);
        hull.ShouldBe([.. expected[turn..], .. expected[..turn]]);
    }
}

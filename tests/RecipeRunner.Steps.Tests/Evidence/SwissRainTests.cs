using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Series;
using RecipeRunner.Steps.Tests.Support;
using RecipeRunner.Steps.Weighting;
using RecipeRunner.Testing;

namespace RecipeRunner.Steps.Tests.Evidence;

/// <summary>
/// The 467 Swiss gauges of 8 May 1986 (Dubois 1998). source: tests/reference/sic97, weights by Qhull 7.3.2 with GEOS 3.11.1
/// and by R deldir 1.0-6; counts by exact arithmetic.
/// </summary>
public sealed class SwissRainTests : IDisposable
{
    private readonly Bench bench = new();
    private readonly List<Dictionary<string, string>> stations = ReferenceTable.Rows("sic97/stations.csv");

    public void Dispose() => bench.Dispose();

    [Fact]
    public void Weights_and_means_of_boxes_and_hull_agree_with_two_packages()
    {
        var gauges = Gauges();
        var boxes = ReferenceTable
            .Rows("sic97/boxes.csv")
            .Select(box =>
                (box["box"], Bench.Box(box.Number("xmin"), box.Number("ymin"), box.Number("xmax"), box.Number("ymax")))
            );
        var hull = Region.OfShell(
            ReferenceTable
                .Rows("sic97/hull.csv")
                .Select(corner => new Location(corner.Number("x_m"), corner.Number("y_m")))
        );
        var basins = bench.Basins([.. boxes, ("HULL", hull)]);
        var weights = basins.WeighBy(gauges.ThiessenCells());
        var ours = weights.Weights.ToDictionary(w => (basins.Basins[w.Basin].Id, gauges.Gauges[w.Gauge].Id), w => w);

        foreach (var table in (string[])["thiessen_weights", "thiessen_deldir"])
        {
            var golden = ReferenceTable.Rows($"sic97/{table}.csv");
            golden.Count.ShouldBe(1160);
            ours.Keys.ShouldBe(golden.Select(row => (row["zone"], row["id"])), ignoreOrder: true);
            golden
                .Max(row => Math.Abs(row.Number("weight") - ours[(row["zone"], row["id"])].Share))
                .ShouldBeLessThan(1e-9);
            golden
                .Max(row => Math.Abs((row.Number("area_m2") / ours[(row["zone"], row["id"])].AreaSquareMetres) - 1))
                .ShouldBeLessThan(1e-9);
        }

        var areal = weights.MeanRain(Rain(), GapPolicy.Withhold);
        foreach (var mean in ReferenceTable.Rows("sic97/areal_means.csv"))
        {
            var basin = basins.Basins.Select((b, i) => (b.Id, i)).Single(pair => pair.Id == mean["zone"]).i;
            areal.At(0, basin).DepthMillimetres!.Value.ShouldBe(mean.Number("thiessen_mean_mm"), 1e-6);
        }
    }

    [Fact]
    public void The_triangulation_has_the_counted_triangles()
    {
        var expected = ReferenceTable
            .Rows("sic97/delaunay.csv")
            .ToDictionary(row => row["quantity"], row => row.Number("value"));

        Gauges().Triangulate().Triangles.Length.ShouldBe((int)expected["delaunay_triangles"]);
    }

    private GaugeNetwork Gauges() =>
        bench.Network([.. stations.Select(row => (row["id"], row.Number("x_m"), row.Number("y_m")))]);

    private RainRecords Rain()
    {
        bench.Write(
            "rain.csv",
            "gauge,date,tenths\n"
                + string.Concat(stations.Select(row => $"{row["id"]},1986-05-08,{row["rain_tenth_mm"]}\n"))
        );
        return bench.Verbs.ReadRecords("rain.csv", RainUnit.TenthsOfMillimetre, TimeStep.Days("24:00"));
    }
}

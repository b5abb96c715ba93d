using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Steps.Series;
using RecipeRunner.Steps.Tests.Support;
using RecipeRunner.Steps.Weighting;
using RecipeRunner.Testing;

namespace RecipeRunner.Steps.Tests.Evidence;

/// <summary>
/// The whole way from files to areal means on real data: North Carolina's counties on NAD27 and 461 gauges of April 1948.
/// source: tests/reference/nc1948, computed with Qhull 7.3.2 and GEOS 3.11.1 from vertices projected by PROJ 9.1.1; the
/// variant in which NAD27 positions are taken as if on NAD83.
/// </summary>
public sealed class NorthCarolinaTests : IDisposable
{
    private readonly Bench bench = new();

    public NorthCarolinaTests()
    {
        bench.CopyShapefile("nc1948/nc", "nc");
        File.Copy(ReferenceFolder.PathOf("nc1948/gauges.csv"), Path.Combine(bench.Folder, "gauges.csv"));
        var records = ReferenceTable
            .Rows("nc1948/gauges.csv")
            .Select(row => $"{row["gauge"]},1948-04,{row["precip_mm"]}\n");
        bench.Write("april.csv", "gauge,month,mm\n" + string.Concat(records));
    }

    public void Dispose() => bench.Dispose();

    [Theory]
    [InlineData("32119")]
    [InlineData("5070")]
    public void Weights_and_means_follow_from_the_files(string code)
    {
        var grid = bench.Verbs.Crs("EPSG:" + code);
        var basins = bench.Verbs.ReadBasins("nc.shp", id: "FIPS", name: "NAME").To(grid, datum: DatumChoice.TakeAsIs);
        var gauges = bench
            .Verbs.ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", crs: bench.Verbs.Crs("EPSG:4269"))
            .To(grid);
        var rain = bench.Verbs.ReadRecords("april.csv", RainUnit.Millimetres, TimeStep.Months);
        var weights = basins.WeighBy(gauges.ThiessenCells());
        var areal = weights.MeanRain(rain, GapPolicy.Redraw);

        var golden = Golden("thiessen_weights", code)
            .ToDictionary(row => (row["fips"], row["gauge"]), row => row.Number("weight"));
        var ours = weights.Weights.ToDictionary(
            w => (basins.Basins[w.Basin].Id, gauges.Gauges[w.Gauge].Id),
            w => w.Share
        );
        ours.Where(pair => pair.Value > 1e-9).Select(pair => pair.Key).ShouldBe(golden.Keys, ignoreOrder: true);
        golden.Max(pair => Math.Abs(pair.Value - ours[pair.Key])).ShouldBeLessThan(1e-7);

        var means = Golden("areal_means", code).ToDictionary(row => row["fips"], row => row);
        means.Count.ShouldBe(100);
        for (var b = 0; b < basins.Basins.Length; b++)
        {
            var mean = means[basins.Basins[b].Id];
            areal.At(0, b).DepthMillimetres!.Value.ShouldBe(mean.Number("thiessen_mean_mm"), 1e-5);
            basins.Basins[b].Shape.Area.ShouldBe(mean.Number("area_m2"), 1e-7 * mean.Number("area_m2"));
        }
    }

    private static IEnumerable<Dictionary<string, string>> Golden(string table, string code) =>
        ReferenceTable
            .Rows($"nc1948/{table}.csv")
            .Where(row => row["crs"] == code && row["datum_variant"] == "noshift");
}

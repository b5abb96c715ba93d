using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Tests.Support;
using RecipeRunner.Testing;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>
/// Bytes changed at random in good files: each is read, or refused with a finding that names a file; nothing else comes
/// out, and never a coordinate or depth that is no number.
/// </summary>
public sealed class MutationTests : IDisposable
{
    private const int Rounds = 400;
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Theory]
    [InlineData("shp")]
    [InlineData("shx")]
    [InlineData("dbf")]
    public void Shapefiles(string part)
    {
        bench.CopyShapefile("nc1948/nc", "nc");
        bench.Write("nc.cpg", "1252");

        Mutate(
            "nc." + part,
            () =>
            {
                foreach (
                    var vertex in bench
                        .Verbs.ReadBasins("nc.shp", id: "FIPS")
                        .Basins.SelectMany(basin => basin.Shape.Rings)
                        .SelectMany(ring => ring.Vertices)
                )
                {
                    double.IsFinite(vertex.X + vertex.Y).ShouldBeTrue();
                }
            }
        );
    }

    [Fact]
    public void Reference_systems()
    {
        bench.CopyShapefile("nc1948/nc", "nc");

        Mutate("nc.prj", () => bench.Verbs.ReadBasins("nc.shp", id: "FIPS"));
    }

    [Fact]
    public void GeoJson()
    {
        const string Square =
            "{\"type\":\"FeatureCollection\",\"features\":[{\"type\":\"Feature\",\"properties\":{\"id\":\"A\",\"n\":1.5},\"geometry\":{\"type\":\"Polygon\",\"coordinates\":[[[13,50],[14,50],[14,51],[13,51],[13,50]]]}}]}";
        bench.Write("basins.geojson", Square);

        Mutate("basins.geojson", () => bench.Verbs.ReadBasins("basins.geojson", id: "id").Basins.Length.ShouldBe(1));
    }

    [Fact]
    public void Gauges()
    {
        File.Copy(ReferenceFolder.PathOf("nc1948/gauges.csv"), Path.Combine(bench.Folder, "gauges.csv"));

        Mutate(
            "gauges.csv",
            () =>
                bench.Verbs.ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", crs: bench.Verbs.Crs("EPSG:4269"))
        );
    }

    [Fact]
    public void Records()
    {
        var rows = Enumerable.Range(1, 28).Select(day => FormattableString.Invariant($"2024-02-{day:00},{day}.5,,0\n"));
        bench.Write("rain.csv", "date,A,B,C\n" + string.Concat(rows));

        Mutate(
            "rain.csv",
            () =>
            {
                var records = bench.Verbs.ReadRecords("rain.csv", RainUnit.Millimetres, TimeStep.Days("09:00"));
                records.DepthsAt(0).ToArray().ShouldAllBe(depth => double.IsFinite(depth) && depth >= 0);
            }
        );
    }

    private void Mutate(string name, Action read)
    {
        var random = new Random(20240109);
        var path = Path.Combine(bench.Folder, name);
        var good = File.ReadAllBytes(path);
        var refused = 0;
        for (var round = 0; round < Rounds; round++)
        {
            var bytes = good.ToArray();
            for (var changes = random.Next(1, 4); changes > 0; changes--)
            {
                bytes[random.Next(Math.Min(bytes.Length, 4096))] = (byte)random.Next(256);
            }

            File.WriteAllBytes(path, bytes);
            try
            {
                read();
            }
            catch (RefusedException refusal)
            {
                refused++;
                refusal.Problems.ShouldAllBe(problem => problem.Where.File.Length > 0 && problem.What.Length > 0);
            }
        }

        refused.ShouldBeGreaterThan(Rounds / 20);
    }
}

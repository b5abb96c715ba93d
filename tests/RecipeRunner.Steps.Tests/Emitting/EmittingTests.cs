using System.Text;
using System.Text.Json;
using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Emitting;

public sealed class EmittingTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void A_shapefile_is_read_back_alike_in_a_grid_of_feet()
    {
        // NAD83 / North Carolina (ftUS): 1 US survey foot = 1200/3937 m exactly (US National Bureau of Standards, 1959).
        var feet = ReferenceSystems.Find("EPSG:2264");
        var gauges = bench.Study.Take(
            new GaugeNetwork(
                [
                    new Gauge("A", new Location(600_000.5, 200_000.25), 12.5),
                    new Gauge("Ü", new Location(610_000, 190_000)),
                ],
                feet,
                "test"
            )
        );
        bench
            .Verbs.EmitLayer(gauges, "gauges")
            .Paths.ShouldBe([
                "layers/gauges.shp",
                "layers/gauges.shx",
                "layers/gauges.dbf",
                "layers/gauges.prj",
                "layers/gauges.cpg",
            ]);
        WriteOut();

        var again = bench.Verbs.ReadGauges("gauges.shp", id: "gauge", elevation: "elev_m");

        again.ReferenceSystem.Code.ShouldBe("EPSG:2264");
        again.Gauges.Select(gauge => (gauge.Id, gauge.ElevationMetres)).ShouldBe([("A", 12.5), ("Ü", null)]);
        again.Gauges[0].Place.DistanceTo(gauges.Gauges[0].Place).ShouldBeLessThanOrEqualTo(2.0 / 65536);
        BitConverter
            .ToDouble(bench.Study.Outputs["layers/gauges.shp"].ToArray(), 112)
            .ShouldBe(600_000.5 * 3937 / 1200, 1e-6);
    }

    [Fact]
    public void Parts_and_holes_survive_a_shapefile()
    {
        var shape = new Region([
            new RegionPart(
                Ring((0, 0), (100, 0), (100, 100), (0, 100)),
                [Ring((20, 20), (20, 40), (40, 40), (40, 20))]
            ),
            new RegionPart(Ring((200, 0), (300, 0), (300, 100)), []),
        ]);
        bench.Verbs.EmitLayer(bench.Basins(("A", shape)), "basins");
        WriteOut();

        var again = bench.Verbs.ReadBasins("basins.shp", id: "basin").Basins[0].Shape;

        again.Parts.Length.ShouldBe(2);
        again.Parts[0].Holes.Length.ShouldBe(1);
        again.Area.ShouldBe(shape.Area);
    }

    [Fact]
    public void Attribute_names_are_shortened_by_rule_with_a_finding()
    {
        var basins = bench.Study.Take(
            bench
                .Basins(("A", Bench.Box(0, 0, 1, 1)))
                .WithColumns([
                    Column.OfNumbers("rain_mm_january", "mm", 3, "", [1.5]),
                    Column.OfNumbers("rain_mm_january_max", "mm", 3, "", [null]),
                    Column.OfText("größe", "", ["x"]),
                ])
        );
        bench.Verbs.EmitLayer(basins, "basins");

        bench
            .Study.Findings.Single()
            .What.ShouldContain("rain_mm_january as rain_mm_ja, rain_mm_january_max as rain_mm__2, größe as gr__e");
    }

    [Fact]
    public void Text_that_a_shapefile_would_cut_is_refused_and_known_endings_are_not_doubled()
    {
        var basins = bench.Basins((new string('ä', 200), Bench.Box(0, 0, 1, 1)));

        Bench.Refused(() => bench.Verbs.EmitLayer(basins, "basins"))[0].Code.ShouldBe("RR0604");
        bench.Verbs.EmitLayer(basins, "basins.GeoJSON").Paths.ShouldBe(["layers/basins.geojson"]);
        bench.Verbs.EmitLayer(bench.Network(("A", 0, 0)), "gauges.shp").Paths[0].ShouldBe("layers/gauges.shp");
    }

    [Fact]
    public void Bytes_do_not_depend_on_the_clock()
    {
        bench.Verbs.EmitLayer(bench.Basins(("A", Bench.Box(0, 0, 1, 1))), "basins");

        bench.Study.Outputs["layers/basins.dbf"].ToArray()[1..4].ShouldBe([80, 1, 1]);
    }

    [Fact]
    public void GeoJson_follows_the_right_hand_rule_on_wgs84()
    {
        // source: RFC 7946, section 3.1.6: exterior rings are counter-clockwise, the first and last positions are equal.
        var shape = new Region([
            new RegionPart(
                Ring((400_000, 5_600_000), (401_000, 5_600_000), (401_000, 5_601_000), (400_000, 5_601_000)),
                [Ring((400_200, 5_600_200), (400_200, 5_600_400), (400_400, 5_600_400))]
            ),
        ]);
        bench.Verbs.EmitLayer(bench.Basins(("A \"quoted\"", shape)), "basins.geojson");
        using var document = JsonDocument.Parse(bench.Study.Outputs["layers/basins.geojson"].ToArray());

        var feature = document.RootElement.GetProperty("features")[0];
        feature.GetProperty("properties").GetProperty("basin").GetString().ShouldBe("A \"quoted\"");
        var rings = feature.GetProperty("geometry").GetProperty("coordinates");
        Turn(rings[0]).ShouldBePositive();
        Turn(rings[1]).ShouldBeNegative();
        rings[0][0].GetRawText().ShouldBe(rings[0][4].GetRawText());
        rings[0][0][0].GetDouble().ShouldBe(7.5878, 1e-3);
    }

    [Fact]
    public void Tables_quote_what_needs_it_and_say_their_units()
    {
        var basins = bench.Basins(("A,1", Bench.Box(0, 0, 2000, 1000)), ("B\"2\"", Bench.Box(0, 0, 1000, 1000)));
        var table = new Plain(
            new Table([
                Column.OfText("basin", "Basin id", basins.Basins.Select(b => b.Id)),
                Column.OfNumbers("area", "m²", 2, "Area, roughly", [2e6 + 0.126, null]),
            ])
        );
        bench.Verbs.EmitTable(table, "areas");

        Text("tables/areas.csv").ShouldBe("basin,area\n\"A,1\",2000000.13\n\"B\"\"2\"\"\",\n");
        Text("tables/areas.columns.csv").ShouldBe("column,unit,meaning\nbasin,,Basin id\narea,m²,\"Area, roughly\"\n");
    }

    private static double Turn(JsonElement ring)
    {
        var points = ring.EnumerateArray().Select(p => new Location(p[0].GetDouble(), p[1].GetDouble())).ToArray();
        return new Ring([.. points[..^1]]).SignedArea;
    }

    private static Ring Ring(params (double X, double Y)[] vertices) =>
        new([.. vertices.Select(vertex => new Location(vertex.X, vertex.Y))]);

    private string Text(string path) => Encoding.UTF8.GetString(bench.Study.Outputs[path].ToArray());

    private void WriteOut()
    {
        foreach (var (path, content) in bench.Study.Outputs)
        {
            bench.Write(Path.GetFileName(path), content.ToArray());
        }
    }

    private sealed class Plain(Table table) : ITabular
    {
        public Table ToTable() => table;
    }
}

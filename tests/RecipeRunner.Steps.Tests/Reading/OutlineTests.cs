using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>
/// Outlines that are not valid by OGC Simple Features (06-103r4, section 6.1.11) are repaired by rule with both areas, or
/// refused; never used as they are. Coordinates are metres in EPSG:32633, given through the older crs member.
/// </summary>
public sealed class OutlineTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void A_valid_outline_keeps_its_area_whichever_way_it_runs()
    {
        Area("[[[0,0],[0,1000],[1000,1000],[1000,0],[0,0]],[[100,100],[200,100],[200,200],[100,200],[100,100]]]")
            .ShouldBe(990_000);
        Area("[[[0,0],[1000,0],[1000,1000],[0,1000],[0,0]],[[100,100],[100,200],[200,200],[200,100],[100,100]]]")
            .ShouldBe(990_000);
        bench.Study.Findings.ShouldBeEmpty();
    }

    [Fact]
    public void Repeated_vertices_are_no_fault() =>
        Area("[[[0,0],[1000,0],[1000,0],[1000,1000],[0,1000],[0,1000],[0,0]]]").ShouldBe(1_000_000);

    [Fact]
    public void A_small_loop_is_repaired_and_both_areas_are_told()
    {
        // The boundary crosses itself near (1000, 500) and runs round a loop of 5 m by 5 m the wrong way.
        var area = Area("[[[0,0],[1000,0],[1000,500],[1005,500],[1005,495],[995,495],[995,1000],[0,1000],[0,0]]]");

        area.ShouldBe(1_000_000, 10_000);
        var finding = bench.Study.Findings.Single();
        finding.Code.ShouldBe("RR0232");
        finding.Where.Item.ShouldBe("basin A");
        finding.What.ShouldContain("km²");
        finding.What.ShouldContain("->");
    }

    [Theory]
    [InlineData("[[[0,0],[1000,1000],[1000,0],[0,1000],[0,0]]]")]
    [InlineData("[[[0,0],[1000,0],[1000,1000],[0,1000],[0,0]],[[900,100],[1900,100],[1900,900],[900,900],[900,100]]]")]
    [InlineData("[[[0,0],[1000,0],[2000,0],[0,0]]]")]
    public void A_fault_that_changes_the_area_is_refused(string rings)
    {
        var problem = Bench.Refused(() => Area(rings))[0];

        problem.Code.ShouldBe("RR0231");
        problem.Where.ToString().ShouldBe("basins.geojson, basin A");
        problem.Mend.ShouldContain("outline");
    }

    [Theory]
    [InlineData("[[[0,0],[1000,0],[0,0]]]", "RR0231")]
    [InlineData("[[[0,0],[1000,0],[1000,1000],[0,1000]]]", "RR0223")]
    [InlineData("[]", "RR0238")]
    public void Rings_that_are_no_rings_are_refused(string rings, string code) =>
        Bench.Refused(() => Area(rings))[0].Code.ShouldBe(code);

    [Fact]
    public void Lines_and_points_are_no_basins()
    {
        bench.Write("basins.geojson", Collection("{\"type\":\"LineString\",\"coordinates\":[[0,0],[1,1]]}"));

        Bench.Refused(() => bench.Verbs.ReadBasins("basins.geojson", id: "id"))[0].Code.ShouldBe("RR0230");
    }

    [Theory]
    [InlineData("", "RR0220")]
    [InlineData("{\"type\":\"FeatureCollection\",\"features\":[", "RR0220")]
    [InlineData("{\"type\":\"Topology\"}", "RR0221")]
    [InlineData("{\"type\":\"FeatureCollection\",\"features\":[{\"type\":\"Thing\"}]}", "RR0222")]
    [InlineData("{\"type\":\"FeatureCollection\",\"features\":[]}", "RR0206")]
    [InlineData("[1,2]", "RR0221")]
    public void What_is_no_collection_of_features_is_refused(string text, string code)
    {
        bench.Write("basins.geojson", text);

        Bench.Refused(() => bench.Verbs.ReadBasins("basins.geojson", id: "id"))[0].Code.ShouldBe(code);
    }

    [Fact]
    public void GeoJson_is_longitude_and_latitude_unless_it_says_otherwise()
    {
        bench.Write(
            "basins.geojson",
            Collection("{\"type\":\"Polygon\",\"coordinates\":[[[13,50],[14,50],[14,51],[13,51],[13,50]]]}", crs: "")
        );

        bench.Verbs.ReadBasins("basins.geojson", id: "id").ReferenceSystem.Code.ShouldBe("EPSG:4326");
    }

    [Fact]
    public void A_features_own_identifier_serves_where_its_properties_have_none()
    {
        const string Square = "{\"type\":\"Polygon\",\"coordinates\":[[[13,50],[14,50],[14,51],[13,51],[13,50]]]}";
        bench.Write(
            "basins.geojson",
            $"{{\"type\":\"FeatureCollection\",\"features\":[{{\"type\":\"Feature\",\"id\":42,\"properties\":null,\"geometry\":{Square}}}]}}"
        );

        bench.Verbs.ReadBasins("basins.geojson", id: "id").Basins[0].Id.ShouldBe("42");
    }

    [Fact]
    public void Metres_under_a_name_of_degrees_are_refused()
    {
        bench.Write(
            "basins.geojson",
            Collection(
                "{\"type\":\"Polygon\",\"coordinates\":[[[400000,5600000],[401000,5600000],[401000,5601000],[400000,5600000]]]}",
                crs: ""
            )
        );

        Bench.Refused(() => bench.Verbs.ReadBasins("basins.geojson", id: "id"))[0].Code.ShouldBe("RR0233");
    }

    private double Area(string rings)
    {
        bench.Write("basins.geojson", Collection($"{{\"type\":\"Polygon\",\"coordinates\":{rings}}}"));
        return bench.Verbs.ReadBasins("basins.geojson", id: "id").Basins[0].Shape.Area;
    }

    private static string Collection(
        string geometry,
        string crs = "\"crs\":{\"type\":\"name\",\"properties\":{\"name\":\"urn:ogc:def:crs:EPSG::32633\"}},"
    ) =>
        $"{{\"type\":\"FeatureCollection\",{crs}\"features\":[{{\"type\":\"Feature\",\"properties\":{{\"id\":\"A\"}},\"geometry\":{geometry}}}]}}";
}

using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

public sealed class GaugeTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Theory]
    [InlineData("gauge,lon,lat,h\nQ-2,13.5,50.9,410\nQ-1,13.25,50.5,\n")]
    [InlineData("gauge;lon;lat;h\r\nQ-2;13.5;50.9;410\r\nQ-1;13.25;50.5;\r\n")]
    [InlineData("\uFEFFgauge\tlon\tlat\th\n\"Q-2\"\t13.5\t50.9\t410\nQ-1\t13.25\t50.5\t\n")]
    public void Tables_are_read_whatever_their_separator_and_held_in_the_order_of_ids(string text)
    {
        bench.Write("gauges.csv", text);
        var network = Read(elevation: "h");

        network.Gauges.ShouldBe([
            new Gauge("Q-1", new Location(13.25, 50.5)),
            new Gauge("Q-2", new Location(13.5, 50.9), 410),
        ]);
    }

    [Fact]
    public void Every_problem_is_told_at_once_with_line_and_column()
    {
        bench.Write(
            "gauges.csv",
            "gauge,lon,lat\nQ-1,13.5,50.9\nQ-2,\"13,5\",50.9\nQ-3,,x\nQ-1,13.6,50.8\n,13.7,50.7\n"
        );
        var problems = Bench.Refused(() => Read());

        problems
            .Select(problem => (problem.Code, problem.Where.Line, problem.Where.Column))
            .ShouldBe([("RR0244", 6, 0), ("RR0245", 5, 0), ("RR0246", 3, 2), ("RR0246", 4, 2), ("RR0246", 4, 3)]);
        problems[2].Mend.ShouldContain("decimal comma");
    }

    [Theory]
    [InlineData("", "RR0201")]
    [InlineData("gauge,lon,lat\n", "RR0243")]
    [InlineData("gauge,lon,lon\nA,1,2\n", "RR0202")]
    [InlineData("gauge,x,y\nA,1,2\n", "RR0206")]
    [InlineData("gauge,lon,lat\nA,1\n", "RR0241")]
    [InlineData("gauge,lon,lat\nA,1,95\n", "RR0233")]
    [InlineData("gauge,lon,lat\nA,NaN,5\n", "RR0246")]
    public void What_cannot_be_used_is_refused(string text, string code)
    {
        bench.Write("gauges.csv", text);

        Bench.Refused(() => Read())[0].Code.ShouldBe(code);
    }

    [Fact]
    public void Lengths_beyond_any_grid_are_refused()
    {
        bench.Write("gauges.csv", "gauge,x,y\nA,400000,5e12\n");

        Bench
            .Refused(() =>
                bench.Verbs.ReadGauges("gauges.csv", id: "gauge", x: "x", y: "y", crs: bench.Verbs.Crs("EPSG:32633"))
            )[0]
            .Code.ShouldBe("RR0233");
    }

    [Fact]
    public void Text_that_is_not_utf8_is_refused_with_its_line()
    {
        bench.Write("gauges.csv", System.Text.Encoding.Latin1.GetBytes("gauge,lon,lat\nA,1,2\nMärz,1,2\n"));
        var problem = Bench.Refused(() => Read())[0];

        (problem.Code, problem.Where.Line).ShouldBe(("RR0204", 3));
    }

    [Fact]
    public void A_table_does_not_say_its_system()
    {
        bench.Write("gauges.csv", "gauge,lon,lat\nA,9.1,50.1\nB,14.9,51.8\n");
        var problem = Bench.Refused(() => bench.Verbs.ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat"))[0];

        problem.Code.ShouldBe("RR0203");
        problem.Mend.ShouldContain("(x 9.1 to 14.9, y 50.1 to 51.8)");
    }

    [Fact]
    public void Points_of_geojson_are_gauges_and_polygons_are_not()
    {
        const string Start =
            "{\"type\":\"FeatureCollection\",\"features\":[{\"type\":\"Feature\",\"properties\":{\"id\":7,\"h\":12.5},\"geometry\":";
        bench.Write("points.geojson", Start + "{\"type\":\"Point\",\"coordinates\":[13.5,50.9]}}]}");
        bench.Write("areas.geojson", Start + "{\"type\":\"Polygon\",\"coordinates\":[[[0,0],[1,0],[1,1],[0,0]]]}}]}");

        bench
            .Verbs.ReadGauges("points.geojson", id: "id", elevation: "h")
            .Gauges.ShouldBe([new Gauge("7", new Location(13.5, 50.9), 12.5)]);
        Bench.Refused(() => bench.Verbs.ReadGauges("areas.geojson", id: "id"))[0].Code.ShouldBe("RR0242");
    }

    private GaugeNetwork Read(string? elevation = null) =>
        bench.Verbs.ReadGauges(
            "gauges.csv",
            id: "gauge",
            x: "lon",
            y: "lat",
            elevation: elevation,
            crs: bench.Verbs.Crs("EPSG:4326")
        );
}

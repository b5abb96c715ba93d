using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Referencing;
using RecipeRunner.Testing;

namespace RecipeRunner.Steps.Tests.Referencing;

/// <summary>
/// Counties on NAD27 and gauges on NAD83 brought to two working grids. Source: tests/reference/nc1948, variant noshift (PROJ
/// 9.1.1 through pyproj 3.4.1).
/// </summary>
public sealed class NorthCarolinaTests
{
    private readonly TrialStudy study = new("none");

    [Theory]
    [InlineData("32119")]
    [InlineData("5070")]
    public void Counties_taken_as_they_are_land_where_the_reference_has_them(string code)
    {
        var rows = ReferenceTable.Rows("nc1948/counties_vertices.csv").ToArray();
        var layer = study.Take(Counties(rows)).To(ReferenceSystems.Find("EPSG:" + code), datum: DatumChoice.TakeAsIs);
        var expected = Counties(rows, $"x_{code}_noshift", $"y_{code}_noshift");

        layer.Basins.Length.ShouldBe(100);
        foreach (var (got, wanted) in layer.Basins.Zip(expected.Basins))
        {
            got.Id.ShouldBe(wanted.Id);
            var (places, reference) = (Places(got), Places(wanted));
            places.Length.ShouldBe(reference.Length);
            places.Zip(reference).Max(pair => pair.First.DistanceTo(pair.Second)).ShouldBeLessThan(0.001);
        }

        var caution = study.Findings.Single(finding => finding.Code == "RR0321");
        caution.Severity.ShouldBe(Severity.Caution);
        caution.What.ShouldContain("taken as if on North American Datum 1983; they may be off by up to about");
    }

    [Fact]
    public void Counties_are_refused_where_the_recipe_accepts_nothing() =>
        Refusals
            .Of(() =>
                study
                    .Take(Counties(ReferenceTable.Rows("nc1948/counties_vertices.csv")))
                    .To(ReferenceSystems.Find("EPSG:32119"))
            )
            .Code.ShouldBe("RR0320");

    [Theory]
    [InlineData("32119")]
    [InlineData("5070")]
    public void Gauges_land_where_the_reference_has_them(string code)
    {
        var gauges = ReferenceTable
            .Rows("nc1948/gauges.csv")
            .Select(row => new Gauge(row["gauge"], new Location(row.Number("lon"), row.Number("lat"))));
        var network = study
            .Take(new GaugeNetwork(gauges, ReferenceSystems.Find("EPSG:4269"), "gauges.csv"))
            .To(ReferenceSystems.Find("EPSG:" + code));
        var expected = ReferenceTable
            .Rows("nc1948/gauges_projected.csv")
            .ToDictionary(
                row => row["gauge"],
                row => new Location(row.Number("x_" + code), row.Number("y_" + code)),
                StringComparer.Ordinal
            );

        network.Gauges.Length.ShouldBe(461);
        network.Gauges.Max(gauge => gauge.Place.DistanceTo(expected[gauge.Id])).ShouldBeLessThan(0.001);
    }

    private static BasinLayer Counties(
        IEnumerable<Dictionary<string, string>> rows,
        string x = "lon",
        string y = "lat"
    ) =>
        new(
            [
                .. rows.GroupBy(row => row["fips"], StringComparer.Ordinal)
                    .Select(county => new Basin(county.Key, county.First()["county"], Shape(county, x, y))),
            ],
            ReferenceSystems.Find("EPSG:4267"),
            "nc.shp"
        );

    private static Region Shape(IEnumerable<Dictionary<string, string>> rows, string x, string y) =>
        new([
            .. rows.GroupBy(row => row["part"], StringComparer.Ordinal)
                .Select(part =>
                    part.GroupBy(row => row["ring"], StringComparer.Ordinal)
                        .Select(
                            (ring, i) =>
                                Ring([.. ring.Select(row => new Location(row.Number(x), row.Number(y)))], i > 0)
                        )
                        .ToArray()
                )
                .Select(rings => new RegionPart(rings[0], [.. rings.Skip(1)])),
        ]);

    /// <summary>The ring without its repeated last vertex, shells counter-clockwise.</summary>
    private static Ring Ring(ImmutableArray<Location> vertices, bool isHole)
    {
        var ring = new Ring(vertices[0] == vertices[^1] ? vertices[..^1] : vertices);
        return ring.SignedArea < 0 == isHole ? ring : new Ring([.. ring.Vertices.Reverse()]);
    }

    private static Location[] Places(Basin basin) => [.. basin.Shape.Rings.SelectMany(ring => ring.Vertices)];
}

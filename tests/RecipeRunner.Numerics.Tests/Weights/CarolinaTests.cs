using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Weights;
using RecipeRunner.Testing;

namespace RecipeRunner.Numerics.Tests.Weights;

/// <summary>
/// 100 counties of North Carolina over 461 gauges in two projections and two datum variants: <i>source:</i> nc.shp of R sf
/// 1.0-9 and USprecip of R spam 2.9-1; weights by SciPy 1.10.1 (Qhull) with Shapely 1.8.5 (GEOS 3.11.1), checked there by
/// half-plane clipping; see tests/reference/README.md.
/// </summary>
public sealed class CarolinaTests
{
    /// <summary>
    /// Most of the difference is the lattice: 32 times larger, where it is 32 times finer against the map, the weights agree
    /// to the digits that the goldens' coordinates are printed with, 3e-11.
    /// </summary>
    [Theory]
    [InlineData("32119", "noshift", 1, 1e-9)]
    [InlineData("32119", "proj_default", 1, 1e-9)]
    [InlineData("5070", "noshift", 1, 1e-9)]
    [InlineData("5070", "proj_default", 1, 1e-9)]
    [InlineData("32119", "noshift", 32, 1e-10)]
    [InlineData("5070", "noshift", 32, 1e-10)]
    public void County_weights_agree(string crs, string datum, double scale, double tolerance)
    {
        List<Dictionary<string, string>> gauges = ReferenceTable.Rows("nc1948/gauges_projected.csv");
        Network network = Network.Of([
            .. gauges.Select(row => (scale * row.Number($"x_{crs}"), scale * row.Number($"y_{crs}"))),
        ]);
        network.Count.ShouldBe(gauges.Count);
        var counties = ReferenceTable
            .Rows("nc1948/counties_vertices.csv")
            .GroupBy(row => row["fips"], StringComparer.Ordinal)
            .Select(county => (Fips: county.Key, Rings: RingsOf(county, $"x_{crs}_{datum}", $"y_{crs}_{datum}", scale)))
            .ToList();
        counties.Count.ShouldBe(100);
        var weights = AreaWeights.Of(network.Cells(), Shapes.Batch([.. counties.Select(county => county.Rings)]), 2);
        GoldenWeights.ShouldAgree(
            ReferenceTable
                .Rows("nc1948/thiessen_weights.csv")
                .Where(row => row["crs"] == crs && row["datum_variant"] == datum)
                .Select(row =>
                    (row["fips"], row["gauge"], scale * scale * row.Number("area_m2"), row.Number("weight"))
                ),
            [.. counties.Select(county => county.Fips)],
            [.. gauges.Select(row => row["gauge"])],
            weights,
            tolerance
        );
    }

    /// <summary>One ring a part; the shapefile's rings turn clockwise.</summary>
    private static (double X, double Y)[][] RingsOf(
        IEnumerable<Dictionary<string, string>> rows,
        string x,
        string y,
        double scale
    ) =>
        [
            .. rows.GroupBy(row => (row["part"], row["ring"]))
                .Select(ring =>
                    Shapes.CounterClockwise([.. ring.Select(row => (scale * row.Number(x), scale * row.Number(y)))])
                ),
        ];
}

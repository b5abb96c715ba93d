using RecipeRunner.Numerics.Gaps;
using RecipeRunner.Numerics.Tests.Support;
using RecipeRunner.Numerics.Weights;
using RecipeRunner.Testing;

namespace RecipeRunner.Numerics.Tests.Gaps;

/// <summary>
/// Real networks with gauges silent: <i>source:</i> each remaining network tessellated anew by SciPy 1.10.1 (Qhull) with
/// Shapely 1.8.5 (GEOS 3.11.1), checked there by half-plane clipping with numpy (3e-16, 6e-15); golden_gaps.py in
/// tests/reference/scripts.
/// </summary>
public sealed class GoldenGapTests
{
    /// <summary>The goldens leave out what is not above this.</summary>
    private const double LeastWeight = 1e-9;

    private const double Scale = 32;

    /// <summary>Every k-th of 467 Swiss gauges silent, which stand on whole metres and so on the lattice.</summary>
    [Fact]
    public void Swiss_boxes_agree_with_every_kth_gauge_silent()
    {
        List<Dictionary<string, string>> stations = ReferenceTable.Rows("sic97/stations.csv");
        List<Dictionary<string, string>> boxes = ReferenceTable.Rows("sic97/boxes.csv");
        Network network = Network.Of([.. stations.Select(row => (row.Number("x_m"), row.Number("y_m")))]);
        ReportingWeights weights = ReportingWeights.Of(
            network.X,
            network.Y,
            Shapes.Batch([
                .. boxes.Select<Dictionary<string, string>, (double, double)[][]>(row =>
                    [Shapes.Box(row.Number("xmin"), row.Number("ymin"), row.Number("xmax"), row.Number("ymax"))]
                ),
            ]),
            1
        );
        string[] names = [.. boxes.Select(row => row["box"])];
        string[] ids = [.. stations.Select(row => row["id"])];
        var sets = ReferenceTable
            .Rows("sic97/gap_weights.csv")
            .GroupBy(row => (Every: (int)row.Number("every"), Offset: (int)row.Number("offset")))
            .ToList();
        sets.Count.ShouldBe(8);
        foreach (var set in sets)
        {
            bool[] reports = [.. ids.Select((_, i) => i % set.Key.Every != set.Key.Offset)];
            var expected = set.ToLookup(row => row["zone"], row => (row["id"], row.Number("weight")));
            expected.Count.ShouldBe(24);
            for (int box = 0; box < names.Length; box++)
            {
                ShouldAgree(weights.Of(box, reports), ids, expected[names[box]], 1e-12);
            }
        }
    }

    /// <summary>
    /// 200 random sets of 461 gauges, 5 % to 95 % silent, over counties, some of several parts. All is 32 times larger, where
    /// the lattice is 32 times finer against the map: where few gauges are left, it moves their bisectors most.
    /// </summary>
    [Fact]
    public void Carolina_counties_agree_with_random_gauges_silent()
    {
        List<Dictionary<string, string>> gauges = ReferenceTable.Rows("nc1948/gauges_projected.csv");
        Network network = Network.Of([
            .. gauges.Select(row => (Scale * row.Number("x_32119"), Scale * row.Number("y_32119"))),
        ]);
        var counties = ReferenceTable
            .Rows("nc1948/counties_vertices.csv")
            .GroupBy(row => row["fips"], StringComparer.Ordinal)
            .Select(county => (Fips: county.Key, Rings: RingsOf(county)))
            .ToList();
        PolygonBatch batch = Shapes.Batch([.. counties.Select(county => county.Rings)]);
        ReportingWeights weights = ReportingWeights.Of(network.X, network.Y, batch, 1);
        string[] names = [.. counties.Select(county => county.Fips)];
        string[] ids = [.. gauges.Select(row => row["gauge"])];
        var golden = ReferenceTable
            .Rows("nc1948/gap_weights.csv")
            .ToLookup(row => (row["set"], row["fips"]), row => (row["gauge"], row.Number("weight")));
        golden.Count.ShouldBe(800);
        Dictionary<string, bool[]> sets = ReferenceTable
            .Rows("nc1948/gap_sets.csv")
            .ToDictionary(row => row["set"], row => row["reports"].Select(bit => bit == '1').ToArray());
        foreach (var rows in golden)
        {
            (string set, string fips) = rows.Key;
            ShouldAgree(weights.Of(Array.IndexOf(names, fips), sets[set]), ids, rows, 1e-9);
        }
    }

    private static void ShouldAgree(
        (int[] Sites, double[] Weights) found,
        string[] ids,
        IEnumerable<(string Site, double Weight)> golden,
        double tolerance
    )
    {
        Dictionary<string, double> weights = found
            .Sites.Zip(found.Weights)
            .ToDictionary(pair => ids[pair.First], pair => pair.Second, StringComparer.Ordinal);
        foreach ((string site, double weight) in golden)
        {
            weights[site].ShouldBe(weight, tolerance);
            weights.Remove(site);
        }

        weights.Values.ShouldAllBe(weight => weight <= LeastWeight + tolerance);
    }

    /// <summary>One ring a part; the shapefile's rings turn clockwise.</summary>
    private static (double X, double Y)[][] RingsOf(IEnumerable<Dictionary<string, string>> rows) =>
        [
            .. rows.GroupBy(row => row["part"], StringComparer.Ordinal)
                .Select(part =>
                    Shapes.CounterClockwise([
                        .. part.SkipLast(1)
                            .Select(row =>
                                (Scale * row.Number("x_32119_noshift"), Scale * row.Number("y_32119_noshift"))
                            ),
                    ])
                ),
        ];
}

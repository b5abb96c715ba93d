using System.Collections.Immutable;
using System.Text.Json;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Time;
using RecipeRunner.Model.Weights;
using RecipeRunner.Steps.Series;
using RecipeRunner.Steps.Tests.Support;
using RecipeRunner.Steps.Weighting;
using RecipeRunner.Testing;

namespace RecipeRunner.Steps.Tests.Evidence;

/// <summary>
/// The worked examples that these steps can run: exact geometry cases, and textbook tables of areas and depths.
/// source: tests/reference/handbook, each with its book (from memory) or its closed form. One unit of an example is taken
/// as 1,000 km where that keeps the lattice of 2⁻¹⁶ m below 1e-12 of a weight.
/// </summary>
public sealed class HandbookTests : IDisposable
{
    private readonly Bench bench = new();

    public static TheoryData<string> Geometries =>
        [.. Examples("thiessen_geometry").Select(example => example.GetProperty("id").GetString()!)];

    public static TheoryData<string> Circles =>
        [.. Examples("thiessen_geometry_circle").Select(example => example.GetProperty("id").GetString()!)];

    public static TheoryData<string> Tables =>
        [.. Examples("weighted_mean").Select(example => example.GetProperty("id").GetString()!)];

    public void Dispose() => bench.Dispose();

    [Theory]
    [MemberData(nameof(Geometries))]
    public void Exact_geometry_gives_the_exact_weights(string id)
    {
        var example = Example(id);
        var inputs = example.GetProperty("inputs");
        var gauges = Points(inputs.GetProperty("gauges"));
        var scale = Scale(gauges);
        var basin = new Region([
            .. inputs.GetProperty("basin_parts").EnumerateArray().Select(part => Part(part, scale)),
        ]);

        RequireWeights(example, gauges, scale, basin, 1e-12);
    }

    [Theory]
    [MemberData(nameof(Circles))]
    public void Basins_that_are_nearly_circles_give_their_weights(string id)
    {
        var example = Example(id);
        var circle = example.GetProperty("inputs").GetProperty("circle");
        var (cx, cy, r) = (
            circle.GetProperty("cx").GetDouble(),
            circle.GetProperty("cy").GetDouble(),
            circle.GetProperty("r").GetDouble()
        );
        var n = circle.GetProperty("n").GetInt32();
        var gauges = Points(example.GetProperty("inputs").GetProperty("gauges"));
        var scale = Scale(gauges);
        var rim = Enumerable
            .Range(0, n)
            .Select(k =>
                Snapped(
                    scale * (cx + (r * Math.Cos(2 * Math.PI * k / n))),
                    scale * (cy + (r * Math.Sin(2 * Math.PI * k / n)))
                )
            );

        RequireWeights(example, gauges, scale, Region.OfShell(rim), id == "geo-sub-circle" ? 1e-9 : 1e-11);
    }

    [Theory]
    [MemberData(nameof(Tables))]
    public void Textbook_tables_of_areas_and_depths_give_the_exact_mean(string id)
    {
        var example = Example(id);
        var areas = Doubles(example.GetProperty("inputs").GetProperty("areas"));
        var depths = Doubles(example.GetProperty("inputs").GetProperty("values"));
        var network = bench.Network([.. areas.Select((_, i) => (Id(i), 1000.0 * i, 0.0))]);
        var basins = bench.Basins(("basin", Bench.Box(0, 0, 1000, 1000)));
        var weights = bench.Study.Take(
            new WeightTable(
                basins,
                network.ThiessenCells(),
                [.. areas.Select((area, i) => new Weight(0, i, area, area / areas.Sum()))]
            )
        );

        Mean(weights, depths).ShouldBe(example.GetProperty("expected").GetProperty("mean").GetDouble(), 1e-9);
    }

    [Fact]
    public void Two_gauges_in_one_place_are_refused_by_name()
    {
        var example = Example("geo-co-located");
        var gauges = Points(example.GetProperty("inputs").GetProperty("gauges"));
        var network = bench.Network([.. gauges.Select((gauge, i) => (Id(i), 1000 * gauge.X, 1000 * gauge.Y))]);

        var problem = Bench.Refused(() => network.ThiessenCells())[0];
        problem.Code.ShouldBe("RR0402");
        problem.Where.Item.ShouldBe($"gauges {Id(0)} and {Id(1)}");
    }

    private void RequireWeights(JsonElement example, Location[] gauges, double scale, Region basin, double tolerance)
    {
        var network = bench.Network([
            .. gauges.Select(
                (gauge, i) =>
                    (Id(i), Snapped(scale * gauge.X, scale * gauge.Y).X, Snapped(scale * gauge.X, scale * gauge.Y).Y)
            ),
        ]);
        var weights = bench.Basins(("basin", basin)).WeighBy(network.ThiessenCells());
        var expected = Doubles(example.GetProperty("expected").GetProperty("weights"));
        var found = weights.Weights.ToDictionary(weight => weight.Gauge, weight => weight.Share);

        for (var i = 0; i < expected.Length; i++)
        {
            found.GetValueOrDefault(i).ShouldBe(expected[i], tolerance, $"gauge {i}");
            found.ContainsKey(i).ShouldBe(expected[i] > 0);
        }

        var mean = example.GetProperty("expected").GetProperty("mean").GetDouble();
        Mean(weights, Doubles(example.GetProperty("inputs").GetProperty("values")))
            .ShouldBe(mean, Math.Max(1, Math.Abs(mean)) * 100 * tolerance);
    }

    private double Mean(WeightTable weights, double[] depths)
    {
        var statuses = Enumerable.Repeat(RecordStatus.Observed, depths.Length).ToArray();
        var ids = Enumerable.Range(0, depths.Length).Select(Id).ToImmutableArray();
        var records = bench.Study.Take(
            new RainRecords(
                ids,
                new Timeline(TimeStep.Days("24:00"), new NodaTime.LocalDateTime(2000, 1, 1, 0, 0), 1),
                depths,
                statuses,
                "example"
            )
        );
        return weights.MeanRain(records, GapPolicy.Redraw).At(0, 0).DepthMillimetres!.Value;
    }

    /// <summary>Metres in one unit of the example: 2²⁰ where coordinates are small, else 1.</summary>
    private static double Scale(Location[] gauges) =>
        gauges.Max(gauge => Math.Max(Math.Abs(gauge.X), Math.Abs(gauge.Y))) > 200 ? 1
        : gauges.Max(gauge => Math.Abs(gauge.X)) > 15 ? 1 << 18
        : 1 << 20;

    private static string Id(int i) => FormattableString.Invariant($"G{i:00}");

    private static RegionPart Part(JsonElement rings, double scale)
    {
        var all = rings
            .EnumerateArray()
            .Select(ring => new Ring([
                .. Open(Points(ring)).Select(point => Snapped(scale * point.X, scale * point.Y)),
            ]))
            .ToArray();
        return new RegionPart(
            Turned(all[0], counterClockwise: true),
            [.. all.Skip(1).Select(hole => Turned(hole, counterClockwise: false))]
        );
    }

    private static Location[] Open(Location[] ring) => ring[0] == ring[^1] ? ring[..^1] : ring;

    private static Ring Turned(Ring ring, bool counterClockwise) =>
        ring.SignedArea > 0 == counterClockwise ? ring : new Ring([.. ring.Vertices.Reverse()]);

    private static Location Snapped(double x, double y) =>
        new(Numerics.Predicates.Lattice.Snap(x), Numerics.Predicates.Lattice.Snap(y));

    private static Location[] Points(JsonElement list) =>
        [.. list.EnumerateArray().Select(pair => new Location(pair[0].GetDouble(), pair[1].GetDouble()))];

    private static double[] Doubles(JsonElement list) => [.. list.EnumerateArray().Select(item => item.GetDouble())];

    private static JsonElement Example(string id) => All.Single(example => example.GetProperty("id").GetString() == id);

    private static IEnumerable<JsonElement> Examples(string kind) =>
        All.Where(example => example.GetProperty("kind").GetString() == kind);

    private static readonly JsonElement[] All =
    [
        .. JsonDocument
            .Parse(File.ReadAllBytes(ReferenceFolder.PathOf("handbook/worked_examples.json")))
            .RootElement.EnumerateArray(),
    ];
}

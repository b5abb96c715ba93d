using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Series;
using RecipeRunner.Steps.Shapes;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Series;

/// <summary>source: distances by NetTopologySuite 2.6.0, of every gauge, without any bound or order.</summary>
public sealed class GaugeDistancesTests : IDisposable
{
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void The_nearest_reporting_gauge_is_found_however_few_report()
    {
        var random = new Random(7);
        var places = Enumerable
            .Range(0, 300)
            .Select(i =>
                (FormattableString.Invariant($"G{i:000}"), random.NextDouble() * 1000, random.NextDouble() * 1000)
            )
            .ToArray();
        var network = bench.Network(places);
        var basin = Region.OfShell([new(400, 400), new(600, 420), new(500, 450), new(620, 600), new(380, 560)]);
        var shape = RegionGeometry.Of(basin);
        var all = network.Gauges.Select(gauge => shape.Distance(RegionGeometry.Of(gauge.Place))).ToArray();
        var distances = new GaugeDistances(basin, network);

        for (var round = 0; round < 400; round++)
        {
            var share = Math.Pow(random.NextDouble(), 4);
            var reports = all.Select(_ => random.NextDouble() < share).ToArray();
            var expected = all.Where((_, gauge) => reports[gauge])
                .Select(metres => (double?)metres)
                .DefaultIfEmpty(null)
                .Min();

            var found = distances.ToNearest(reports);

            (found is null).ShouldBe(expected is null);
            (found ?? 0).ShouldBe(expected ?? 0, 1e-9);
        }
    }
}

using System.Globalization;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Benchmarks;

/// <summary>How cost grows over three decades: the exponent is the slope of log time over log size, 1 when linear.</summary>
internal static class Growth
{
    private static readonly int[] Sizes = [1_000, 10_000, 100_000, 1_000_000];

    public static void Print()
    {
        Console.Out.Write("\n| how cost grows, one thread | | | | | exponent |\n");
        Console.Out.Write("|---|---|---|---|---|---|\n");
        Region[] regions = [.. Sizes.Select(size => new Region(size, size / 10, 100))];
        DelaunayTriangulation[] triangulations = [.. regions.Select(Triangulate)];
        ThiessenCells[] cells = [.. triangulations.Select(ThiessenCells.Of)];
        Row("Delaunay, gauges", i => Triangulate(regions[i]).SiteCount);
        Row("Cells, gauges", i => ThiessenCells.Of(triangulations[i]).SiteCount);
        Row(
            "Weights, gauges with a tenth as many basins of 100 points",
            i => AreaWeights.Of(cells[i], regions[i].Batch, 1).Count
        );
    }

    private static DelaunayTriangulation Triangulate(Region region) => DelaunayTriangulation.Of(region.X, region.Y);

    /// <summary>Prints a row of sizes and milliseconds, and the exponent.</summary>
    public static void Row(string name, double[] sizes, double[] milliseconds)
    {
        string cells = string.Join(
            " | ",
            sizes.Zip(milliseconds, (size, ms) => string.Create(CultureInfo.InvariantCulture, $"{size:N0}: {ms:F2} ms"))
        );
        double exponent = Slope(
            [.. sizes.Select(size => Math.Log(size))],
            [.. milliseconds.Select(ms => Math.Log(ms))]
        );
        Console.Out.Write(string.Create(CultureInfo.InvariantCulture, $"| {name} | {cells} | {exponent:F2} |\n"));
    }

    private static void Row(string name, Func<int, double> work) =>
        Row(
            name,
            [.. Sizes.Select(size => (double)size)],
            [
                .. Sizes.Select(
                    (size, i) =>
                        Contest.Median([
                            .. Enumerable
                                .Range(0, size > 100_000 ? 5 : 21)
                                .Select(_ => Sample.Of(() => work(i)).Milliseconds),
                        ])
                ),
            ]
        );

    private static double Slope(double[] x, double[] y)
    {
        double meanX = x.Average();
        double meanY = y.Average();
        return x.Zip(y, (a, b) => (a - meanX) * (b - meanY)).Sum() / x.Sum(a => (a - meanX) * (a - meanX));
    }
}

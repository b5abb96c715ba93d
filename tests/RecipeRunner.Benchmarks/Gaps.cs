using System.Diagnostics;
using System.Globalization;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Gaps;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;

namespace RecipeRunner.Benchmarks;

/// <summary>Means over a record with gaps, by the cells of the gauges that report and by fixed weights.</summary>
internal static class Gaps
{
    private const int Gauges = 400;
    private const int Sampled = 20;

    public static void PrintContests(string folder)
    {
        var basins = new Region(Gauges, 60, 550);
        var large = new Region(Gauges, 6, 550);
        var random = GapRecord.Random(Gauges, 10_000, 0.05);
        Anew("60 basins × 10,000 steps, 5 % missing", folder, basins, random, 5);
        Anew("6 large basins × 10,000 steps, 5 % missing", folder, large, random, 5);
        Anew("60 basins × 36,500 steps, century", folder, basins, GapRecord.Century(Gauges, 36_500), 3);
        Anew("60 basins × 500 steps, 50 % missing", folder, basins, GapRecord.Random(Gauges, 500, 0.5), 3);
        Fixed(folder, basins, GapRecord.Random(Gauges, 10_000, 0));
    }

    /// <summary>First in its process, as it states the most memory that the process ever had.</summary>
    public static void PrintCentury()
    {
        Console.Out.Write(
            "\n| century, 400 gauges × 60 basins × 36,500 days | time | states computed | bytes held | peak |\n"
        );
        Console.Out.Write("|---|---|---|---|---|\n");
        var basins = new Region(Gauges, 60, 550);
        var century = GapRecord.Century(Gauges, 36_500);
        double reporting = century.Reports.Count(isReporting => isReporting) / (double)century.Reports.Length;
        foreach (long budget in (long[])[ReportingWeights.DefaultBudgetBytes, 4 << 20])
        {
            foreach (int threads in (int[])[1, 2])
            {
                ReportingWeights? weights = null;
                double median = Contest.Median([
                    .. Enumerable
                        .Range(0, 3)
                        .Select(_ =>
                            Sample.Of(() => Means(basins, century, threads, budget, out weights)[0]).Milliseconds
                        ),
                ]);
                Console.Out.Write(
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"| {reporting:P0} reporting, budget {budget >> 20} MiB, {threads} thread(s) | {median / 1000:F2} s | {weights?.StatesComputed:N0} | {(weights?.BytesHeld ?? 0) / 1e6:F1} MB | {Process.GetCurrentProcess().PeakWorkingSet64 / 1e6:F0} MB |\n"
                    )
                );
            }
        }
    }

    public static void PrintGrowth()
    {
        var basins = new Region(Gauges, 60, 550);
        int[] steps = [100, 1_000, 10_000, 100_000];
        Console.Out.Write("\n| how cost grows, one thread | | | | | exponent |\n|---|---|---|---|---|---|\n");
        GapRecord[] records = [.. steps.Select(count => GapRecord.Random(Gauges, count, 0.05))];
        (double First, double Again, long States)[] costs = [.. records.Select(record => Cost(basins, record))];
        Growth.Row("steps, 5 % missing", [.. steps.Select(s => (double)s)], [.. costs.Select(cost => cost.First)]);
        Growth.Row("steps, all states known", [.. steps.Select(s => (double)s)], [.. costs.Select(cost => cost.Again)]);
        double[] missing = [0.0005, 0.005, 0.05, 0.25];
        costs = [.. missing.Select(share => Cost(basins, GapRecord.Random(Gauges, 4_000, share)))];
        Growth.Row(
            "states at 4,000 steps: time less that with all states known",
            [.. costs.Select(cost => (double)cost.States)],
            [.. costs.Select(cost => cost.First - cost.Again)]
        );
    }

    private static (double First, double Again, long States) Cost(Region region, GapRecord record)
    {
        int rounds = record.Steps > 10_000 ? 1 : 5;
        var first = new List<double>();
        var again = new List<double>();
        long states = 0;
        for (int round = 0; round < rounds; round++)
        {
            ReportingWeights weights = Of(region, 1, ReportingWeights.DefaultBudgetBytes);
            first.Add(Sample.Of(() => Means(weights, region, record, 1)[0]).Milliseconds);
            again.Add(Sample.Of(() => Means(weights, region, record, 1)[0]).Milliseconds);
            states = weights.StatesComputed;
        }

        return (Contest.Median(first), Contest.Median(again), states);
    }

    /// <summary>Against cells drawn anew at each step, measured on some steps and scaled to all.</summary>
    private static void Anew(string work, string folder, Region region, GapRecord record, int rounds)
    {
        GapRecord sample = record.Every(record.Steps / Sampled);
        string points = Path.Combine(folder, "points.bin");
        string rings = Path.Combine(folder, "basins.bin");
        string steps = Path.Combine(folder, "record.bin");
        region.WritePoints(points);
        Region.WriteRings(rings, region.Basins());
        sample.Write(steps);
        using var shapely = new Baseline("/usr/bin/python3", "-W", "ignore", "Baselines/anew.py", points, rings, steps);
        Contest.Run(
            work,
            rounds,
            [new("one thread", () => Tool(region, record, 1)), new("two threads", () => Tool(region, record, 2))],
            [
                new($"SciPy and Shapely anew, {Sampled} steps scaled", () => Scaled(shapely.Run(), record)),
                new(
                    $"own cells anew, {Sampled} steps scaled",
                    () => Scaled(Sample.Of(() => DrawnAnew(region, sample)), record)
                ),
            ]
        );
    }

    private static Sample Scaled(Sample sample, GapRecord record) =>
        sample with
        {
            Milliseconds = sample.Milliseconds * record.Steps / Sampled,
        };

    /// <summary>All steps; the result is the sum of the means of the sampled ones.</summary>
    private static Sample Tool(Region region, GapRecord record, int threads) =>
        Sample.Of(() =>
        {
            double[] means = Means(region, record, threads, ReportingWeights.DefaultBudgetBytes, out _);
            int stride = record.Steps / Sampled * region.Batch.Count;
            return means.Where((_, i) => i % stride < region.Batch.Count).Sum();
        });

    private static double[] Means(
        Region region,
        GapRecord record,
        int threads,
        long budget,
        out ReportingWeights weights
    )
    {
        weights = Of(region, threads, budget);
        return Means(weights, region, record, threads);
    }

    private static ReportingWeights Of(Region region, int threads, long budget) =>
        ReportingWeights.Of(region.X, region.Y, region.Batch, threads, budget);

    private static double[] Means(ReportingWeights weights, Region region, GapRecord record, int threads)
    {
        var means = new double[record.Steps * region.Batch.Count];
        var wanted = new bool[means.Length];
        Array.Fill(wanted, true);
        weights.Means(record.Steps, record.Depths, record.Reports, wanted, means, threads);
        return means;
    }

    private static double DrawnAnew(Region region, GapRecord record)
    {
        double sum = 0;
        for (int step = 0; step < record.Steps; step++)
        {
            int[] live = [.. Enumerable.Range(0, Gauges).Where(gauge => record.Reports[(step * Gauges) + gauge])];
            double[] x = [.. live.Select(gauge => region.X[gauge])];
            double[] y = [.. live.Select(gauge => region.Y[gauge])];
            var weights = AreaWeights.Of(ThiessenCells.Of(DelaunayTriangulation.Of(x, y)), region.Batch, 1);
            for (int basin = 0; basin < weights.Count; basin++)
            {
                for (int i = 0; i < weights.Sites(basin).Length; i++)
                {
                    sum += weights.Weights(basin)[i] * record.Depths[(step * Gauges) + live[weights.Sites(basin)[i]]];
                }
            }
        }

        return sum;
    }

    private static void Fixed(string folder, Region region, GapRecord record)
    {
        var weights = AreaWeights.Of(ThiessenCells.Of(DelaunayTriangulation.Of(region.X, region.Y)), region.Batch, 1);
        int[] starts = [0, .. Enumerable.Range(0, weights.Count).Select(basin => Ends(weights, basin))];
        int[] sites = [.. Enumerable.Range(0, weights.Count).SelectMany(basin => weights.Sites(basin).ToArray())];
        double[] shares = [.. Enumerable.Range(0, weights.Count).SelectMany(basin => weights.Weights(basin).ToArray())];
        string matrix = Path.Combine(folder, "weights.bin");
        string steps = Path.Combine(folder, "record.bin");
        WriteMatrix(matrix, starts, sites, shares);
        record.Write(steps);
        var table = new FixedWeights(Gauges, starts, sites, shares);
        var means = new double[record.Steps * weights.Count];
        var reporting = new int[means.Length];
        var parts = new double[means.Length];
        using var scipy = new Baseline("/usr/bin/python3", "Baselines/csr.py", matrix, steps);
        Contest.Run(
            "Fixed weights, 60 basins × 10,000 steps, none missing",
            101,
            [new("one thread", () => Apply(1)), new("two threads", () => Apply(2))],
            [new("CSR @ dense (SciPy)", scipy.Run)]
        );

        Sample Apply(int threads)
        {
            var sample = Sample.Of(() =>
            {
                table.Means(record.Steps, record.Depths, record.Reports, means, reporting, parts, threads);
                return 0;
            });
            return sample with { Result = means.Sum() };
        }
    }

    private static int Ends(AreaWeights weights, int basin) =>
        Enumerable.Range(0, basin + 1).Sum(before => weights.Sites(before).Length);

    private static void WriteMatrix(string path, int[] starts, int[] sites, double[] shares)
    {
        using var writer = new BinaryWriter(File.Create(path));
        IEnumerable<double> values =
        [
            starts.Length,
            .. starts.Select(start => (double)start),
            .. sites.Select(site => (double)site),
            .. shares,
        ];
        foreach (double value in values)
        {
            writer.Write(value);
        }
    }
}

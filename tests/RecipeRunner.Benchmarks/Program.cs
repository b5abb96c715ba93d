using System.Globalization;
using RecipeRunner.Benchmarks;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;

string folder = args.Length > 0 ? args[0] : throw new ArgumentException("start it by run.sh");
Console.Out.Write($"{Environment.ProcessorCount} processors, .NET {Environment.Version}\n\n");
Console.Out.Write("| work | baseline | baseline's median | tool's median | tool / baseline | times faster |\n");
Console.Out.Write("|---|---|---|---|---|---|\n");
Triangulate(1_000, 101);
Triangulate(100_000, 21);
Triangulate(1_000_000, 7);
Weigh(6_000, 3_000, 7, withNts: true);
Weigh(100_000, 20_000, 3, withNts: false);
Growth.Print();

void Triangulate(int count, int rounds)
{
    var region = new Region(count, 1, 3);
    string points = Path.Combine(folder, "points.bin");
    region.WritePoints(points);
    using var delaunator = new Baseline("node", "Baselines/delaunator.mjs", folder, points);
    using var qhull = new Baseline("/usr/bin/python3", "Baselines/qhull.py", points);
    Contest.Run(
        string.Create(CultureInfo.InvariantCulture, $"Delaunay, {count:N0} uniform gauges, one thread"),
        rounds,
        () => Sample.Of(() => DelaunayTriangulation.Of(region.X, region.Y).Corners.Length / 3),
        ("delaunator (node)", delaunator.Run),
        ("Qhull (SciPy)", qhull.Run)
    );
}

void Weigh(int gauges, int basins, int rounds, bool withNts)
{
    var region = new Region(gauges, basins, 550);
    var cells = ThiessenCells.Of(DelaunayTriangulation.Of(region.X, region.Y));
    string cellFile = Path.Combine(folder, "cells.bin");
    string basinFile = Path.Combine(folder, "basins.bin");
    Region.WriteRings(cellFile, Region.Outlines(cells));
    Region.WriteRings(basinFile, region.Basins());
    using var geos = new Baseline(Path.Combine(folder, "geos_overlay"), cellFile, basinFile);
    var nts = new Lazy<NtsOverlay>(() => new NtsOverlay(region, Region.Outlines(cells)));
    (string, Func<Sample>)[] others = withNts ? [("NTS OverlayNG", () => Sample.Of(() => nts.Value.Run()))] : [];
    foreach (int threads in (int[])[1, 2])
    {
        Contest.Run(
            string.Create(
                CultureInfo.InvariantCulture,
                $"Weights, {gauges:N0} gauges × {basins:N0} basins of 550 points, {threads} thread(s)"
            ),
            rounds,
            () => Sample.Of(() => TotalArea(AreaWeights.Of(cells, region.Batch, threads))),
            [("GEOS overlay (C loop)", geos.Run), .. threads == 1 ? others : []]
        );
    }
}

static double TotalArea(AreaWeights weights)
{
    double total = 0;
    for (int basin = 0; basin < weights.Count; basin++)
    {
        foreach (double area in weights.Areas(basin))
        {
            total += area;
        }
    }

    return total;
}

using System.Globalization;
using RecipeRunner.Benchmarks;
using RecipeRunner.Numerics.Cells;
using RecipeRunner.Numerics.Triangulation;
using RecipeRunner.Numerics.Weights;

string folder = args.Length == 2 ? args[0] : throw new ArgumentException("start it by run.sh");
switch (args[1])
{
    case "cells":
        PrintHead();
        Triangulate(100_000, 21, withQhull: true);
        Triangulate(1_000_000, 9, withQhull: false);
        Weigh(6_000, 3_000, 5, withNts: true);
        Weigh(100_000, 20_000, 2, withNts: false);
        Growth.Print();
        break;
    case "gaps":
        Gaps.PrintCentury();
        PrintHead();
        Gaps.PrintContests(folder);
        Gaps.PrintGrowth();
        break;
    case var part when part.StartsWith("reading", StringComparison.Ordinal):
        Reading.Run(folder, part);
        break;
    default:
        throw new ArgumentException($"there is no part {args[1]}");
}

static void PrintHead()
{
    Console.Out.Write($"\n{Environment.ProcessorCount} processors, .NET {Environment.Version}\n\n");
    Console.Out.Write("| work | baseline | median | tool | median | tool / baseline | times faster |\n");
    Console.Out.Write("|---|---|---|---|---|---|---|\n");
}

void Triangulate(int count, int rounds, bool withQhull)
{
    var region = new Region(count, 1, 3);
    string points = Path.Combine(folder, "points.bin");
    region.WritePoints(points);
    using var delaunator = new Baseline("node", "Baselines/delaunator.mjs", folder, points);
    using Baseline? qhull = withQhull ? new Baseline("/usr/bin/python3", "Baselines/qhull.py", points) : null;
    Contender[] baselines = [new("delaunator (node)", delaunator.Run)];
    Contest.Run(
        string.Create(CultureInfo.InvariantCulture, $"Delaunay, {count:N0} uniform gauges"),
        rounds,
        [new("one thread", () => Sample.Of(() => DelaunayTriangulation.Of(region.X, region.Y).Corners.Length / 3))],
        qhull is null ? baselines : [.. baselines, new("Qhull (SciPy)", qhull.Run)]
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
    Contender[] baselines = [new("GEOS overlay (C loop)", geos.Run)];
    if (withNts)
    {
        var nts = new NtsOverlay(region, Region.Outlines(cells));
        baselines = [.. baselines, new("NTS OverlayNG", () => Sample.Of(nts.Run))];
    }

    Contest.Run(
        string.Create(CultureInfo.InvariantCulture, $"Weights, {gauges:N0} gauges × {basins:N0} basins of 550 points"),
        rounds,
        [
            new("one thread", () => Sample.Of(() => TotalArea(AreaWeights.Of(cells, region.Batch, 1)))),
            new("two threads", () => Sample.Of(() => TotalArea(AreaWeights.Of(cells, region.Batch, 2)))),
        ],
        baselines
    );
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

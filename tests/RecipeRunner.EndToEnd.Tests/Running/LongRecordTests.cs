using System.Globalization;

namespace RecipeRunner.EndToEnd.Tests.Running;

/// <summary>Sixty years of gaps through the real tool, its numbers made again by shapely on GEOS from the layers and the record.</summary>
public sealed class LongRecordTests
{
    /// <summary>
    /// Source: cells of the reporting gauges by cutting half planes (shapely 1.8.5 on GEOS 3.11.1 of Debian 12), depths from the file.
    /// Days near which totals of several days were shared out are left aside.
    /// </summary>
    private const string Redraw = """
        import csv, gzip, sys
        import fiona
        from shapely.geometry import shape, Polygon
        study, record = sys.argv[1:3]
        layer = lambda name, key: {f["properties"][key]: shape(f["geometry"]) for f in fiona.open(f"{study}/data/layers/{name}.shp")}
        basins, gauges = layer("basins", "basin"), {k: (p.x, p.y) for k, p in layer("gauges", "gauge").items()}
        rows = list(csv.DictReader(gzip.open(record, "rt")))
        areal = list(csv.DictReader(open(f"{study}/data/tables/areal-rainfall.csv")))
        assert len(rows) == len(areal) == 21915
        L = 2e6
        def nearer(a, b):
            mx, my, dx, dy = (a[0] + b[0]) / 2, (a[1] + b[1]) / 2, b[0] - a[0], b[1] - a[1]
            n = (dx * dx + dy * dy) ** 0.5
            dx, dy = dx / n * L, dy / n * L
            return Polygon([(mx - dy, my + dx), (mx + dy, my - dx), (mx + dy - dx, my - dx - dy), (mx - dy - dx, my + dx - dy)])
        days, worst, sets = 0, 0, set()
        for t in range(7, len(rows), 211):
            if any("A" in (rows[t][g], rows[t - 1][g]) for g in gauges):
                continue
            depth = {g: 0 if rows[t][g] == "T" else float(rows[t][g]) for g in gauges if rows[t][g] != "-9999"}
            cells = {}
            for g in depth:
                cell = nearer(gauges[g], next(gauges[h] for h in depth if h != g))
                for h in depth:
                    cell = cell if h == g else cell.intersection(nearer(gauges[g], gauges[h]))
                cells[g] = cell
            for b, outline in basins.items():
                if areal[t][b]:
                    mean = sum(depth[g] * outline.intersection(cells[g]).area for g in depth) / outline.area
                    worst = max(worst, abs(mean - float(areal[t][b])))
            days += 1
            sets.add(frozenset(depth))
        assert days >= 60 and len(sets) > 30, (days, len(sets))
        print(worst)
        """;

    [Fact]
    public void Cells_redrawn_through_sixty_years_give_the_means_that_outside_software_gives()
    {
        using var tool = new Tool();
        var run = tool.Run("run", DemoStudy.Recipe("sixty-years"), "--data", DemoStudy.Data);
        run.ExitCode.ShouldBe(0, run.Errors);
        run.Output.ShouldContain("9,407 trace");

        var said = tool.Command(
            "/usr/bin/python3",
            "-c",
            Redraw,
            tool.PathOf("sixty-years.study"),
            Path.Combine(DemoStudy.Data, "daily-sixty-years.csv.gz")
        );

        said.ExitCode.ShouldBe(0, said.Errors);
        double.Parse(said.Output, CultureInfo.InvariantCulture).ShouldBeLessThan(1e-5);
    }

    [Theory]
    [InlineData("hours-into-days")]
    [InlineData("one-storm")]
    [InlineData("wet-days")]
    public void The_other_ready_recipes_run_on_the_demo(string recipe)
    {
        using var tool = new Tool();

        var said = tool.Run("run", DemoStudy.Recipe(recipe), "--data", DemoStudy.Data, "--quiet");

        said.ExitCode.ShouldBe(0, said.Errors);
    }
}

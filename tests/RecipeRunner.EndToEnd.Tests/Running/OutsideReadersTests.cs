using System.Text.Json;

namespace RecipeRunner.EndToEnd.Tests.Running;

/// <summary>
/// What the tool writes is opened by general-purpose software of Debian: fiona on GDAL, shapely on GEOS, pyproj on PROJ,
/// and Chromium.
/// </summary>
public sealed class OutsideReadersTests(DemoStudy demo) : IClassFixture<DemoStudy>
{
    private const string Script = """
        import csv, json, sys
        import fiona, pyproj
        from shapely.geometry import shape, mapping
        study = sys.argv[1]
        out = {}
        for name in ["basins.shp", "gauges.shp", "thiessen-cells.shp", "basins.geojson"]:
            with fiona.open(f"{study}/data/layers/{name}") as layer:
                crs = pyproj.CRS.from_wkt(layer.crs_wkt)
                features = list(layer)
                shapes = [shape(f["geometry"]) for f in features]
                out[name] = {
                    "epsg": crs.to_epsg(min_confidence=70), "count": len(features),
                    "valid": all(s.is_valid for s in shapes), "bounds": list(layer.bounds),
                    "rows": [{k: v for k, v in f["properties"].items()} for f in features],
                    "areas": [s.area for s in shapes],
                    "schema": {k: v.split(":")[0] for k, v in layer.schema["properties"].items()},
                }
        to_degrees = pyproj.Transformer.from_crs("EPSG:32633", "EPSG:4326", always_xy=True)
        with fiona.open(f"{study}/data/layers/basins.shp") as a, fiona.open(f"{study}/data/layers/basins.geojson") as b:
            worst = 0
            for f, g in zip(a, b):
                for p, q in zip(shape(f["geometry"]).geoms if f["geometry"]["type"] == "MultiPolygon" else [shape(f["geometry"])],
                                shape(g["geometry"]).geoms if g["geometry"]["type"] == "MultiPolygon" else [shape(g["geometry"])]):
                    want = sorted(to_degrees.transform(x, y) for x, y in p.exterior.coords)
                    have = sorted(q.exterior.coords)
                    assert len(want) == len(have)
                    worst = max(worst, max(abs(u - v) for w, h in zip(want, have) for u, v in zip(w, h)))
            out["worst_degrees"] = worst
        print(json.dumps(out))
        """;

    [Fact]
    public void Layers_open_with_attributes_geometry_and_reference_system_intact()
    {
        using var tool = new Tool();
        var said = tool.Command("/usr/bin/python3", "-c", Script, demo.Folder);
        said.ExitCode.ShouldBe(0, said.Errors);
        using var seen = JsonDocument.Parse(said.Output);
        var root = seen.RootElement;

        foreach (
            var (name, epsg, count) in ((string, int, int)[])
                [
                    ("basins.shp", 32633, 6),
                    ("gauges.shp", 32633, 22),
                    ("thiessen-cells.shp", 32633, 42),
                    ("basins.geojson", 4326, 6),
                ]
        )
        {
            var layer = root.GetProperty(name);
            layer.GetProperty("epsg").GetInt32().ShouldBe(epsg, name);
            layer.GetProperty("count").GetInt32().ShouldBe(count, name);
            layer.GetProperty("valid").GetBoolean().ShouldBeTrue(name);
        }

        var basins = root.GetProperty("basins.shp");
        basins.GetProperty("rows")[3].GetProperty("name").GetString().ShouldBe("Märzgraben");
        basins
            .GetProperty("rows")[3]
            .GetProperty("area_km2")
            .GetDouble()
            .ShouldBe(basins.GetProperty("areas")[3].GetDouble() / 1e6, 1e-6);
        basins.GetProperty("schema").GetProperty("rain_mm").GetString().ShouldBe("float");
        var marsh = root.GetProperty("basins.geojson").GetProperty("rows")[3];
        marsh
            .GetProperty("rain_mm")
            .GetDouble()
            .ShouldBe(basins.GetProperty("rows")[3].GetProperty("rain_mm").GetDouble(), 1e-6);
        root.GetProperty("worst_degrees").GetDouble().ShouldBeLessThan(2e-8);
    }

    [Fact]
    public void Pieces_add_up_to_the_weights_that_were_computed_without_them()
    {
        using var tool = new Tool();
        const string Compare = """
            import csv, sys, fiona
            from shapely.geometry import shape
            study = sys.argv[1]
            with fiona.open(f"{study}/data/layers/thiessen-cells.shp") as layer:
                pieces = {(f["properties"]["basin"], f["properties"]["gauge"]): shape(f["geometry"]).area for f in layer}
            rows = {(r["basin"], r["gauge"]): float(r["area_m2"]) for r in csv.DictReader(open(f"{study}/data/tables/weights.csv"))}
            assert pieces.keys() == rows.keys(), pieces.keys() ^ rows.keys()
            print(max(abs(pieces[k] - rows[k]) / max(rows[k], 1e4) for k in rows))
            """;
        var said = tool.Command("/usr/bin/python3", "-c", Compare, demo.Folder);

        said.ExitCode.ShouldBe(0, said.Errors);
        double.Parse(said.Output, System.Globalization.CultureInfo.InvariantCulture).ShouldBeLessThan(1e-8);
    }

    [Fact]
    public void The_page_opens_in_a_browser_without_a_complaint_and_shows_its_map()
    {
        using var tool = new Tool();
        var said = tool.Command(
            "chromium",
            "--headless",
            "--no-sandbox",
            "--disable-gpu",
            "--disable-quic",
            "--no-first-run",
            "--disable-background-networking",
            "--disable-component-update",
            "--disable-sync",
            "--enable-logging=stderr",
            $"--user-data-dir={tool.PathOf("profile")}",
            "--dump-dom",
            "file://" + demo.PathOf("summary.html")
        );

        said.ExitCode.ShouldBe(0, said.Errors);
        said.Errors.ShouldNotContain("CONSOLE");
        said.Output.ShouldContain("<svg class=\"map\"");
        said.Output.ShouldContain("licensed professional");
    }
}

// How many wet days did each basin of the invented Quellmark have in one year, and does the way of
// handling silent gauges matter?
//
//   recipe-runner run recipes/wet-days.csx --data data-demo
//
// A loop runs the same weights through every gap policy; plain C# counts the days.
var year = Setting("year", 2023);
var wetFrom = Setting("wet-from-mm", 1.0);
Title($"Quellmark: wet days of {year}");
Note("Invented data for demonstration; nothing here was measured.");
Source("*", "Invented for demonstration, made by data-demo/generate.py.", licence: "CC0-1.0");

var grid = Crs("EPSG:32633");
var basins = ReadBasins("basins.shp", id: "BASIN_ID", name: "NAME").To(grid);
var gauges = ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", crs: Crs("EPSG:4326")).To(grid);
var rain = ReadRecords("daily.csv", unit: RainUnit.Millimetres, step: TimeStep.Days(endingAt: "09:00"))
    .Between($"{year}-01-01", $"{year}-12-31");
var weights = basins.WeighBy(gauges.ThiessenCells());

foreach (var gaps in new[] { GapPolicy.Redraw, GapPolicy.Rescale, GapPolicy.Withhold })
{
    var areal = weights.MeanRain(rain, gaps, reporting: AtLeast.Percent(60));
    for (var b = 0; b < basins.Basins.Length; b++)
    {
        var given = Enumerable.Range(0, areal.Times.Count).Select(day => areal.At(day, b).DepthMillimetres).OfType<double>().ToList();
        var wet = given.Count(depth => depth >= wetFrom);
        Note($"{basins.Basins[b].Name}: {wet} of {given.Count} days with a value had {wetFrom} mm or more ({gaps}).");
    }

    EmitTable(areal.Total(Every.Month, complete: AtLeast.Percent(90)), $"months-{gaps.ToString().ToLowerInvariant()}");
}

EmitTable(weights, "weights");

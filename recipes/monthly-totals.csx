// How much rain fell on each basin of the invented Quellmark, month by month and by water year?
//
//   recipe-runner run recipes/monthly-totals.csx --data data-demo
//
// Settings: water-year-starts (10)
Title("Quellmark: rain by month and water year, October 2022 to September 2024");
Note("Invented data for demonstration; nothing here was measured.");
Source("*", "Invented for demonstration, made by data-demo/generate.py.", licence: "CC0-1.0");

var grid = Crs("EPSG:32633");
var basins = ReadBasins("basins.shp", id: "BASIN_ID", name: "NAME").To(grid);
var gauges = ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", elevation: "elev_m", crs: Crs("EPSG:4326")).To(grid);
var rain = ReadRecords("daily.csv", unit: RainUnit.Millimetres, step: TimeStep.Days(endingAt: "09:00"));

var cells = gauges.ThiessenCells();
var weights = basins.WeighBy(cells);
var areal = weights.MeanRain(rain, gaps: GapPolicy.Redraw, reporting: AtLeast.Percent(40));

var waterYear = Every.WaterYear(firstMonth: Setting("water-year-starts", 10));
var withTotals = basins.With(areal.Total(complete: AtLeast.Percent(95)));

EmitLayer(cells.CutTo(basins), "thiessen-cells");
EmitLayer(withTotals, "basins");
EmitLayer(withTotals, "basins.geojson");
EmitLayer(gauges, "gauges");
EmitTable(weights, "weights");
EmitTable(areal, "areal-rainfall");
EmitTable(areal.Coverage(), "coverage");
var byMonth = areal.Total(Every.Month, complete: AtLeast.Percent(90));
EmitTable(byMonth, "rain-by-month");
EmitTable(byMonth.Completeness(), "rain-by-month-completeness");
EmitTable(areal.Total(waterYear, complete: AtLeast.Percent(95)), "rain-by-water-year");

// One gauge of the invented Quellmark records every hour, the others once a day at 09:00. How much rain fell on the basins
// in the summer of 2024, with the hourly gauge in its place?
//
//   recipe-runner run recipes/hours-into-days.csx --data data-demo
//
// Hours are put into the days that end at 09:00 exactly, by their intervals; records of another observation day would be
// refused. The daily column of that gauge is left out by taking its hours in its stead.
Title("Quellmark: summer of 2024 with one hourly gauge");
Note("Invented data for demonstration; nothing here was measured.");
Source("*", "Invented for demonstration, made by data-demo/generate.py.", licence: "CC0-1.0");

var grid = Crs("EPSG:32633");
var basins = ReadBasins("basins.shp", id: "BASIN_ID", name: "NAME").To(grid);
var gauges = ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", crs: Crs("EPSG:4326")).To(grid);
var days = TimeStep.Days(endingAt: "09:00");

var hourly = ReadRecords("hourly-Q-19.csv", unit: RainUnit.Millimetres, step: TimeStep.Hours());
var daily = ReadRecords("daily.csv", unit: RainUnit.Millimetres, step: days)
    .Without("Q-19")
    .And(hourly.ToDays(endingAt: "09:00"))
    .Between("2024-06-02", "2024-08-31");

var areal = basins.WeighBy(gauges.ThiessenCells()).MeanRain(daily, GapPolicy.Redraw, reporting: AtLeast.Gauges(1));
EmitTable(areal, "areal-rainfall");
EmitTable(areal.Coverage(), "coverage");
EmitTable(areal.Total(Every.Month, complete: AtLeast.Percent(90)), "months");

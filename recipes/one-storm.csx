// One storm over the invented Quellmark: which gauges spoke for which ground on those days?
//
//   recipe-runner run recipes/one-storm.csx --data data-demo
//   recipe-runner run recipes/one-storm.csx --data data-demo --set first=2024-07-02 --set last=2024-07-04
//
// The layers show the cells of the full network and those that were in force while some gauges were silent.
var first = Setting("first", "2024-01-08");
var last = Setting("last", "2024-01-12");
Title($"Quellmark: the storm of {first} to {last}");
Note("Invented data for demonstration; nothing here was measured.");
Source("*", "Invented for demonstration, made by data-demo/generate.py.", licence: "CC0-1.0");

var grid = Crs("EPSG:32633");
var basins = ReadBasins("basins.shp", id: "BASIN_ID", name: "NAME").To(grid);
var gauges = ReadGauges("gauges.csv", id: "gauge", x: "lon", y: "lat", crs: Crs("EPSG:4326")).To(grid);
var storm = ReadRecords("daily.csv", unit: RainUnit.Millimetres, step: TimeStep.Days(endingAt: "09:00"))
    .Between(first, last);

var inForce = gauges.Reporting(storm).ThiessenCells();
var weights = basins.WeighBy(gauges.ThiessenCells());
var areal = weights.MeanRain(storm, gaps: GapPolicy.Redraw, reporting: AtLeast.Percent(50));

EmitLayer(weights.Cells.CutTo(basins), "cells-of-all-gauges");
EmitLayer(inForce.CutTo(basins), "cells-in-force");
EmitLayer(gauges.Triangulate(), "triangles");
EmitLayer(basins.With(areal.Total()), "storm-depth");
EmitTable(weights, "weights");
EmitTable(basins.WeighBy(inForce), "weights-in-force");
EmitTable(areal, "areal-rainfall");
EmitTable(areal.Coverage(), "coverage");
